import type { Metadata } from "next";
import { ActionStrip } from "@/components/shell/action-strip";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { Sign } from "@/components/ui/sign";
import { EmptyState } from "@/components/ui/states";
import { DayString } from "@/components/visits/day-string";
import { FirstSteps } from "@/components/visits/first-steps";
import { goesOn } from "@/components/visits/progress-words";
import { hoursOf } from "@/components/visits/time-words";
import { VisitJobs } from "@/components/visits/visit-jobs";
import { NextStep } from "@/components/visits/visit-moves";
import { VisitSlips } from "@/components/visits/visit-slips";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { addDays, isDay, showWeekday } from "@/lib/dates";
import { staffActor } from "@/lib/pages/page-actor";
import { type WorkDay, workDay } from "@/lib/visits/day/service";
import { getVisitWork, type VisitWork } from "@/lib/visits/progress/service";
import { inHand } from "@/lib/visits/rules";
import { stepVisitAction } from "../visits/actions";

export const metadata: Metadata = { title: "Today" };

export default async function TodayPage({ searchParams }: PageProps<"/today">) {
  const actor = await staffActor();
  const { date, job } = await searchParams;
  const day = await workDay(actor, typeof date === "string" && isDay(date) ? date : undefined);
  const now = new Date().toISOString();
  const handed = day.reach === "own" && day.day === day.today ? inHand(day.visits, now) : undefined;
  const work = handed
    ? await getVisitWork(actor, handed.id, typeof job === "string" ? job : undefined)
    : null;
  return (
    <Spread
      left={<DayPage day={day} now={now} />}
      right={
        <RightPage className={day.reach === "own" && day.leftOpen.length === 0 ? "max-lg:py-0!" : undefined}>
          {work ? <InHand work={work} locale={day.locale} /> : null}
          {work || day.visits.length > 0 ? null : <NothingToday day={day} actor={actor} />}
          {day.reach === "all" ? <ShopsDay day={day} actor={actor} /> : null}
          <VisitSlips
            title="Left open on past days"
            about="Finish or close them, or say that nobody was there."
            visits={day.leftOpen}
            locale={day.locale}
          />
        </RightPage>
      }
    />
  );
}

function DayPage({ day, now }: { day: WorkDay; now: string }) {
  const count = day.visits.length;
  return (
    <LeftPage
      crumb={[{ label: crumbOf(day) }]}
      // Day and month stay on one line.
      title={showWeekday(day.day, day.locale).replace(/(\d+) (?=\p{L})/u, "$1\u00a0")}
      subtitle={count === 0 ? "No visits" : count === 1 ? "1 visit" : `${count} visits`}
      aside={day.demo ? <DemoBadge /> : null}
      fold={null}
    >
      <div className="grid gap-5">
        <DayTurner day={day} />
        {groups(day).map(({ name, visits }) => (
          <section key={name} aria-label={name}>
            {day.reach === "all" ? (
              <h2 className="mb-2 border-b border-edge! pb-1 text-19! leading-6!">{name}</h2>
            ) : null}
            <DayString
              visits={visits}
              inHandId={day.day === day.today ? inHand(visits, now)?.id : undefined}
              locale={day.locale}
              label={`Visits of ${name}`}
            />
          </section>
        ))}
        {day.next ? (
          <AppLink
            href={`/today?date=${day.next.day}`}
            className="flex min-h-11 items-center justify-between gap-3 border-y border-hairline hover:bg-cover max-lg:text-16"
          >
            <b className="font-semibold">{showWeekday(day.next.day, day.locale)}</b>
            <span className="text-ink-soft">
              {day.next.visits === 1 ? "1 visit" : `${day.next.visits} visits`}
            </span>
          </AppLink>
        ) : null}
      </div>
    </LeftPage>
  );
}

function crumbOf({ day, today }: WorkDay): string {
  if (day === today) return "Today";
  const year = day.slice(0, 4);
  return year === today.slice(0, 4) ? "Another day" : `Another day, ${year}`;
}

