import { RecordsLoading } from "@/components/records/records-page";

export default function DueLoading() {
  return <RecordsLoading title="Due" />;
}
