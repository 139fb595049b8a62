import { HistoryString } from "@/components/charts/history-string";
import { showDay } from "@/lib/dates";
import { airSentence, pitchSentence } from "@/lib/instruments/history/plain-words";
import type { HistoryEntry } from "@/lib/instruments/history/rules";

const inSight = 8;

/** What a customer may know of an instrument's past: every visit in plain words, its pitch and the air so far. */
export function OwnHistory({
  history,
  locale,
  shopName,
}: {
  history: readonly HistoryEntry[];
  locale: string;
  shopName: string;
}) {
  if (history.length === 0) {
    return (
      <p className="mt-6 text-ink-soft">
        Nothing is written down of it yet. What {shopName} does and finds appears here after the first visit.
      </p>
    );
  }
  const measured = history.filter(
    ({ asFoundCents, asLeftCents }) => asFoundCents !== null || asLeftCents !== null,
  );
  return (
    <>
      {measured.length > 1 ? (
        <section aria-labelledby="pitch" className="mt-10">
          <h2 id="pitch" className="mb-3">
            Pitch and humidity
          </h2>
          <HistoryString
            ground="var(--sheet)"
            entries={measured
              .slice(0, inSight)
              .map((entry) => ({ ...entry, date: showDay(entry.day, locale) }))}
          />
          <p className="mt-3 text-14 text-ink-soft">
            A cent is a hundredth of the step from one key to the next. Pitch rises and falls with the air of
            the seasons.
          </p>
        </section>
      ) : null}
      <section aria-labelledby="done" className="mt-10">
        <h2 id="done">What was done</h2>
        <ul className="mt-2 border-t border-edge!">
          {history.map((entry) => (
            <li key={entry.id} className="border-b border-hairline py-2.5">
              <div className="flex flex-wrap items-baseline justify-between gap-x-4">
                <b className="font-semibold">{showDay(entry.day, locale)}</b>
                <span className="text-14">{entry.work}</span>
              </div>
              <p className="text-14 text-ink-soft">
                {[pitchSentence(entry), airSentence(entry.humidityPercent)].filter(Boolean).join(" ")}
              </p>
            </li>
          ))}
        </ul>
      </section>
    </>
  );
}
