import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { NewVisitForm } from "@/components/visits/new-visit-form";
import { SitePicker } from "@/components/visits/site-picker";
import { may, scopeOf } from "@/lib/auth/access";
import { isDay } from "@/lib/dates";
import { getServicePlan } from "@/lib/diary/service-plans/service";
import { idParams } from "@/lib/doors/params";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { siteListQuery } from "@/lib/sites/schema";
import { findSites } from "@/lib/sites/service";
import { bookingChoices } from "@/lib/visits/booking/service";
import { offeredStart } from "@/lib/visits/times";
import { timeOfMinute, wallTimeOf } from "@/lib/wall-time";
import { bookVisitAction } from "../actions";

export const metadata: Metadata = { title: "Book a visit" };

type Asked = { site: string; instrument: string; date: string; q: string };

export default async function NewVisitPage({ searchParams }: PageProps<"/visits/new">) {
  const asked = read(await searchParams);
  return (
    <Spread
      left={
        <LeftPage
          crumb={[{ label: "Visits", href: "/visits" }, { label: "New" }]}
          title="Book a visit"
          subtitle="One place, one time, those who come, and the work."
          fold={null}
        />
      }
      right={<RightPage>{asked.site ? <Book asked={asked} /> : <ChooseSite asked={asked} />}</RightPage>}
    />
  );
}

async function Book({ asked }: { asked: Asked }) {
  const actor = await staffActor();
  const { locale } = await shopClock(actor);
  const { site, instruments, technicians } = await choicesAt(asked.site);
  const only = instruments.length === 1 ? instruments.map(({ id }) => id) : [];
  const named = instruments.filter(({ id }) => id === asked.instrument).map(({ id }) => id);
  const plan = named[0] ? await getServicePlan(actor, named[0]) : null;
  const date = isDay(asked.date) ? asked.date : site.today;
  return (
    <>
      <WorkHead
        title={site.name}
        summary={
          <>
            Times are those of {site.timeZone}.{" "}
            <AppLink href={`/visits/new${asked.date ? `?date=${asked.date}` : ""}`} className="link">
              Choose another site
            </AppLink>
          </>
        }
      />
      <NewVisitForm
        visitId={newId()}
        site={site}
        instruments={instruments}
        technicians={technicians}
        chosen={{
          date,
          time: offeredStart(
            date,
            plan?.hours ? timeOfMinute(plan.hours.from) : "09:00",
            wallTimeOf(new Date(), site.timeZone),
          ),
          instrumentIds: named.length > 0 ? named : only,
          habit: plan ?? undefined,
        }}
        ownId={scopeOf(actor.role, "visits.change") === "own" ? actor.memberId : undefined}
        locale={locale}
        action={bookVisitAction}
      />
    </>
  );
}

async function choicesAt(siteId: string) {
  if (!idParams.safeParse({ id: siteId }).success) notFound();
  const actor = await staffActor();
  try {
    return await bookingChoices(actor, siteId);
  } catch (error) {
    if (error instanceof AppError && error.code === "invalid") notFound();
    throw error;
  }
}

const shown = 12;

async function ChooseSite({ asked }: { asked: Asked }) {
  const actor = await staffActor();
  const { items, next } = await findSites(
    actor,
    siteListQuery.parse({ most: shown, ...(asked.q ? { q: asked.q } : {}) }),
  );
  return (
    <>
      <WorkHead title="Where?" summary="The instruments and the time zone come with the site." />
      {items.length > 0 || asked.q ? (
        <SitePicker q={asked.q} date={asked.date} sites={items} more={next !== null} />
      ) : null}
      {items.length === 0 ? (
        asked.q ? (
          <EmptyState title="No site is called that">Try fewer letters, the street, or the town.</EmptyState>
        ) : (
          <EmptyState
            title="No sites yet"
            action={
              may(actor.role, "sites.change") ? (
                <LinkButton kind="primary" href="/sites/new">
                  Add a site
                </LinkButton>
              ) : null
            }
          >
            Visits happen at sites.{" "}
            {may(actor.role, "sites.change") ? "Add one first." : "The office adds them."}
          </EmptyState>
        )
      ) : null}
    </>
  );
}

function read(params: Record<string, string | string[] | undefined>): Asked {
  const text = (name: keyof Asked) => {
    const value = params[name];
    return typeof value === "string" ? value.slice(0, 200) : "";
  };
  return { site: text("site"), instrument: text("instrument"), date: text("date"), q: text("q") };
}
