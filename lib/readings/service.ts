import "server-only";
import { type Tx, withShop } from "@/db/client";
import {
  deleteNote,
  insertNote,
  insertSheet,
  instrumentForReadings,
  jobIsOfInstrument,
  listSheets,
  type NotePlace,
  type NoteRow,
  type NoteValues,
  noteForUpdate,
  notesOfSheet,
  sheetById,
  technicianIsOn,
  updateNote,
  updateSheet,
} from "@/db/queries/readings";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import { fitNote, movedNote } from "./fit-note";
import { stringName, stringNumber } from "./rules";
import type {
  NewSheet,
  NoteInput,
  NoteQuery,
  NoteRecord,
  NotesInput,
  SheetChange,
  SheetListQuery,
  SheetRecord,
  SheetRow,
} from "./schema";

type StoredSheet = NonNullable<Awaited<ReturnType<typeof sheetById>>>;

function sheetRowOf(row: StoredSheet): SheetRow {
  return {
    ...row,
    takenAt: row.takenAt.toISOString(),
    archivedAt: row.archivedAt?.toISOString() ?? null,
  };
}

function noteRecordOf(row: NoteRow): NoteRecord {
  const { partials, hz, sigmaCents, string, fit, ...rest } = row;
  return {
    ...fit,
    ...rest,
    string: stringName(string),
    readings: partials.map((partial, index) => ({
      partial,
      hz: hz[index] ?? 0,
      sigmaCents: sigmaCents[index] ?? null,
    })),
  };
}

const day = 86_400_000;

/** When the notes were read. A clock may run ahead of ours; a year typed wrongly would head every list. */
function readingTime(text: string): Date {
  const at = new Date(text);
  if (at.getTime() > Date.now() + day) throw invalid({ takenAt: "This is in the future: check the date." });
  return at;
}

async function mayChange(tx: Tx, actor: Actor, sheet: { instrumentId: string; jobId: string | null }) {
  if (actor.role === "technician") return technicianIsOn(tx, actor.shopId, actor.memberId, sheet);
  return actor.role === "owner";
}

/** The sheet, checked to be one that this actor may change. */
async function sheetToChange(tx: Tx, actor: Actor, sheetId: string): Promise<StoredSheet> {
  const sheet = await sheetById(tx, actor.shopId, sheetId);
  if (!sheet) throw notFound("reading sheet");
  if (!(await mayChange(tx, actor, sheet))) {
    throw new AppError(
      "forbidden",
      "This sheet belongs to a visit you are not on. You can read it, not change it.",
    );
  }
  return sheet;
}

export async function findSheets(
  actor: Actor,
  instrumentId: string,
  query: SheetListQuery,
): Promise<ListPage<SheetRow>> {
  authorise(actor, "sheets.read");
  return withShop(actor, async (tx) => {
    if (!(await instrumentForReadings(tx, actor.shopId, instrumentId))) throw notFound("instrument");
    const page = await listSheets(tx, actor.shopId, instrumentId, query);
    return { items: page.items.map(sheetRowOf), next: page.next };
  });
}

async function readSheet(tx: Tx, actor: Actor, id: string): Promise<SheetRecord> {
  const sheet = await sheetById(tx, actor.shopId, id);
  if (!sheet) throw notFound("reading sheet");
  const notes = await notesOfSheet(tx, actor.shopId, id);
  return {
    ...sheetRowOf(sheet),
    notes: notes.map(noteRecordOf),
    canChange: await mayChange(tx, actor, sheet),
  };
}

export async function getSheet(actor: Actor, id: string): Promise<SheetRecord> {
  authorise(actor, "sheets.read");
  return withShop(actor, (tx) => readSheet(tx, actor, id));
}

