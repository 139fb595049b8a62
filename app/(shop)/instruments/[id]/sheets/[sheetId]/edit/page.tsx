import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { EditSheetForm } from "@/components/readings/edit-sheet-form";
import { WorkHead } from "@/components/shell/spread";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { findVisitsOf } from "@/lib/instruments/history/service";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";
import { getSheet } from "@/lib/readings/service";
import { sheetName } from "@/lib/readings/stage-words";
import { shopClock } from "@/lib/shop-clock/service";
import { instrumentOf } from "../../../instrument-of";
import { changeSheetAction } from "../../actions";
import { sheetJobs } from "../../sheet-jobs";

export const metadata: Metadata = { title: "Circumstances of a sheet" };

type Props = PageProps<"/instruments/[id]/sheets/[sheetId]/edit">;

export default async function EditSheetPage({ params }: Props) {
  const actor = await staffActor();
  const { id, sheetId } = await params;
  const instrument = await instrumentOf(id);
  const sheet = await orNotFound(sheetId, (known) => getSheet(actor, known));
  if (sheet.instrumentId !== instrument.id) notFound();
  const [clock, visits] = await Promise.all([shopClock(actor), findVisitsOf(actor, instrument.id)]);
  const head = (
    <WorkHead
      title="Circumstances"
      summary={`Reading sheet, ${sheetName(sheet, clock.locale, clock.timeZone)}.`}
    />
  );
  if (!sheet.canChange) {
    return (
      <>
        {head}
        <EmptyState
          title="You can read this sheet, not change it"
          action={<LinkButton href={`/instruments/${id}/sheets/${sheetId}`}>See the sheet</LinkButton>}
        />
      </>
    );
  }
  const { notes: _, canChange: __, ...row } = sheet;
  return (
    <>
      {head}
      <EditSheetForm
        sheet={row}
        timeZone={clock.timeZone}
        jobs={sheetJobs(visits, clock.locale, sheet.jobId)}
        action={changeSheetAction}
      />
    </>
  );
}
