import { centsBetween, checkFrequency, equalTemperedHz, fit, keyboard, raiseByCents } from "@/lib/acoustics";
import type { FitInput, KeyboardInput, Observation } from "@/lib/acoustics/types";
import type { NoteInput } from "./schema";

/** How a unison's strings are numbered where a number is needed: 0 is the whole unison sounding together. */
export function stringNumber(string: NoteInput["string"]): number {
  return string === "all" ? 0 : string;
}

export function stringName(number: number): NoteInput["string"] {
  return number === 0 ? "all" : number;
}

/** Frequencies are what is stored; cents are only a way to type them. */
export function readingHz(
  reading: { partial: number; hz?: number | undefined; cents?: number | undefined },
  midi: number,
  referenceHz: number,
): number {
  if (reading.hz !== undefined) return reading.hz;
  return raiseByCents(reading.partial * equalTemperedHz(midi, referenceHz), reading.cents ?? 0);
}

export function readingCents(partial: number, hz: number, midi: number, referenceHz: number): number {
  return centsBetween(partial * equalTemperedHz(midi, referenceHz), hz);
}

/** What the fit takes, from what is stored or typed. */
export function fitInputOf(note: {
  midi: number;
  referenceHz: number;
  partials: readonly number[];
  hz: readonly number[];
  sigmaCents: readonly (number | null)[];
  kept: readonly number[];
  dropped: readonly number[];
}): FitInput {
  return {
    midi: note.midi,
    referenceHz: note.referenceHz,
    kept: note.kept,
    dropped: note.dropped,
    readings: note.partials.map((partial, index) => {
      const sigma = note.sigmaCents[index];
      return {
        partial,
        hz: note.hz[index] ?? Number.NaN,
        ...(sigma === null || sigma === undefined ? {} : { sigmaCents: sigma }),
      };
    }),
  };
}

export type FittedNote = {
  midi: number;
  f1Hz: number;
  b: number | null;
  bSigma: number | null;
  rmsCents: number;
};

/**
 * One observation of B a key, from all its strings and takes: the mean weighted by their errors, whose own
 * error is widened where they disagree by more than they should.
 */
export function observationsOf(notes: readonly FittedNote[]): Observation[] {
  const byKey = new Map<number, Take[]>();
  for (const { midi, b, bSigma, rmsCents } of notes) {
    if (b === null || bSigma === null || !(bSigma > 0)) continue;
    byKey.set(midi, [...(byKey.get(midi) ?? []), { b, bSigma, rmsCents }]);
  }
  return [...byKey]
    .sort(([one], [other]) => one - other)
    .map(([midi, takes]) => ({ midi, ...pooled(takes) }));
}

type Take = { b: number; bSigma: number; rmsCents: number };

function pooled(takes: readonly Take[]): { b: number; bSigma: number; residualCents: number } {
  const weight = takes.reduce((sum, take) => sum + take.bSigma ** -2, 0);
  const b = takes.reduce((sum, take) => sum + take.b * take.bSigma ** -2, 0) / weight;
  const chi2 = takes.reduce((sum, take) => sum + ((take.b - b) / take.bSigma) ** 2, 0);
  const widening = Math.max(1, Math.sqrt(chi2 / Math.max(1, takes.length - 1)));
  const residualCents = Math.sqrt(takes.reduce((sum, take) => sum + take.rmsCents ** 2, 0) / takes.length);
  return { b, bSigma: widening / Math.sqrt(weight), residualCents };
}

/** f1 of each key read, in cents from equal temperament at the sheet's reference; the mean of its takes. */
export function pitchOf(
  notes: readonly FittedNote[],
  referenceHz: number,
): { midi: number; cents: number }[] {
  const byKey = new Map<number, number[]>();
  for (const { midi, f1Hz } of notes) {
    const cents = centsBetween(equalTemperedHz(midi, referenceHz), f1Hz);
    byKey.set(midi, [...(byKey.get(midi) ?? []), cents]);
  }
  return [...byKey]
    .sort(([one], [other]) => one - other)
    .map(([midi, cents]) => ({ midi, cents: cents.reduce((sum, value) => sum + value, 0) / cents.length }));
}

