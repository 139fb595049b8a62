import { HistoryString } from "@/components/charts/history-string";
import { AppLink } from "@/components/ui/app-link";
import { Note } from "@/components/ui/note";
import { Sign } from "@/components/ui/sign";
import { showDay } from "@/lib/dates";
import type { OpenedJob } from "@/lib/visits/progress/service";

const inSight = 5;

/** What to know beside the steps: caution, what holds for this instrument, and its pitch so far. */
export function JobBackground({
  instrumentId,
  opened: { history, standingNote },
  farFlat,
  locale,
}: {
  instrumentId: string;
  opened: Pick<OpenedJob, "history" | "standingNote">;
  farFlat: boolean;
  locale: string;
}) {
  return (
    <div className="mt-7 grid gap-x-10 gap-y-6 xl:grid-cols-2">
      <section aria-label="Pitch and humidity so far" className="min-w-0">
        <h3 className="mb-3 text-19! leading-6!">Pitch and humidity so far</h3>
        {history.length > 0 ? (
          <HistoryString
            ground="var(--sheet)"
            entries={history.slice(0, inSight).map((entry) => ({
              ...entry,
              date: entry.visitId ? (
                <AppLink
                  href={`/visits/${entry.visitId}`}
                  // Its room to press lies around the words and moves nothing.
                  className="relative hover:underline touch:after:absolute touch:after:-top-3.5 touch:after:left-0 touch:after:h-11 touch:after:w-24 touch:after:content-['']"
                >
                  {showDay(entry.day, locale)}
                </AppLink>
              ) : (
                showDay(entry.day, locale)
              ),
            }))}
          />
        ) : (
          <p className="text-ink-soft">Nothing yet. The first reading sheet begins it.</p>
        )}
        {history.length > inSight ? (
          <AppLink
            href={`/instruments/${instrumentId}/visits`}
            className="link mt-2 inline-flex min-h-6 items-center touch:min-h-11 touch:min-w-11"
          >
            All {history.length}
          </AppLink>
        ) : null}
      </section>
      {farFlat || standingNote ? (
        // Where the two stand under each other, the caution comes before the past.
        <div className="grid content-start gap-5 max-xl:order-first max-lg:text-16">
          {farFlat ? <RaiseCaution /> : null}
          {standingNote ? (
            <Note quoted by="Standing note">
              {standingNote}
            </Note>
          ) : null}
        </div>
      ) : null}
    </div>
  );
}

function RaiseCaution() {
  return (
    <p className="flex gap-2">
      <span className="flex h-lh items-center text-rust">
        <Sign name="attention" label="Caution" />
      </span>
      <span className="min-w-0">
        <b className="font-semibold">Raise pitch in steps; wear eye protection</b> and keep your face out of
        the string plane. Strings can break at any tension without warning: stop if you see rust, cracks or
        moving pins. Local rules and licensed practice come first.
      </span>
    </p>
  );
}
