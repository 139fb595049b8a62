import { showDayOf } from "@/lib/dates";
import type { InstrumentRow } from "@/lib/instruments/schema";

/** A customer's own instruments, in plain words. */
export function CustomerInstruments({
  instruments,
  locale,
  timeZone,
  shopName,
}: {
  instruments: readonly Pick<InstrumentRow, "id" | "name" | "room" | "siteName" | "year" | "lastSheetAt">[];
  locale: string;
  timeZone: string;
  shopName: string;
}) {
  return (
    <section className="mt-10">
      <h2>{instruments.length === 1 ? "Your instrument" : "Your instruments"}</h2>
      {instruments.length === 0 ? (
        <p className="mt-2 text-ink-soft">
          No instrument is written down under your name yet. {shopName} adds it at the first visit.
        </p>
      ) : (
        <ul className="mt-2 border-t border-edge!">
          {instruments.map((instrument) => (
            <li key={instrument.id} className="border-b border-hairline py-2.5">
              <h3>{instrument.name}</h3>
              <p className="text-14 text-ink-soft">
                {[instrument.siteName, instrument.room, instrument.year ? `made in ${instrument.year}` : ""]
                  .filter(Boolean)
                  .join(", ")}
              </p>
              {instrument.lastSheetAt ? (
                <p className="text-14">
                  Last measured on {showDayOf(instrument.lastSheetAt, locale, timeZone)}.
                </p>
              ) : null}
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
