import "server-only";
import { type Tx, withShop } from "@/db/client";
import { type NoteRow, notesOfSheet, sheetById } from "@/db/queries/readings";
import { AcousticsError, compare } from "@/lib/acoustics";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { invalid, notFound } from "@/lib/errors";
import { fitInputOf, pitchOf } from "@/lib/readings/rules";
import type { ComparisonRecord } from "./schema";

/** Two sheets of one instrument, the earlier against the later. */
export async function compareSheets(
  actor: Actor,
  instrumentId: string,
  [one, other]: readonly [string, string],
): Promise<ComparisonRecord> {
  authorise(actor, "sheets.read");
  if (one === other) throw invalid({ sheets: "Choose two different sheets." });
  return withShop(actor, async (tx) => {
    const both = [await sideOf(tx, actor, instrumentId, one), await sideOf(tx, actor, instrumentId, other)];
    const [before, after] = both.sort((left, right) => left.takenAt.getTime() - right.takenAt.getTime());
    if (!before || !after) throw notFound("reading sheet");
    const shared = sharedTakes(before.notes, after.notes);
    try {
      const result = compare({
        before: { referenceHz: before.referenceHz, notes: shared.before, ...humidityOf(before) },
        after: { referenceHz: after.referenceHz, notes: shared.after, ...humidityOf(after) },
      });
      return {
        ...result,
        before: summaryOf(before, after.referenceHz),
        after: summaryOf(after, after.referenceHz),
      };
    } catch (error) {
      if (error instanceof AcousticsError && error.code === "no-notes") {
        throw invalid({ sheets: "One of the sheets has no readings yet." });
      }
      throw error;
    }
  });
}

type Side = Awaited<ReturnType<typeof sideOf>>;

async function sideOf(tx: Tx, actor: Actor, instrumentId: string, sheetId: string) {
  const sheet = await sheetById(tx, actor.shopId, sheetId);
  if (!sheet || sheet.instrumentId !== instrumentId) throw notFound("reading sheet");
  return { ...sheet, notes: await notesOfSheet(tx, actor.shopId, sheetId) };
}

function humidityOf(side: Side) {
  return side.humidityPercent === null ? {} : { humidityPercent: side.humidityPercent };
}

function summaryOf(side: Side, referenceHz: number): ComparisonRecord["before"] {
  const fitted = side.notes.map(({ midi, fit }) => ({ ...fit, midi }));
  return {
    sheetId: side.id,
    stage: side.stage,
    takenAt: side.takenAt.toISOString(),
    humidityPercent: side.humidityPercent,
    notes: fitted.map(({ midi, b, bSigma }) => ({ midi, b, bSigma })),
    pitch: pitchOf(fitted, referenceHz),
  };
}

/** One string a key: the one read on both visits where there is such, else each visit's first; its last take. */
function sharedTakes(before: readonly NoteRow[], after: readonly NoteRow[]) {
  const chosenOf = (notes: readonly NoteRow[], others: readonly NoteRow[]) => {
    const byKey = new Map<number, NoteRow>();
    for (const note of notes) {
      const isShared = (row: NoteRow) =>
        others.some((other) => other.midi === row.midi && other.string === row.string);
      const best = byKey.get(note.midi);
      const better = !best || (isShared(note) && !isShared(best)) || note.string === best.string;
      if (better) byKey.set(note.midi, note);
    }
    return [...byKey.values()].map((note) => ({
      midi: note.midi,
      readings: fitInputOf({ ...note, referenceHz: 440 }).readings,
      kept: note.kept,
      dropped: note.dropped,
      ...(note.string === 0 ? {} : { string: note.string }),
    }));
  };
  return { before: chosenOf(before, after), after: chosenOf(after, before) };
}
