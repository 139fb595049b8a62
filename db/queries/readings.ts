import { and, desc, eq, isNotNull, isNull, type SQL, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { instrument, job, member, noteReading, readingSheet, visitTechnician } from "@/db/schema";
import type { FitResult } from "@/lib/acoustics/types";
import type { SheetListQuery, Stage } from "@/lib/readings/schema";
import { type Order, orderBy, paged, pageStart } from "./keyset";

const sheetColumns = {
  id: readingSheet.id,
  instrumentId: readingSheet.instrumentId,
  jobId: readingSheet.jobId,
  visitId: job.visitId,
  stage: readingSheet.stage,
  takenAt: readingSheet.takenAt,
  takenByName: member.name,
  referenceHz: readingSheet.referenceHz,
  humidityPercent: readingSheet.humidityPercent,
  temperatureC: readingSheet.temperatureC,
  remarks: readingSheet.remarks,
  archivedAt: readingSheet.archivedAt,
  version: readingSheet.version,
  notesRead: sql<number>`(select count(distinct n.midi)::int from note_reading n
    where n.shop_id = reading_sheet.shop_id and n.sheet_id = reading_sheet.id)`,
};

const itsJob = and(eq(job.shopId, readingSheet.shopId), eq(job.id, readingSheet.jobId));
const itsReader = and(eq(member.shopId, readingSheet.shopId), eq(member.id, readingSheet.takenBy));

export async function sheetById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select(sheetColumns)
    .from(readingSheet)
    .leftJoin(job, itsJob)
    .leftJoin(member, itsReader)
    .where(and(eq(readingSheet.shopId, shopId), eq(readingSheet.id, id)));
  return row;
}

/** Newest first. */
export async function listSheets(db: Handle, shopId: string, instrumentId: string, query: SheetListQuery) {
  const order: Order = {
    by: sql`${readingSheet.takenAt}`,
    direction: "desc",
    id: sql`${readingSheet.id}`,
  };
  const rows = await db
    .select({ ...sheetColumns, orderKey: sql<string>`(${readingSheet.takenAt})::text` })
    .from(readingSheet)
    .leftJoin(job, itsJob)
    .leftJoin(member, itsReader)
    .where(
      and(
        eq(readingSheet.shopId, shopId),
        eq(readingSheet.instrumentId, instrumentId),
        query.archived === "only" ? isNotNull(readingSheet.archivedAt) : isNull(readingSheet.archivedAt),
        pageStart(order, query, "timestamptz"),
      ),
    )
    .orderBy(orderBy(order))
    .limit(query.most + 1);
  return paged(rows, query);
}

export async function insertSheet(
  db: Handle,
  shopId: string,
  values: {
    id: string;
    instrumentId: string;
    jobId: string | null;
    stage: Stage;
    takenAt: Date;
    takenBy: string;
    referenceHz: number;
    humidityPercent: number | null;
    temperatureC: number | null;
    remarks: string | null;
  },
): Promise<boolean> {
  const rows = await db
    .insert(readingSheet)
    .values({ ...values, shopId })
    .onConflictDoNothing()
    .returning({ id: readingSheet.id });
  return rows.length === 1;
}

export async function updateSheet(
  db: Handle,
  shopId: string,
  id: string,
  version: number,
  values: Partial<{
    stage: Stage;
    takenAt: Date;
    referenceHz: number;
    jobId: string | null;
    humidityPercent: number | null;
    temperatureC: number | null;
    remarks: string | null;
    archivedAt: Date | null;
  }>,
): Promise<boolean> {
  const rows = await db
    .update(readingSheet)
    .set({ ...values, version: version + 1, updatedAt: sql`now()` })
    .where(and(eq(readingSheet.shopId, shopId), eq(readingSheet.id, id), eq(readingSheet.version, version)))
    .returning({ id: readingSheet.id });
  return rows.length === 1;
}

/** The sheets in use with the most notes read, over all the shop's instruments. */
export function fullestSheets(db: Handle, shopId: string, most: number) {
  const notesRead = sql<number>`count(distinct ${noteReading.midi})::int`;
  return db
    .select({
      sheetId: readingSheet.id,
      stage: readingSheet.stage,
      takenAt: readingSheet.takenAt,
      instrumentId: instrument.id,
      name: instrument.name,
      firstMidi: instrument.firstMidi,
      lastMidi: instrument.lastMidi,
      breakMidi: instrument.breakMidi,
      notesRead,
    })
    .from(noteReading)
    .innerJoin(
      readingSheet,
      and(eq(readingSheet.shopId, noteReading.shopId), eq(readingSheet.id, noteReading.sheetId)),
    )
    .innerJoin(
      instrument,
      and(eq(instrument.shopId, readingSheet.shopId), eq(instrument.id, readingSheet.instrumentId)),
    )
    .where(
      and(
        eq(noteReading.shopId, shopId),
        isNull(readingSheet.archivedAt),
        isNull(instrument.archivedAt),
        isNotNull(noteReading.b),
      ),
    )
    .groupBy(readingSheet.shopId, readingSheet.id, instrument.shopId, instrument.id)
    .orderBy(desc(notesRead), desc(readingSheet.takenAt), readingSheet.id)
    .limit(most);
}

