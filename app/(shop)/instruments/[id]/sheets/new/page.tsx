import type { Metadata } from "next";
import { NewSheetForm } from "@/components/readings/new-sheet-form";
import { WorkHead } from "@/components/shell/spread";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { may } from "@/lib/auth/access";
import { findVisitsOf } from "@/lib/instruments/history/service";
import { staffActor } from "@/lib/pages/page-actor";
import { stages } from "@/lib/readings/schema";
import { shopClock } from "@/lib/shop-clock/service";
import { wallTimeOf } from "@/lib/wall-time";
import { instrumentOf } from "../../instrument-of";
import { createSheetAction } from "../actions";
import { sheetJobs } from "../sheet-jobs";

export const metadata: Metadata = { title: "New reading sheet" };

type Props = PageProps<"/instruments/[id]/sheets/new">;

export default async function NewSheetPage({ params, searchParams }: Props) {
  const actor = await staffActor();
  const instrument = await instrumentOf((await params).id);
  const { job, stage } = await searchParams;
  if (!may(actor.role, "sheets.change")) {
    return (
      <>
        <WorkHead title="New reading sheet" />
        <EmptyState
          title="Readings are written by technicians and the owner"
          action={<LinkButton href={`/instruments/${instrument.id}/sheets`}>See the sheets</LinkButton>}
        />
      </>
    );
  }
  const [clock, visits] = await Promise.all([shopClock(actor), findVisitsOf(actor, instrument.id)]);
  const chosen =
    visits.find(({ jobId }) => jobId === job) ??
    visits.find(({ startsLocal }) => startsLocal.startsWith(clock.today));
  return (
    <>
      <WorkHead
        title="New reading sheet"
        summary="What the room was like counts: pitch follows humidity. Everything can be left as it stands."
      />
      <NewSheetForm
        instrumentId={instrument.id}
        referenceHz={instrument.referenceHz}
        timeZone={clock.timeZone}
        now={wallTimeOf(new Date(), clock.timeZone)}
        jobs={sheetJobs(visits, clock.locale, chosen?.jobId ?? null)}
        jobId={chosen?.jobId ?? null}
        stage={stages.find((one) => one === stage) ?? "as-found"}
        action={createSheetAction}
      />
    </>
  );
}
