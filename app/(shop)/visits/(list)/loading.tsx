import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { LoadingLines } from "@/components/ui/states";

export default function VisitsLoading() {
  return (
    <Spread
      left={<LeftPage title="Visits" />}
      right={
        <RightPage>
          <LoadingLines label="Loading" lines={8} row="h-9 phone:h-16" className="mt-5" />
        </RightPage>
      }
    />
  );
}
