import { signed } from "@/components/charts/format";
import { AppLink } from "@/components/ui/app-link";
import { showDayOf } from "@/lib/dates";
import { kindLabels } from "@/lib/instruments/rules";
import type { InstrumentRow } from "@/lib/instruments/schema";

/** A short list of instruments inside another record's page. */
export function InstrumentLines({
  instruments,
  clock,
  showPlace = false,
  showOwner = false,
}: {
  instruments: readonly InstrumentRow[];
  clock: { locale: string; timeZone: string };
  showPlace?: boolean;
  showOwner?: boolean;
}) {
  if (instruments.length === 0) return <p className="text-ink-soft">No instruments yet.</p>;
  return (
    <ul className="border-t border-edge!">
      {instruments.map((row) => (
        <li key={row.id}>
          <AppLink
            href={`/instruments/${row.id}`}
            className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-1.5 -outline-offset-2 hover:bg-cover"
          >
            <span className="truncate font-semibold">{row.name}</span>
            <span className="lab">
              {row.lastFoundCents === null ? "no pitch read" : `found ${signed(row.lastFoundCents, 1)} cents`}
            </span>
            <span className="lab truncate">
              {[
                kindLabels[row.kind],
                row.year,
                showPlace && row.siteName,
                row.room,
                showOwner && row.ownerName,
              ]
                .filter(Boolean)
                .join(", ")}
            </span>
            <span className="lab justify-self-end">
              {row.lastSheetAt ? showDayOf(row.lastSheetAt, clock.locale, clock.timeZone) : ""}
            </span>
          </AppLink>
        </li>
      ))}
    </ul>
  );
}
