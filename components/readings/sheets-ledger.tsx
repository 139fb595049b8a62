import { fixed } from "@/components/charts/format";
import { AppLink } from "@/components/ui/app-link";
import { DemoBadge } from "@/components/ui/demo-badge";
import { showInstant } from "@/lib/dates";
import type { SheetRow } from "@/lib/readings/schema";
import { stageTitle } from "./stage-title";

/** The sheets of one instrument as a dated column, newest first. */
export function SheetsLedger({
  at,
  sheets,
  clock,
}: {
  at: string;
  sheets: readonly SheetRow[];
  clock: { locale: string; timeZone: string; demo: boolean };
}) {
  return (
    <>
      <table className="w-full border-collapse max-sm:block">
        <caption className="sr-only">Reading sheets, newest first</caption>
        <thead className="max-sm:hidden">
          <tr className="h-8 border-b border-edge! text-left align-bottom text-12 text-ink-soft [&>*]:pr-3 [&>*]:pb-1.5 [&>*]:font-medium">
            <th scope="col">Read on</th>
            <th scope="col">Stage</th>
            <th scope="col" className="text-right">
              Notes
            </th>
            <th scope="col" className="text-right">
              Humidity
            </th>
            <th scope="col" className="text-right max-lg:hidden">
              Temperature
            </th>
            <th scope="col" className="pr-0! pl-3 max-lg:hidden">
              Read by
            </th>
          </tr>
        </thead>
        <tbody className="max-sm:block max-sm:border-t max-sm:border-edge!">
          {sheets.map((sheet) => (
            <tr
              key={sheet.id}
              className="relative h-9 border-b border-hairline hover:bg-cover touch:h-11 max-sm:grid max-sm:h-auto! max-sm:grid-cols-[1fr_auto] max-sm:gap-x-3 max-sm:py-2 [&>td]:pr-3"
            >
              <td className="font-semibold whitespace-nowrap">
                <AppLink
                  href={`${at}/${sheet.id}`}
                  className="rounded-sm after:absolute after:inset-0 focus-visible:outline-none focus-visible:after:outline-2 focus-visible:after:-outline-offset-2 focus-visible:after:outline-brass"
                >
                  {showInstant(sheet.takenAt, clock.locale, clock.timeZone)}
                </AppLink>
              </td>
              <td className="whitespace-nowrap max-sm:pr-0! max-sm:text-right">{stageTitle(sheet.stage)}</td>
              <td className="text-right whitespace-nowrap max-sm:text-left max-sm:text-ink-soft">
                {sheet.notesRead}
                <span className="sm:sr-only">{sheet.notesRead === 1 ? " note" : " notes"}</span>
              </td>
              <td className="text-right whitespace-nowrap max-sm:pr-0! max-sm:text-ink-soft">
                {sheet.humidityPercent === null ? (
                  <span className="text-ink-soft max-sm:hidden">–</span>
                ) : (
                  `${sheet.humidityPercent} %`
                )}
              </td>
              <td className="text-right whitespace-nowrap max-lg:hidden">
                {sheet.temperatureC === null ? (
                  <span className="text-ink-soft">–</span>
                ) : (
                  `${fixed(sheet.temperatureC, 1)} °C`
                )}
              </td>
              <td className="pr-0! pl-3 max-lg:hidden">{sheet.takenByName ?? "–"}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {clock.demo ? (
        <div className="mt-3 flex justify-end">
          <DemoBadge />
        </div>
      ) : null}
    </>
  );
}
