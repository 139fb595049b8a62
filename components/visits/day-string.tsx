import { AppLink } from "@/components/ui/app-link";
import { cx } from "@/components/ui/class-names";
import { Note } from "@/components/ui/note";
import { showTime } from "@/lib/dates";
import type { VisitRow } from "@/lib/visits/schema";
import { durationWords, instrumentWords, minutesBetween } from "./time-words";
import { VisitStateWord } from "./visit-state";

type Hung = VisitRow & { accessNotes?: string | null };

const gone = new Set(["cancelled", "missed"]);

/** A day's visits hung on the string, with the stud at the one in hand. */
export function DayString({
  visits,
  inHandId,
  locale,
  label,
}: {
  visits: readonly Hung[];
  inHandId: string | undefined;
  locale: string;
  label: string;
}) {
  return (
    <ol aria-label={label}>
      {visits.map((visit, index) => {
        const before = visits[index - 1];
        const pause = before ? minutesBetween(before.end, visit.start) : 0;
        return (
          <li key={visit.id}>
            {pause > 0 ? <Pause minutes={pause} /> : null}
            <HungVisit visit={visit} inHand={visit.id === inHandId} locale={locale} />
          </li>
        );
      })}
    </ol>
  );
}

const grid = "grid grid-cols-[48px_28px_minmax(0,1fr)] max-lg:grid-cols-[56px_28px_minmax(0,1fr)]";

function HungVisit({ visit, inHand, locale }: { visit: Hung; inHand: boolean; locale: string }) {
  return (
    <div className={cx(grid, "relative")} aria-current={inHand ? "step" : undefined}>
      <div>
        <b className="block text-16 font-semibold">{showTime(visit.start, locale)}</b>
        <span className="lab block">
          <span className="sr-only">until </span>
          {showTime(visit.end, locale)}
        </span>
      </div>
      <div className="relative" aria-hidden="true">
        <span className="absolute inset-y-0 left-[11px] border-l border-edge!" />
        {inHand ? (
          <i className="stud top-0.5 left-1.5 h-6 w-[11px] [--stud-hole:var(--paper)]" />
        ) : (
          <i className="absolute top-2 left-[7px] block size-[9px] rounded-full border-[1.5px] border-edge! bg-paper" />
        )}
      </div>
      <div className="min-w-0 pb-2">
        <div className="flex items-baseline justify-between gap-2">
          <AppLink
            href={`/visits/${visit.id}`}
            className={cx(
              "min-w-0 rounded-sm text-16 font-semibold break-words hover:underline",
              // The whole entry is the target, not only its name.
              "after:absolute after:inset-0",
              gone.has(visit.state) && "line-through decoration-1",
            )}
          >
            {visit.siteName}
          </AppLink>
          <VisitStateWord state={visit.state} />
        </div>
        <p className="max-lg:text-16">{instrumentWords(visit.instruments, visit.jobs)}</p>
        {visit.place ? <p className="text-ink-soft max-lg:text-16">{visit.place}</p> : null}
        {visit.accessNotes ? <Note className="mt-0.5">{visit.accessNotes}</Note> : null}
      </div>
    </div>
  );
}

function Pause({ minutes }: { minutes: number }) {
  return (
    <div className={cx(grid, "min-h-7")}>
      <div />
      <div className="relative" aria-hidden="true">
        <span className="absolute inset-y-0 left-[11px] border-l border-dashed border-edge!" />
      </div>
      <p className="lab pt-1 pb-3">{durationWords(minutes)} between</p>
    </div>
  );
}
