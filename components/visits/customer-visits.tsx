import { Facts } from "@/components/ui/facts";
import { showTime, showWeekday, wallDay } from "@/lib/dates";
import type { VisitState } from "@/lib/visits/rules";
import type { VisitRow } from "@/lib/visits/schema";
import { dayWithYear, hoursOf, instrumentWords } from "./time-words";
import { VisitStateWord } from "./visit-state";

/** What the state means for the one who waits at home. */
const meaning: Partial<Record<VisitState, string>> = {
  offered: "We have kept this time for you. Tell us if it suits you; the telephone is enough.",
  confirmed: "This time is agreed. Please keep the room quiet and the lid clear.",
  "on-the-way": "We are on the way to you.",
  "in-progress": "We are at work on your instrument.",
};

export function NextVisit({ visit, locale }: { visit: VisitRow; locale: string }) {
  return (
    <section aria-label="Your next visit" className="mt-6">
      <div className="serif border-y border-t-edge! border-b-hairline! py-4 text-28">
        <div>{showWeekday(wallDay(visit.start), locale)}</div>
        <div>
          {showTime(visit.start, locale)} to {showTime(visit.end, locale)}
        </div>
      </div>
      <Facts
        look="rows"
        facts={[
          { name: "State", value: <VisitStateWord state={visit.state} /> },
          {
            name: visit.jobs === 1 ? "Instrument" : "Instruments",
            value: instrumentWords(visit.instruments, visit.jobs),
          },
          { name: "At", value: [visit.siteName, visit.place].filter(Boolean).join(", ") },
          { name: "Comes", value: visit.technicians.map(({ name }) => name).join(", ") },
        ]}
      />
      {meaning[visit.state] ? <p className="mt-4">{meaning[visit.state]}</p> : null}
    </section>
  );
}

export function CustomerVisits({
  title,
  visits,
  locale,
}: {
  title: string;
  visits: readonly VisitRow[];
  locale: string;
}) {
  if (visits.length === 0) return null;
  return (
    <section className="mt-10">
      <h2>{title}</h2>
      <ul className="mt-2 border-t border-edge!">
        {visits.map((visit) => (
          <li key={visit.id} className="border-b border-hairline py-2.5">
            <div className="flex flex-wrap items-baseline justify-between gap-x-4">
              <b className="font-semibold">{dayWithYear(visit.start, locale)}</b>
              <VisitStateWord state={visit.state} className="text-14" />
            </div>
            <p className="text-14 text-ink-soft">
              {[hoursOf(visit, locale), visit.siteName].filter(Boolean).join(", ")}
              {visit.technicians.length > 0
                ? `, with ${visit.technicians.map(({ name }) => name).join(" and ")}`
                : null}
            </p>
            <p className="text-14">{instrumentWords(visit.instruments, visit.jobs)}</p>
          </li>
        ))}
      </ul>
    </section>
  );
}