/** A sheet is of one of the instrument's jobs or of none, and the actor may write it there. */
async function checkJob(tx: Tx, actor: Actor, instrumentId: string, jobId: string | null): Promise<void> {
  if (jobId && !(await jobIsOfInstrument(tx, actor.shopId, jobId, instrumentId))) {
    throw invalid({ jobId: "This job is not one of this instrument's." });
  }
  if (!(await mayChange(tx, actor, { instrumentId, jobId }))) {
    throw new AppError(
      "forbidden",
      "You are not on a visit to this instrument. Plan one, or ask the office.",
    );
  }
}

export async function createSheet(actor: Actor, instrumentId: string, input: NewSheet): Promise<SheetRecord> {
  authorise(actor, "sheets.change");
  const id = input.id ?? newId();
  return withShop(actor, async (tx) => {
    if (!(await instrumentForReadings(tx, actor.shopId, instrumentId))) throw notFound("instrument");
    const jobId = input.jobId ?? null;
    await checkJob(tx, actor, instrumentId, jobId);
    const made = await insertSheet(tx, actor.shopId, {
      id,
      instrumentId,
      jobId,
      stage: input.stage,
      takenAt: readingTime(input.takenAt),
      takenBy: actor.memberId,
      referenceHz: input.referenceHz,
      humidityPercent: input.humidityPercent ?? null,
      temperatureC: input.temperatureC ?? null,
      remarks: input.remarks?.trim() || null,
    });
    const sheet = await sheetById(tx, actor.shopId, id);
    if (!made && sheet?.instrumentId !== instrumentId) {
      throw new AppError("id-in-use", "This id is taken. Send the sheet with another one.");
    }
    return readSheet(tx, actor, id);
  });
}

export async function changeSheet(actor: Actor, id: string, change: SheetChange): Promise<SheetRecord> {
  authorise(actor, "sheets.change");
  const { version, archived, takenAt, readingsKeep, ...values } = change;
  return withShop(actor, async (tx) => {
    const before = await sheetToChange(tx, actor, id);
    if (values.jobId !== undefined && values.jobId !== before.jobId) {
      await checkJob(tx, actor, before.instrumentId, values.jobId);
    }
    const changed = await updateSheet(tx, actor.shopId, id, version, {
      ...values,
      ...(takenAt === undefined ? {} : { takenAt: readingTime(takenAt) }),
      ...(archived === undefined ? {} : { archivedAt: archived ? new Date() : null }),
    });
    if (!changed) throw stale("reading sheet", await readSheet(tx, actor, id));
    const { referenceHz } = values;
    if (readingsKeep === "cents" && referenceHz !== undefined && referenceHz !== before.referenceHz) {
      await moveNotes(tx, actor, id, before.referenceHz, referenceHz);
    }
    return readSheet(tx, actor, id);
  });
}

async function moveNotes(tx: Tx, actor: Actor, sheetId: string, fromHz: number, toHz: number): Promise<void> {
  for (const { midi, string, take } of await notesOfSheet(tx, actor.shopId, sheetId)) {
    const place: NotePlace = { sheetId, midi, string, take };
    const note = await noteForUpdate(tx, actor.shopId, place);
    if (note) await updateNote(tx, actor.shopId, place, note.version, movedNote(note, fromHz, toHz));
  }
}

export async function getNotes(
  actor: Actor,
  sheetId: string,
  midi: number,
): Promise<{ items: NoteRecord[] }> {
  authorise(actor, "sheets.read");
  return withShop(actor, async (tx) => {
    if (!(await sheetById(tx, actor.shopId, sheetId))) throw notFound("reading sheet");
    const notes = await notesOfSheet(tx, actor.shopId, sheetId);
    return { items: notes.filter((note) => note.midi === midi).map(noteRecordOf) };
  });
}

/** Saves one string's readings whole and answers with the authoritative fit. */
export async function saveNote(
  actor: Actor,
  sheetId: string,
  midi: number,
  input: NoteInput,
): Promise<NoteRecord> {
  authorise(actor, "sheets.change");
  return withShop(actor, async (tx) => {
    const context = await contextOf(tx, actor, sheetId);
    return storeNote(tx, actor, context, midi, input, "readings");
  });
}

