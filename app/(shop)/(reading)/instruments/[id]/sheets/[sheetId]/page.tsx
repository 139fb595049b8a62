import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { cache } from "react";
import { InstrumentTabs } from "@/components/instruments/instrument-tabs";
import { ReadingSheet } from "@/components/readings/reading-sheet";
import { SheetActions } from "@/components/readings/sheet-actions";
import { may } from "@/lib/auth/access";
import { getInstrument } from "@/lib/instruments/service";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";
import { getSheet } from "@/lib/readings/service";
import { sheetName } from "@/lib/readings/stage-words";
import { shopClock } from "@/lib/shop-clock/service";
import { changeSheetAction } from "../../../../../instruments/[id]/sheets/actions";

type Props = PageProps<"/instruments/[id]/sheets/[sheetId]">;

const sheetOf = cache(async (instrumentId: string, sheetId: string) => {
  const actor = await staffActor();
  const sheet = await orNotFound(sheetId, (id) => getSheet(actor, id));
  // The address names both; a sheet of another instrument is not here.
  if (sheet.instrumentId !== instrumentId) notFound();
  return { sheet, instrument: await getInstrument(actor, instrumentId), clock: await shopClock(actor) };
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { id, sheetId } = await params;
  const { sheet, instrument, clock } = await sheetOf(id, sheetId);
  return { title: `${sheetName(sheet, clock.locale, clock.timeZone)} · ${instrument.name}` };
}

export default async function ReadingSheetPage({ params, searchParams }: Props) {
  const actor = await staffActor();
  const { id, sheetId } = await params;
  const { note } = await searchParams;
  const { sheet, instrument, clock } = await sheetOf(id, sheetId);
  const mayWrite = sheet.canChange && sheet.archivedAt === null;
  return (
    <ReadingSheet
      key={sheet.id}
      sheet={sheet}
      instrument={{
        id,
        name: instrument.name,
        firstMidi: instrument.firstMidi,
        lastMidi: instrument.lastMidi,
        breakMidi: instrument.breakMidi,
      }}
      clock={{ locale: clock.locale, timeZone: clock.timeZone, demo: clock.demo }}
      whyReadOnly={
        mayWrite ? null : whyReadOnly(sheet.canChange, may(actor.role, "sheets.change"), sheet.takenByName)
      }
      beginAt={typeof note === "string" && /^\d{1,3}$/.test(note) ? Number(note) : null}
      tabs={<InstrumentTabs id={id} name={instrument.name} />}
      sheetActions={
        sheet.canChange ? (
          <SheetActions
            sheet={{ id: sheet.id, version: sheet.version, archived: sheet.archivedAt !== null }}
            editHref={`/instruments/${id}/sheets/${sheet.id}/edit`}
            change={changeSheetAction}
          />
        ) : null
      }
    />
  );
}

function whyReadOnly(canChange: boolean, roleWrites: boolean, takenBy: string | null): string {
  if (canChange) return "This sheet is archived. Restore it to go on reading.";
  if (!roleWrites)
    return "Readings are written by the technicians of the visit and the owner; you can read them.";
  return `You are not on this sheet's visit, so you can read it, not change it.${takenBy ? ` ${takenBy} took it.` : ""}`;
}
