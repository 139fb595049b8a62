import type { Metadata } from "next";
import { WorkHead } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { VisitStateWord } from "@/components/visits/visit-state";
import { may } from "@/lib/auth/access";
import { showWallTime } from "@/lib/dates";
import { findVisitsOf } from "@/lib/instruments/history/service";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { instrumentOf } from "../instrument-of";

export const metadata: Metadata = { title: "Visits" };

export default async function InstrumentVisitsPage({ params }: PageProps<"/instruments/[id]/visits">) {
  const instrument = await instrumentOf((await params).id);
  const actor = await staffActor();
  const [visits, { locale }] = await Promise.all([findVisitsOf(actor, instrument.id), shopClock(actor)]);
  const book =
    may(actor.role, "visits.change") && instrument.place ? (
      <LinkButton href={`/visits/new?site=${instrument.place.siteId}`}>Book a visit</LinkButton>
    ) : null;
  return (
    <>
      <WorkHead
        title="Visits"
        summary={visits.length === 1 ? "1 visit, newest first" : `${visits.length} visits, newest first`}
        actions={visits.length > 0 ? book : null}
      />
      {visits.length === 0 ? (
        <EmptyState title="No visits yet" action={book}>
          Visits of the site that have this instrument on their list appear here.
        </EmptyState>
      ) : (
        <ul className="border-t border-edge!">
          {visits.map((visit) => (
            <li key={visit.jobId}>
              <AppLink
                href={`/visits/${visit.visitId}`}
                className="grid min-h-11 grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-hairline py-2 -outline-offset-2 hover:bg-cover"
              >
                <span className="font-semibold">{showWallTime(visit.startsLocal, locale)}</span>
                <VisitStateWord state={visit.state} className="justify-self-end" />
                <span className="truncate">{visit.work}</span>
                <span className="lab justify-self-end">{visit.technicians.join(", ")}</span>
                {visit.remarks ? (
                  <span className="note col-span-2 whitespace-pre-line">{visit.remarks}</span>
                ) : null}
              </AppLink>
            </li>
          ))}
        </ul>
      )}
    </>
  );
}
