import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { LoadingLines } from "@/components/ui/states";

export default function TodayLoading() {
  return (
    <Spread
      left={
        <LeftPage title="Today" fold={null}>
          <LoadingLines label="Loading the day" lines={9} row="h-9" />
        </LeftPage>
      }
      right={
        <RightPage>
          <LoadingLines
            label="Loading the visit in hand"
            lines={6}
            row="h-13"
            className="mt-5 max-lg:hidden"
          />
        </RightPage>
      }
    />
  );
}
