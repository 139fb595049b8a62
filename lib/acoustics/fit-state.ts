import { HIGHEST_PARTIAL } from "./checks-of-input";
import { residualAt, type Sheet } from "./fit-core";
import { assumedSigma, typicalB } from "./fit-prior";
import { type SelectionInput, select } from "./fit-selection";
import { equalTemperedHz, nearestKey, STANDARD_PITCH_HZ } from "./keys";
import type { FitInput, Reading } from "./types";

export const DEFAULT_MAX_PARTIAL = 16;

/** A sheet laid out for the fit. */
export type FitState = SelectionInput & {
  midi: number;
  frequencies: number[];
  /** Why a reading never took part, by its index. */
  setAside: Map<number, "dropped-by-hand" | "beyond-range" | "duplicate">;
  sigmaGiven: boolean;
};

function frequencyOf({ partial, hz, cents }: Reading, { midi, referenceHz }: FitInput): number {
  if (hz !== undefined) return hz;
  return partial * equalTemperedHz(midi ?? 0, referenceHz) * 2 ** ((cents ?? 0) / 1200);
}

/** The key nearest to the median of f_n/n: stands in when the note is not said. */
function guessKey(readings: readonly Reading[], frequencies: number[], referenceHz?: number): number {
  const quotients = readings
    .map(({ partial }, index) => (frequencies[index] ?? 0) / partial)
    .sort((left, right) => left - right);
  const key = nearestKey(quotients[(quotients.length - 1) >> 1] ?? STANDARD_PITCH_HZ, referenceHz);
  return Math.min(Math.max(key, 0), 127);
}

/** Lay out a checked sheet: cents and weights per reading, and which readings take part. */
export function prepare(input: FitInput): FitState {
  const frequencies = input.readings.map((reading) => frequencyOf(reading, input));
  const midi = input.midi ?? guessKey(input.readings, frequencies, input.referenceHz);
  const { readings, maxPartial = DEFAULT_MAX_PARTIAL } = input;
  const count = readings.length;
  const sheet: Sheet = {
    count,
    squares: new Float64Array(count),
    cents: new Float64Array(count),
    weights: new Float64Array(count),
  };
  const state: FitState = {
    sheet,
    assumed: new Uint8Array(count),
    open: new Uint8Array(count),
    kept: new Uint8Array(count),
    typicalB: typicalB(midi),
    midi,
    frequencies,
    setAside: new Map(),
    sigmaGiven: true,
  };
  const usual = assumedSigma(midi);
  readings.forEach(({ partial, sigmaCents }, i) => {
    const sigma = sigmaCents ?? usual;
    sheet.squares[i] = partial * partial;
    sheet.cents[i] = 1200 * Math.log2((frequencies[i] ?? 0) / partial);
    sheet.weights[i] = 1 / (sigma * sigma);
    if (sigmaCents === undefined) {
      state.assumed[i] = 1;
      state.sigmaGiven = false;
    }
    if (input.dropped?.includes(partial)) {
      state.setAside.set(i, "dropped-by-hand");
      return;
    }
    state.open[i] = 1;
    if (input.kept?.includes(partial)) state.kept[i] = 1;
  });
  keepToRange(readings, state, maxPartial);
  setDuplicatesAside(readings, state);
  return state;
}

function keepToRange(readings: readonly Reading[], state: FitState, maxPartial: number): void {
  if (!readings.some(({ partial }) => partial > maxPartial)) return;
  if (distinctPartials(readings, state, maxPartial) < 3) return;
  readings.forEach(({ partial }, i) => {
    if (partial <= maxPartial || state.open[i] !== 1 || state.kept[i] === 1) return;
    state.open[i] = 0;
    state.setAside.set(i, "beyond-range");
  });
}

/**
 * Of several readings of one partial only the one nearest to the curve of the others takes part, also when a person keeps
 * that partial: every fit then rests on different partials.
 */
function setDuplicatesAside(readings: readonly Reading[], state: FitState): void {
  if (distinctPartials(readings, state) === takingPart(state)) return;
  const groups = new Map<number, number[]>();
  readings.forEach(({ partial }, i) => {
    if (state.open[i] !== 1) return;
    const group = groups.get(partial);
    if (group) group.push(i);
    else groups.set(partial, [i]);
  });
  const repeated = [...groups.values()].filter((group) => group.length > 1);
  for (const i of repeated.flat()) state.open[i] = 0;
  const curve = distinctPartials(readings, state) < 2 ? null : select(state).solution;
  for (const group of repeated) {
    const distance = (i: number) => (curve ? Math.abs(residualAt(state.sheet, i, curve)) : 0);
    const best = group.reduce((nearest, i) => (distance(i) < distance(nearest) ? i : nearest));
    for (const i of group) {
      if (i === best) state.open[i] = 1;
      else state.setAside.set(i, "duplicate");
    }
  }
}

/** How many different partials, up to `maxPartial`, take part. */
export function distinctPartials(
  readings: readonly Reading[],
  { open }: FitState,
  maxPartial: number = HIGHEST_PARTIAL,
): number {
  const seen = new Uint8Array(HIGHEST_PARTIAL + 1);
  let distinct = 0;
  for (let i = 0; i < readings.length; i += 1) {
    const partial = readings[i]?.partial ?? 0;
    if (open[i] !== 1 || partial > maxPartial || seen[partial] === 1) continue;
    seen[partial] = 1;
    distinct += 1;
  }
  return distinct;
}

/** How many readings take part. */
export function takingPart({ open }: FitState): number {
  let total = 0;
  for (let i = 0; i < open.length; i += 1) total += open[i] ?? 0;
  return total;
}