/** Saves whole rows, as pasted: all or none, each fault named at its row. */
export async function saveNotes(
  actor: Actor,
  sheetId: string,
  input: NotesInput,
): Promise<{ items: NoteRecord[] }> {
  authorise(actor, "sheets.change");
  return withShop(actor, async (tx) => {
    const context = await contextOf(tx, actor, sheetId);
    const places = new Set(input.notes.map((note) => `${note.midi}/${note.string}/${note.take}`));
    if (places.size < input.notes.length) throw invalid({ notes: "The same note and string stands twice." });
    const faults: Record<string, string> = {};
    const items: NoteRecord[] = [];
    for (const [index, note] of input.notes.entries()) {
      try {
        items.push(await storeNote(tx, actor, context, note.midi, note, `notes.${index}.readings`));
      } catch (error) {
        if (!(error instanceof AppError) || error.code !== "invalid") throw error;
        Object.assign(faults, error.more.fields);
      }
    }
    if (Object.keys(faults).length > 0)
      throw invalid(faults, "Some rows need another look; nothing was saved yet.");
    return { items };
  });
}

export async function removeNote(
  actor: Actor,
  sheetId: string,
  midi: number,
  query: NoteQuery,
): Promise<void> {
  authorise(actor, "sheets.change");
  await withShop(actor, async (tx) => {
    await sheetToChange(tx, actor, sheetId);
    const place = { sheetId, midi, string: stringNumber(query.string), take: query.take };
    const stored = await noteForUpdate(tx, actor.shopId, place);
    if (!stored) throw notFound("note");
    if (query.version !== undefined && query.version !== stored.version) {
      throw stale("note", noteRecordOf(stored));
    }
    await deleteNote(tx, actor.shopId, place, stored.version);
  });
}

type Context = {
  sheet: StoredSheet;
  instrument: NonNullable<Awaited<ReturnType<typeof instrumentForReadings>>>;
  others: NoteRow[];
};

async function contextOf(tx: Tx, actor: Actor, sheetId: string): Promise<Context> {
  const sheet = await sheetToChange(tx, actor, sheetId);
  const instrument = await instrumentForReadings(tx, actor.shopId, sheet.instrumentId);
  if (!instrument) throw notFound("instrument");
  return { sheet, instrument, others: await notesOfSheet(tx, actor.shopId, sheetId) };
}

async function storeNote(
  tx: Tx,
  actor: Actor,
  { sheet, instrument, others }: Context,
  midi: number,
  input: NoteInput,
  path: string,
): Promise<NoteRecord> {
  const values = fitNote({ midi, input, sheet, instrument, others, path });
  const place: NotePlace = { sheetId: sheet.id, midi, string: stringNumber(input.string), take: input.take };
  const stored = await noteForUpdate(tx, actor.shopId, place);
  if (input.version !== undefined && input.version !== (stored?.version ?? 0)) {
    // The answer to the first sending may have been lost on the way; the same readings again are no change.
    if (stored && sameReadings(stored, values)) return noteRecordOf(stored);
    throw stale("note", stored ? noteRecordOf(stored) : null);
  }
  const saved = stored
    ? await updateNote(tx, actor.shopId, place, stored.version, values)
    : await insertNote(tx, actor.shopId, newId(), place, values, actor.memberId);
  if (saved) return noteRecordOf(saved);
  // Somebody else put this note here between our look and our write.
  const current = await noteForUpdate(tx, actor.shopId, place);
  if (current && sameReadings(current, values)) return noteRecordOf(current);
  throw current ? stale("note", noteRecordOf(current)) : notFound("note");
}

function sameReadings(stored: NoteRow, values: NoteValues): boolean {
  return (["partials", "hz", "sigmaCents", "kept", "dropped"] as const).every(
    (column) =>
      stored[column].length === values[column].length &&
      stored[column].every((value, index) => value === values[column][index]),
  );
}
