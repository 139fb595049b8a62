import { cx } from "@/components/ui/class-names";
import { Note } from "@/components/ui/note";
import { showInstant } from "@/lib/dates";
import type { VisitRecord } from "@/lib/visits/schema";
import { VisitStateWord } from "./visit-state";

/** What became of the visit, newest first, hung on the string; the stud is the state it is in. */
export function VisitHistory({
  events,
  locale,
  timeZone,
}: {
  events: VisitRecord["events"];
  locale: string;
  timeZone: string;
}) {
  const newestFirst = [...events].reverse();
  return (
    <ol>
      {newestFirst.map((event, index) => (
        <li key={`${event.at} ${event.to}`} className="grid grid-cols-[28px_minmax(0,1fr)]">
          <div className="relative" aria-hidden="true">
            <span
              className={cx(
                "absolute left-[11px] border-l border-edge!",
                index === 0 ? "top-2" : "top-0",
                index === newestFirst.length - 1 ? "h-2.5" : "bottom-0",
              )}
            />
            {index === 0 ? (
              <i className="stud top-0 left-1.5 h-5 w-[11px] [--stud-hole:var(--paper)]" />
            ) : (
              <i className="absolute top-1.5 left-[7px] block size-[9px] rounded-full border-[1.5px] border-edge! bg-paper" />
            )}
          </div>
          <div className="min-w-0 pb-3">
            <div className="flex flex-wrap items-baseline justify-between gap-x-3">
              <VisitStateWord state={event.to} />
              <span className="lab">{showInstant(event.at, locale, timeZone)}</span>
            </div>
            {event.by ? <p className="lab mt-0.5">{event.by}</p> : null}
            {event.reason ? <Note className="mt-0.5">{event.reason}</Note> : null}
          </div>
        </li>
      ))}
    </ol>
  );
}
