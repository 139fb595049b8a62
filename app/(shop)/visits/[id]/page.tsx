import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { cache } from "react";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Facts } from "@/components/ui/facts";
import { Note } from "@/components/ui/note";
import { goesOn } from "@/components/visits/progress-words";
import { dayWithYear, durationWords, hoursOf, minutesBetween } from "@/components/visits/time-words";
import { VisitHistory } from "@/components/visits/visit-history";
import { VisitJobs } from "@/components/visits/visit-jobs";
import { VisitMoves } from "@/components/visits/visit-moves";
import { VisitStateWord } from "@/components/visits/visit-state";
import { idParams } from "@/lib/doors/params";
import { AppError } from "@/lib/errors";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { getVisitWork, type VisitWork } from "@/lib/visits/progress/service";
import { isOver } from "@/lib/visits/rules";
import type { VisitRecord } from "@/lib/visits/schema";
import { moveVisitAction, stepVisitAction } from "../actions";

type Props = PageProps<"/visits/[id]">;

const workOf = cache(async (id: string, job: string | undefined): Promise<VisitWork> => {
  const read = idParams.safeParse({ id });
  if (!read.success) notFound();
  try {
    return await getVisitWork(await staffActor(), id, job);
  } catch (error) {
    if (error instanceof AppError && error.code === "not-found") notFound();
    throw error;
  }
});

/** Asked by title and page alike with the same words, so that it is read once. */
async function workAsked({ params, searchParams }: Props): Promise<VisitWork> {
  const { job } = await searchParams;
  return workOf((await params).id, typeof job === "string" ? job : undefined);
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const { visit } = await workAsked(props);
  return { title: `${visit.site.name}, ${dayWithYear(visit.start, "en-GB")}` };
}

export default async function VisitPage(props: Props) {
  const actor = await staffActor();
  const work = await workAsked(props);
  const { visit } = work;
  const { locale, demo, timeZone: shopZone } = await shopClock(actor);
  return (
    <Spread
      left={<About visit={visit} locale={locale} shopZone={shopZone} />}
      right={
        <RightPage>
          <WorkHead
            title={visit.jobs.length === 1 ? "1 instrument" : `${visit.jobs.length} instruments`}
            summary={<VisitStateWord state={visit.state} className="text-14" />}
            actions={
              <>
                {demo ? <DemoBadge /> : null}
                <VisitMoves
                  visit={visit}
                  locale={locale}
                  step={stepVisitAction}
                  move={moveVisitAction}
                  goOn={goesOn(work, `/visits/${visit.id}`)}
                  changeHref={
                    visit.canChange && !isOver(visit.state) ? `/visits/${visit.id}/change` : undefined
                  }
                />
              </>
            }
          />
          <VisitJobs work={work} href={`/visits/${visit.id}`} locale={locale} />
          {visit.canChange ? null : (
            <p className="lab mt-4">
              This is another technician’s visit: you can read it. The office can put you on it.
            </p>
          )}
        </RightPage>
      }
    />
  );
}

function About({ visit, locale, shopZone }: { visit: VisitRecord; locale: string; shopZone: string }) {
  const { site, customer } = visit;
  const address = [site.street, [site.postalCode, site.city].filter(Boolean).join(" ")].filter(Boolean);
  return (
    <LeftPage
      crumb={[{ label: "Visits", href: "/visits" }, { label: dayWithYear(visit.start, locale) }]}
      title={site.name}
      subtitle={`${dayWithYear(visit.start, locale)}, ${hoursOf(visit, locale)}`}
    >
      {visit.movedToId || visit.movedFromId ? <Moved visit={visit} /> : null}
      <Facts
        facts={[
          {
            name: "Comes",
            value: visit.technicians.map(({ name }) => name).join(", "),
          },
          { name: "Length", value: durationWords(minutesBetween(visit.start, visit.end)) },
          visit.timeZone !== shopZone && { name: "Time zone", value: visit.timeZone },
          {
            name: "Customer",
            value: (
              <AppLink href={`/customers/${customer.id}`} className="link">
                {customer.name}
              </AppLink>
            ),
          },
          customer.phone !== null && {
            name: "Telephone",
            value: (
              <a href={`tel:${customer.phone.replace(/[^+\d]/g, "")}`} className="link">
                {customer.phone}
              </a>
            ),
          },
          address.length > 0 && { name: "Address", value: address.join(", ") },
        ]}
      />
      {site.accessNotes ? <Note by="Getting in">{site.accessNotes}</Note> : null}
      {visit.notes ? <Note by="Notes on this visit">{visit.notes}</Note> : null}
      <section aria-labelledby="history">
        <h2 id="history" className="mb-3 text-19! leading-6!">
          What happened
        </h2>
        <VisitHistory events={visit.events} locale={locale} timeZone={visit.timeZone} />
      </section>
    </LeftPage>
  );
}

function Moved({ visit: { movedToId, movedFromId } }: { visit: VisitRecord }) {
  return (
    <ul>
      {movedToId ? (
        <li>
          <AppLink href={`/visits/${movedToId}`} className="link inline-flex min-h-6 items-center">
            See where it moved to
          </AppLink>
        </li>
      ) : null}
      {movedFromId ? (
        <li>
          <AppLink href={`/visits/${movedFromId}`} className="link inline-flex min-h-6 items-center">
            It was at another time before
          </AppLink>
        </li>
      ) : null}
    </ul>
  );
}
