import { RecordsLoading } from "@/components/records/records-page";

export default function Loading() {
  return <RecordsLoading title="Sites" />;
}
