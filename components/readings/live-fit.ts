import { AcousticsError, fit } from "@/lib/acoustics";
import type { FitResult } from "@/lib/acoustics/types";
import {
  type AskAbout,
  type FittedNote,
  fitInputOf,
  type KeyRange,
  keyModel,
  pitchOf,
  pitchOffset,
  readingsToAskAbout,
} from "@/lib/readings/rules";
import type { NoteRecord } from "@/lib/readings/schema";
import { confirmedOf, heldReadings, isChanged, type Row } from "./sheet-row";

/**
 * The fit of a row as it is typed, by the same code as the server's, whose answer takes its place when it comes;
 * and the readings to ask about before they are sent.
 */
export type Live = {
  fit: FitResult | null;
  questions: readonly AskAbout[];
  /** True when the fit is the server's own. */
  authoritative: boolean;
};

/** The sheet around the row: the saved notes tell what to expect of the others. */
export type Around = { referenceHz: number; range: KeyRange; notes: readonly NoteRecord[] };

const nothing: Live = { fit: null, questions: [], authoritative: false };

/** A row and its surroundings do not change, they are replaced; so an answer once found holds. */
const found = new WeakMap<Row, { around: Around; live: Live }>();
const models = new WeakMap<Around, Map<number, ReturnType<typeof keyModel>>>();

export function liveOf(row: Row, around: Around): Live {
  if (row.saved && !isChanged(row, around.referenceHz)) {
    return { fit: row.saved, questions: [], authoritative: true };
  }
  const before = found.get(row);
  if (before?.around === around) return before.live;
  const live = compute(row, around);
  found.set(row, { around, live });
  return live;
}

function compute(row: Row, around: Around): Live {
  const { referenceHz } = around;
  const readings = heldReadings(row, referenceHz);
  if (row.removed || readings.length === 0) return nothing;
  const { midi } = row.place;
  const note = {
    midi,
    referenceHz,
    partials: readings.map(({ partial }) => partial),
    hz: readings.map(({ hz }) => hz),
    sigmaCents: readings.map(({ sigmaCents }) => sigmaCents),
    kept: row.kept,
    dropped: row.dropped,
  };
  try {
    const others = othersOf(midi, around);
    const questions = readingsToAskAbout({
      fitInput: fitInputOf(note),
      midi,
      referenceHz,
      pitchOffsetCents: pitchOffset(pitchOf(others, referenceHz)),
      model: modelOf(midi, others, around),
      confirmed: confirmedOf(row, referenceHz),
    });
    const asked = new Set(questions.map(({ partial }) => partial));
    const input = fitInputOf(note);
    const sure = input.readings.filter(({ partial }) => !asked.has(partial));
    return {
      fit: sure.length > 0 ? fit({ ...input, readings: sure }) : null,
      questions,
      authoritative: false,
    };
  } catch (error) {
    if (error instanceof AcousticsError) return nothing;
    throw error;
  }
}

function othersOf(midi: number, { notes }: Around): FittedNote[] {
  return notes.filter((note) => note.midi !== midi);
}

function modelOf(midi: number, others: readonly FittedNote[], around: Around) {
  const known = models.get(around) ?? new Map<number, ReturnType<typeof keyModel>>();
  models.set(around, known);
  if (!known.has(midi)) known.set(midi, keyModel(others, midi, around.range));
  return known.get(midi);
}
