import { checkMidi } from "./checks-of-input";
import { type Difference, fitDifference, type Move } from "./compare-difference";
import type { NotComparable, NoteReadings, VisitReadings } from "./compare-types";
import { fit } from "./fit";
import { centsBetween, equalTemperedHz } from "./keys";
import { mean } from "./mean";
import { AcousticsError, type FitInput, type FitResult } from "./types";

const LEAST_MATCHED = 3;
/** Mistakes that tell nothing about the string; a partial merely off the curve is off it on both visits. */
const MISTAKES = new Set(["wrong-partial-number", "neighbouring-note", "duplicate", "dropped-by-hand"]);

export type FittedNote = { note: NoteReadings; fitted: FitResult; frequencies: Map<number, number> };

/** Fit every note of a visit, by key. */
export function fitVisit(visit: VisitReadings, path: string): Map<number, FittedNote> {
  if (visit.notes.length === 0) {
    throw new AcousticsError("no-notes", "This visit has no notes.", `${path}.notes`);
  }
  const fitted = new Map<number, FittedNote>();
  visit.notes.forEach((note, index) => {
    const notePath = `${path}.notes[${index}]`;
    checkMidi(note.midi, `${notePath}.midi`);
    if (fitted.has(note.midi)) {
      throw new AcousticsError("duplicate-note", "This note is given twice.", `${notePath}.midi`);
    }
    const { midi, readings, kept, dropped } = note;
    const { referenceHz } = visit;
    const result = fitAt({ midi, readings, kept, dropped, referenceHz }, notePath);
    fitted.set(midi, { note, fitted: result, frequencies: believable(note, result, referenceHz) });
  });
  return fitted;
}

function fitAt(input: FitInput, path: string): FitResult {
  try {
    return fit(input);
  } catch (error) {
    if (!(error instanceof AcousticsError)) throw error;
    throw new AcousticsError(error.code, error.message, error.path ? `${path}.${error.path}` : path);
  }
}

/** Frequency per partial, without plain mistakes; of a partial read twice, the reading nearer to the curve. */
function believable(note: NoteReadings, result: FitResult, referenceHz?: number): Map<number, number> {
  const mistaken = new Set(
    result.rejected
      .filter(({ reason }) => MISTAKES.has(reason))
      .map(({ partial, residualCents }) => `${partial}/${residualCents}`),
  );
  const distances = new Map<number, number>();
  const frequencies = new Map<number, number>();
  note.readings.forEach(({ partial, hz, cents }, i) => {
    const residual = result.residuals[i]?.cents ?? 0;
    if (mistaken.size > 0 && mistaken.has(`${partial}/${residual}`)) return;
    if (Math.abs(residual) >= (distances.get(partial) ?? Number.POSITIVE_INFINITY)) return;
    distances.set(partial, Math.abs(residual));
    frequencies.set(
      partial,
      hz ?? partial * equalTemperedHz(note.midi, referenceHz) * 2 ** ((cents ?? 0) / 1200),
    );
  });
  return frequencies;
}

export type Matched = {
  midi: number;
  reason: NotComparable | null;
  difference: Difference | null;
  partials: number[];
  pitchCents: number | null;
};

/** Set the partials of one note on two visits against each other. */
export function matchNote(midi: number, before?: FittedNote, after?: FittedNote): Matched {
  const none = { midi, difference: null, partials: [], pitchCents: null };
  if (!before) return { ...none, reason: "not-read-before" };
  if (!after) return { ...none, reason: "not-read-after" };
  const { string: stringBefore } = before.note;
  const { string: stringAfter } = after.note;
  if (stringBefore !== undefined && stringAfter !== undefined && stringBefore !== stringAfter) {
    return { ...none, reason: "different-string" };
  }
  const moves = movesOf(before, after);
  const partials = moves.map(({ partial }) => partial);
  const pitchCents = moves.length === 0 ? null : mean(moves.map(({ cents }) => cents));
  if (moves.length < LEAST_MATCHED)
    return { ...none, reason: "too-few-matched-partials", partials, pitchCents };
  const { b: bBefore } = before.fitted;
  const { b: bAfter } = after.fitted;
  if (bBefore === null || bAfter === null || bBefore <= 0 || bAfter <= 0) {
    return { ...none, reason: "b-not-positive", partials, pitchCents };
  }
  const difference = fitDifference(moves, Math.sqrt(bBefore * bAfter));
  return {
    midi,
    reason: null,
    difference,
    partials: difference.partials,
    pitchCents: difference.f1Cents,
  };
}

function movesOf(before: FittedNote, after: FittedNote): Move[] {
  const sigmas = (note: NoteReadings) =>
    new Map(note.readings.map((each) => [each.partial, each.sigmaCents]));
  const sigmaBefore = sigmas(before.note);
  const sigmaAfter = sigmas(after.note);
  const moves = [...before.frequencies].flatMap(([partial, hz]) => {
    const now = after.frequencies.get(partial);
    if (now === undefined) return [];
    const first = sigmaBefore.get(partial);
    const second = sigmaAfter.get(partial);
    const weight = first === undefined || second === undefined ? null : 1 / (first * first + second * second);
    return [{ partial, cents: centsBetween(hz, now), weight }];
  });
  const weighted = moves.every(({ weight }) => weight !== null);
  return moves.map(({ partial, cents, weight }) => ({
    partial,
    cents,
    weight: weighted ? (weight ?? 1) : 1,
  }));
}