function DayTurner({ day }: { day: WorkDay }) {
  const turn =
    "flex h-9 items-center gap-1.5 rounded border border-edge! px-3 hover:bg-cover touch:h-11 touch:min-w-11 touch:justify-center";
  return (
    <nav aria-label="Day" className="flex items-center gap-2" data-no-print>
      <AppLink href={`/today?date=${addDays(day.day, -1)}`} className={turn} aria-label="The day before">
        <Sign name="chevron-left" />
      </AppLink>
      <AppLink href={`/today?date=${addDays(day.day, 1)}`} className={turn} aria-label="The day after">
        <Sign name="chevron-right" />
      </AppLink>
      {day.day === day.today ? null : (
        <AppLink href="/today" className={`${turn} font-semibold`}>
          Today
        </AppLink>
      )}
    </nav>
  );
}

/** A technician's own day is one string; the shop's day is one for each who has visits. */
function groups({ reach, visits }: WorkDay) {
  if (reach === "own") return visits.length > 0 ? [{ name: "the day", visits }] : [];
  const names = [...new Set(visits.flatMap(({ technicians }) => technicians.map(({ name }) => name)))].sort();
  return names.map((name) => ({
    name,
    visits: visits.filter(({ technicians }) => technicians.some((one) => one.name === name)),
  }));
}

function InHand({ work, locale }: { work: VisitWork; locale: string }) {
  const { visit, jobs } = work;
  const only = jobs.length === 1 ? jobs[0] : undefined;
  const next = {
    visit,
    siteName: visit.site.name,
    step: stepVisitAction,
    goOn: goesOn(work, "/today"),
  };
  return (
    <>
      <div className="max-lg:hidden">
        <WorkHead
          title={
            only ? (
              <AppLink href={`/instruments/${only.instrumentId}`} className="rounded-sm hover:underline">
                {[only.instrument, only.room].filter(Boolean).join(", ")}
              </AppLink>
            ) : (
              visit.site.name
            )
          }
          summary={
            only
              ? `${visit.site.name}, ${hoursOf(visit, locale)}. ${only.work}.`
              : `${hoursOf(visit, locale)}, ${jobs.length} instruments`
          }
          actions={<NextStep {...next} strip={false} />}
        />
        <VisitJobs work={work} href="/today" locale={locale} named={only !== undefined} />
      </div>
      <NextStep {...next} strip />
    </>
  );
}

function NothingToday({ day, actor }: { day: WorkDay; actor: Actor }) {
  if (day.beginning)
    return <FirstSteps records={day.beginning} mayAdd={may(actor.role, "customers.change")} />;
  const when = day.day === day.today ? "today" : "on this day";
  return (
    <EmptyState
      title={day.reach === "own" ? `You have no visits ${when}` : `Nobody has a visit ${when}`}
      className="lg:mt-5"
      action={
        may(actor.role, "visits.change") ? (
          <LinkButton kind="primary" href={`/visits/new?date=${day.day}`}>
            Book a visit
          </LinkButton>
        ) : null
      }
    >
      {day.next
        ? `The next ones are on ${showWeekday(day.next.day, day.locale)}.`
        : "Nothing is booked for the next three weeks either."}
    </EmptyState>
  );
}

function ShopsDay({ day, actor }: { day: WorkDay; actor: Actor }) {
  const books = may(actor.role, "visits.change");
  const bookHref = `/visits/new?date=${day.day}`;
  return (
    <>
      {books && day.visits.length > 0 ? (
        <ActionStrip>
          <LinkButton kind="primary" href={bookHref}>
            Book a visit
          </LinkButton>
        </ActionStrip>
      ) : null}
      {day.visits.length > 0 ? (
        <WorkHead
          title="What waits"
          summary="Offers without an answer, and visits nobody has closed."
          actions={
            books ? (
              <LinkButton kind="primary" href={bookHref} className="max-lg:hidden">
                Book a visit
              </LinkButton>
            ) : null
          }
        />
      ) : null}
      <VisitSlips
        title="Offered, without an answer"
        about="Confirm them when the customer has answered."
        visits={day.unanswered}
        locale={day.locale}
      />
      {day.visits.length > 0 && day.unanswered.length === 0 && day.leftOpen.length === 0 ? (
        <EmptyState title="Nothing waits">
          Every offer has its answer, and every past visit is closed.
        </EmptyState>
      ) : null}
    </>
  );
}
