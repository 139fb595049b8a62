import type { Metadata } from "next";
import { notFound, redirect } from "next/navigation";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { ChangeVisitForm } from "@/components/visits/change-visit-form";
import { dayWithYear, hoursOf } from "@/components/visits/time-words";
import { VisitStateWord } from "@/components/visits/visit-state";
import { scopeOf } from "@/lib/auth/access";
import { idParams } from "@/lib/doors/params";
import { AppError } from "@/lib/errors";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { correctionChoices } from "@/lib/visits/booking/service";
import { isOver } from "@/lib/visits/rules";
import { changeVisitAction } from "../../actions";

export const metadata: Metadata = { title: "Change a visit" };

export default async function ChangeVisitPage({ params }: PageProps<"/visits/[id]/change">) {
  const actor = await staffActor();
  const { visit, instruments, technicians } = await choicesFor((await params).id);
  if (!visit.canChange || isOver(visit.state)) redirect(`/visits/${visit.id}`);
  const { locale } = await shopClock(actor);
  const when = `${dayWithYear(visit.start, locale)}, ${hoursOf(visit, locale)}`;
  return (
    <Spread
      left={
        <LeftPage
          crumb={[
            { label: "Visits", href: "/visits" },
            { label: visit.site.name, href: `/visits/${visit.id}` },
          ]}
          title={visit.site.name}
          subtitle={when}
          aside={<VisitStateWord state={visit.state} />}
          fold={null}
        />
      }
      right={
        <RightPage>
          <WorkHead title="Change the visit" summary="Its time changes with “Move to another time”." />
          <ChangeVisitForm
            visit={visit}
            instruments={instruments}
            technicians={technicians}
            ownId={scopeOf(actor.role, "visits.change") === "own" ? actor.memberId : undefined}
            locale={locale}
            action={changeVisitAction}
          />
        </RightPage>
      }
    />
  );
}

async function choicesFor(id: string) {
  const actor = await staffActor();
  if (!idParams.safeParse({ id }).success) notFound();
  try {
    return await correctionChoices(actor, id);
  } catch (error) {
    if (error instanceof AppError && error.code === "not-found") notFound();
    throw error;
  }
}