/** How far the instrument as a whole stands from its reference, cents: the median over its middle keys, else over all. */
export function pitchOffset(pitch: readonly { midi: number; cents: number }[]): number | null {
  const middle = pitch.filter(({ midi }) => midi >= 45 && midi <= 81);
  const values = (middle.length > 0 ? middle : pitch)
    .map(({ cents }) => cents)
    .sort((one, other) => one - other);
  if (values.length === 0) return null;
  const half = Math.floor(values.length / 2);
  const upper = values[half] ?? 0;
  return values.length % 2 === 1 ? upper : ((values[half - 1] ?? upper) + upper) / 2;
}

export type KeyRange = { firstMidi: number; lastMidi: number; breakMidi: number | null };

/** An instrument's compass and what is known of it, as the keyboard's computation takes them. */
export function keyboardInput(
  observations: readonly Observation[],
  { firstMidi, lastMidi, breakMidi }: KeyRange,
): KeyboardInput {
  return { observations, firstMidi, lastMidi, ...(breakMidi === null ? {} : { breakMidi }) };
}

/** What the other keys' fits tell of B of this one. */
export function keyModel(
  others: readonly FittedNote[],
  midi: number,
  range: KeyRange,
): { b: number; lnBSigma: number } | undefined {
  const { keys } = keyboard(keyboardInput(observationsOf(others), range));
  const key = keys.find((estimate) => estimate.midi === midi);
  return key ? { b: key.b, lnBSigma: key.lnBSigma } : undefined;
}

export type AskAbout = { partial: number; expectedHz: number; awayCents: number; fitsPartial: number | null };

/**
 * Readings that lie so far from where their partial is expected that a person is asked before they are saved.
 * Each is held against the fit of the others on its row, where three others can carry one, else against the key
 * as the sheet's other notes predict it. Asked is not dropped: a confirmed reading is saved as typed.
 */
export function readingsToAskAbout(note: {
  fitInput: FitInput;
  midi: number;
  referenceHz: number;
  pitchOffsetCents: number | null;
  model: { b: number; lnBSigma: number } | undefined;
  confirmed: readonly number[];
}): AskAbout[] {
  const { readings, dropped = [] } = note.fitInput;
  const settled = new Set([...note.confirmed, ...dropped]);
  return readings.flatMap(({ partial, hz }, index) => {
    if (hz === undefined || settled.has(partial)) return [];
    const others = readings.filter((other, place) => place !== index && !dropped.includes(other.partial));
    const check = checkFrequency(
      {
        midi: note.midi,
        referenceHz: note.referenceHz,
        ...(note.pitchOffsetCents === null ? {} : { pitchOffsetCents: note.pitchOffsetCents }),
        ...(note.model ? { model: note.model } : {}),
        ...(others.length >= 3
          ? { running: fit({ ...note.fitInput, readings: others, dropped: [], kept: [] }) }
          : {}),
      },
      partial,
      hz,
    );
    if (!check.ask) return [];
    return [
      {
        partial,
        expectedHz: check.expectedHz,
        awayCents: check.awayCents ?? 0,
        fitsPartial: check.fitsPartial,
      },
    ];
  });
}

/** The question in words, for the field it is asked at. */
export function questionAbout({ partial, expectedHz, awayCents, fitsPartial }: AskAbout): string {
  const away = `${Math.abs(Math.round(awayCents))} cents ${awayCents > 0 ? "above" : "below"}`;
  const looks = fitsPartial === null ? "" : ` It looks like partial ${fitsPartial}.`;
  return `Partial ${partial} is ${away} where it is expected (${expectedHz.toFixed(2)} Hz).${looks} Correct it, or confirm that it is meant.`;
}