const noteColumns = {
  id: noteReading.id,
  midi: noteReading.midi,
  string: noteReading.string,
  take: noteReading.take,
  partials: noteReading.partials,
  hz: noteReading.hz,
  sigmaCents: noteReading.sigmaCents,
  kept: noteReading.kept,
  dropped: noteReading.dropped,
  fit: noteReading.fit,
  fitVersion: noteReading.fitVersion,
  version: noteReading.version,
};

export type NoteRow = {
  id: string;
  midi: number;
  string: number;
  take: number;
  partials: number[];
  hz: number[];
  sigmaCents: (number | null)[];
  kept: number[];
  dropped: number[];
  fit: FitResult;
  fitVersion: number;
  version: number;
};

/** Nulls inside an array of numbers come back as not-a-number. */
function withNulls(row: NoteRow): NoteRow {
  return { ...row, sigmaCents: row.sigmaCents.map((sigma) => (Number.isNaN(sigma) ? null : sigma)) };
}

export async function notesOfSheet(db: Handle, shopId: string, sheetId: string): Promise<NoteRow[]> {
  const rows = await db
    .select(noteColumns)
    .from(noteReading)
    .where(and(eq(noteReading.shopId, shopId), eq(noteReading.sheetId, sheetId)))
    .orderBy(noteReading.midi, noteReading.string, noteReading.take);
  return rows.map(withNulls);
}

export type NotePlace = { sheetId: string; midi: number; string: number; take: number };

function atPlace(shopId: string, place: NotePlace): SQL | undefined {
  return and(
    eq(noteReading.shopId, shopId),
    eq(noteReading.sheetId, place.sheetId),
    eq(noteReading.midi, place.midi),
    eq(noteReading.string, place.string),
    eq(noteReading.take, place.take),
  );
}

/** Locked until the transaction ends, so that two savers of one note come one after the other. */
export async function noteForUpdate(
  db: Handle,
  shopId: string,
  place: NotePlace,
): Promise<NoteRow | undefined> {
  const [row] = await db.select(noteColumns).from(noteReading).where(atPlace(shopId, place)).for("update");
  return row && withNulls(row);
}

export type NoteValues = Omit<NoteRow, "id" | "version" | "midi" | "string" | "take">;

const fitColumns = (fit: FitResult) => ({ f1Hz: fit.f1Hz, b: fit.b, bSigma: fit.bSigma });

/** Nothing comes back when somebody else put a note at this place first. */
export async function insertNote(
  db: Handle,
  shopId: string,
  id: string,
  place: NotePlace,
  values: NoteValues,
  takenBy: string,
): Promise<NoteRow | undefined> {
  const [row] = await db
    .insert(noteReading)
    .values({ ...values, ...fitColumns(values.fit), ...place, shopId, id, takenBy })
    .onConflictDoNothing()
    .returning(noteColumns);
  return row && withNulls(row);
}

export async function updateNote(
  db: Handle,
  shopId: string,
  place: NotePlace,
  version: number,
  values: NoteValues,
): Promise<NoteRow | undefined> {
  const [row] = await db
    .update(noteReading)
    .set({ ...values, ...fitColumns(values.fit), version: version + 1, updatedAt: sql`now()` })
    .where(and(atPlace(shopId, place), eq(noteReading.version, version)))
    .returning(noteColumns);
  return row && withNulls(row);
}

export async function deleteNote(
  db: Handle,
  shopId: string,
  place: NotePlace,
  version: number,
): Promise<boolean> {
  const rows = await db
    .delete(noteReading)
    .where(and(atPlace(shopId, place), eq(noteReading.version, version)))
    .returning({ id: noteReading.id });
  return rows.length === 1;
}

/** The facts of an instrument that a computation needs. */
export async function instrumentForReadings(db: Handle, shopId: string, instrumentId: string) {
  const [row] = await db
    .select({
      id: instrument.id,
      maker: instrument.maker,
      model: instrument.model,
      firstMidi: instrument.firstMidi,
      lastMidi: instrument.lastMidi,
      breakMidi: instrument.breakMidi,
      referenceHz: instrument.referenceHz,
      temperament: instrument.temperament,
    })
    .from(instrument)
    .where(and(eq(instrument.shopId, shopId), eq(instrument.id, instrumentId)));
  return row;
}

/** Whether this technician is on a visit with this instrument, or on the visit of this very job. */
export async function technicianIsOn(
  db: Handle,
  shopId: string,
  memberId: string,
  what: { instrumentId: string; jobId: string | null },
): Promise<boolean> {
  const [row] = await db
    .select({ visitId: job.visitId })
    .from(job)
    .innerJoin(
      visitTechnician,
      and(
        eq(visitTechnician.shopId, job.shopId),
        eq(visitTechnician.visitId, job.visitId),
        eq(visitTechnician.memberId, memberId),
      ),
    )
    .where(
      and(
        eq(job.shopId, shopId),
        eq(job.instrumentId, what.instrumentId),
        what.jobId ? eq(job.id, what.jobId) : undefined,
      ),
    )
    .limit(1);
  return row !== undefined;
}

export async function jobIsOfInstrument(db: Handle, shopId: string, jobId: string, instrumentId: string) {
  const [row] = await db
    .select({ id: job.id })
    .from(job)
    .where(and(eq(job.shopId, shopId), eq(job.id, jobId), eq(job.instrumentId, instrumentId)));
  return row !== undefined;
}
