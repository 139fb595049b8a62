import type { BandStep } from "@/components/charts/band-progress";
import { adviceFrom, keyboard } from "@/lib/acoustics";
import type { Observation, Style, Temperament } from "@/lib/acoustics/types";
import { type KeyRange, keyboardInput, observationsOf } from "@/lib/readings/rules";
import type { NoteRecord } from "@/lib/readings/schema";

export type BandContext = {
  range: KeyRange;
  style: Style;
  temperament: Temperament;
  referenceHz: number;
};

/** What one more note is worth: the plan's mean half-width before and after it. */
export type NextNote = { midi: number; predictedB: number; fromCents: number; toCents: number };

/** Relative σ of B that a note to come is taken to bring: common practice, no source. */
const COMING_SIGMA = 0.02;

/** Observations in the order in which their keys were first read; ids sort by the time they were made. */
export function observationsInOrder(notes: readonly NoteRecord[]): Observation[] {
  const first = new Map<number, string>();
  for (const { midi, id } of [...notes].sort((one, other) => (one.id < other.id ? -1 : 1))) {
    if (!first.has(midi)) first.set(midi, id);
  }
  const rank = [...first.keys()];
  return observationsOf(notes).sort((one, other) => rank.indexOf(one.midi) - rank.indexOf(other.midi));
}

function adviceOn(observations: readonly Observation[], { range, ...options }: BandContext) {
  const inOrder = [...observations].sort((one, other) => one.midi - other.midi);
  const curve = keyboard(keyboardInput(inOrder, range));
  return { curve, advice: adviceFrom(curve, options) };
}

export function bandAfter(observations: readonly Observation[], context: BandContext): BandStep {
  return {
    notes: observations.length,
    meanBandCents: adviceOn(observations, context).advice.meanBandCents,
  };
}

/** The best next note, and the observations as they would be with it where it is predicted. */
export function nextNote(
  observations: readonly Observation[],
  context: BandContext,
): { next: NextNote; observations: Observation[] } | null {
  const { curve, advice } = adviceOn(observations, context);
  const best = advice.next[0];
  const key = best && curve.keys.find(({ midi }) => midi === best.midi);
  if (!best || !key) return null;
  return {
    next: {
      midi: best.midi,
      predictedB: key.b,
      fromCents: advice.meanBandCents,
      toCents: best.meanBandCents,
    },
    observations: [...observations, { midi: best.midi, b: key.b, bSigma: COMING_SIGMA * key.b }],
  };
}

/** Another note is worth its time when it narrows the mean band by so much, cents. */
export const WORTHWHILE_CENTS = 0.2;

export function enoughWords(chain: readonly NextNote[], enough: boolean): string {
  if (enough) return "Enough: the plan would hardly change with more notes.";
  const idle = chain.findIndex(({ fromCents, toCents }) => fromCents - toCents < WORTHWHILE_CENTS);
  if (idle === 0) return "The next note would gain less than 0.2 cents.";
  if (idle === 1) return "Enough after one more: the next would gain less than 0.2 cents.";
  const words = ["", "", "two", "three", "four", "five"];
  if (idle > 1) return `Enough after ${words[idle] ?? idle} more: the next would gain less than 0.2 cents.`;
  return `${chain.length > 0 ? `More than ${words[chain.length] ?? chain.length} notes` : "More notes"} are still worth reading.`;
}
