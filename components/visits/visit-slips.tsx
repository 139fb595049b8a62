import { AppLink } from "@/components/ui/app-link";
import type { VisitRow } from "@/lib/visits/schema";
import { dayWithYear, hoursOf, instrumentWords } from "./time-words";
import { VisitStateWord } from "./visit-state";

/** A short list of visits that want something done. Nothing is drawn where there are none. */
export function VisitSlips({
  title,
  about,
  visits,
  locale,
}: {
  title: string;
  about: string;
  visits: readonly VisitRow[];
  locale: string;
}) {
  if (visits.length === 0) return null;
  return (
    <section className="mt-6">
      <h2 className="text-19! leading-6!">{title}</h2>
      <p className="lab mt-0.5 mb-2">{about}</p>
      <ul className="border-t border-edge!">
        {visits.map((visit) => (
          <li key={visit.id}>
            <AppLink
              href={`/visits/${visit.id}`}
              className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-1.5 hover:bg-cover"
            >
              <span className="truncate font-medium max-lg:text-16">{visit.siteName}</span>
              <VisitStateWord state={visit.state} className="justify-self-end" />
              <span className="lab truncate">
                {instrumentWords(visit.instruments, visit.jobs)} ·{" "}
                {visit.technicians.map(({ name }) => name).join(", ")}
              </span>
              <span className="lab justify-self-end whitespace-nowrap">
                {dayWithYear(visit.start, locale)}, {hoursOf(visit, locale)}
              </span>
            </AppLink>
          </li>
        ))}
      </ul>
    </section>
  );
}
