import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { LoadingLines } from "@/components/ui/states";

export default function Loading() {
  return (
    <Spread
      left={<LeftPage title="Customers" fold={null} />}
      right={
        <RightPage>
          <LoadingLines label="Loading: customers" lines={12} row="h-9 phone:h-16" className="mt-24" />
        </RightPage>
      }
    />
  );
}
