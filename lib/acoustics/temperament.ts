import { STANDARD_PITCH_HZ } from "./keys";
import { AcousticsError, type Temperament, type TemperamentName } from "./types";

/** Commas and just intervals in cents, from their ratios. */
export const PURE_FIFTH = 1200 * Math.log2(3 / 2);
export const PURE_MAJOR_THIRD = 1200 * Math.log2(5 / 4);
export const PYTHAGOREAN_COMMA = 12 * PURE_FIFTH - 7 * 1200;
export const SYNTONIC_COMMA = 4 * PURE_FIFTH - 2 * 1200 - PURE_MAJOR_THIRD;
export const SCHISMA = PYTHAGOREAN_COMMA - SYNTONIC_COMMA;
export const LESSER_DIESIS = 1200 - 3 * PURE_MAJOR_THIRD;

export const TEMPERAMENT_NAMES = [
  "equal",
  "pythagorean",
  "meantone-quarter",
  "werckmeister-3",
  "kirnberger-3",
  "vallotti",
  "young-2",
  "kellner",
] as const satisfies readonly TemperamentName[];

/** Fifths in order round the circle, starting E flat – B flat and closing G sharp – E flat. */
const FIFTHS = [
  "Eb-Bb",
  "Bb-F",
  "F-C",
  "C-G",
  "G-D",
  "D-A",
  "A-E",
  "E-B",
  "B-F#",
  "F#-C#",
  "C#-G#",
  "G#-Eb",
] as const;
export type Fifth = (typeof FIFTHS)[number];

const P = PYTHAGOREAN_COMMA;
const S = SYNTONIC_COMMA;

function temper(fifths: readonly Fifth[], by: number): Partial<Record<Fifth, number>> {
  return Object.fromEntries(fifths.map((fifth) => [fifth, by]));
}

/**
 * Cents by which each fifth is wider than pure; the fifth G sharp – E flat takes what closes the circle.
 * Werckmeister III and Vallotti as printed in a history of temperaments; the others from memory.
 */
const TEMPERINGS: Record<TemperamentName, Partial<Record<Fifth, number>>> = {
  equal: temper(FIFTHS.slice(0, 11), -P / 12),
  pythagorean: {},
  "meantone-quarter": temper(FIFTHS.slice(0, 11), -S / 4),
  "werckmeister-3": temper(["C-G", "G-D", "D-A", "B-F#"], -P / 4),
  "kirnberger-3": { ...temper(["C-G", "G-D", "D-A", "A-E"], -S / 4), "F#-C#": -SCHISMA },
  vallotti: temper(["F-C", "C-G", "G-D", "D-A", "A-E", "E-B"], -P / 6),
  "young-2": temper(["C-G", "G-D", "D-A", "A-E", "E-B", "B-F#"], -P / 6),
  kellner: temper(["C-G", "G-D", "D-A", "A-E", "B-F#"], -P / 5),
};

/** The twelve fifths and by how many cents each is wider than pure; they sum to minus the Pythagorean comma. */
export function temperedFifths(name: TemperamentName): { fifth: Fifth; cents: number }[] {
  const given = TEMPERINGS[name];
  const open = FIFTHS.slice(0, 11).map((fifth) => ({ fifth, cents: given[fifth] ?? 0 }));
  const sum = open.reduce((total, { cents }) => total + cents, 0);
  return [...open, { fifth: "G#-Eb", cents: -P - sum }];
}

function offsetsOf(name: TemperamentName): number[] {
  const offsets = new Array<number>(12).fill(0);
  let pitchClass = 3;
  let offset = 0;
  for (const { cents } of temperedFifths(name).slice(0, 11)) {
    offset += PURE_FIFTH - 700 + cents;
    pitchClass = (pitchClass + 7) % 12;
    offsets[pitchClass] = offset;
  }
  return relativeToA(offsets);
}

function relativeToA(offsets: readonly number[]): number[] {
  const a = offsets[9] ?? 0;
  return offsets.map((offset) => offset - a);
}

/**
 * Offsets in cents from equal temperament for C, C#, … B, A as reference (its offset is 0).
 * A named temperament is built from how its fifths are tempered; twelve offsets of one's own are checked:
 * twelve finite numbers within ±100 cents that keep the notes in rising order, moved so that A is 0.
 * Errors: AcousticsError "unknown-temperament", "bad-temperament".
 */
export function temperamentOffsets(temperament: Temperament): number[] {
  if (typeof temperament === "string") {
    if (!Object.hasOwn(TEMPERINGS, temperament)) {
      throw new AcousticsError(
        "unknown-temperament",
        `There is no temperament called "${String(temperament)}". Choose one of: ${TEMPERAMENT_NAMES.join(", ")}.`,
        "temperament",
      );
    }
    return offsetsOf(temperament);
  }
  if (!Array.isArray(temperament) || temperament.length !== 12) {
    throw new AcousticsError(
      "bad-temperament",
      "An own temperament needs twelve offsets in cents, for C, C sharp and so on to B.",
      "temperament",
    );
  }
  temperament.forEach((offset: unknown, index) => {
    if (typeof offset !== "number" || !Number.isFinite(offset) || Math.abs(offset) > 100) {
      throw new AcousticsError(
        "bad-temperament",
        "An offset of a temperament is a number of cents between -100 and 100.",
        `temperament[${index}]`,
      );
    }
  });
  const offsets = relativeToA(temperament);
  offsets.forEach((offset, index) => {
    const next = index === 11 ? (offsets[0] ?? 0) : (offsets[index + 1] ?? 0);
    if (100 + next - offset <= 0) {
      throw new AcousticsError(
        "bad-temperament",
        "These offsets put a note above the next higher one.",
        `temperament[${index}]`,
      );
    }
  });
  return offsets;
}

export type TemperamentInput = { temperament: Temperament; referenceHz?: number };
export type TemperamentResult = {
  /** Cents from equal temperament for C, C#, … B; A is 0. */
  offsets: number[];
  centsFromC: number[];
  /** Frequencies of the octave from C4 to B4 with harmonic partials, Hz. */
  hz: number[];
  /** Cents by which the fifth above each note C, C#, … B is wider than pure. */
  fifths: number[];
  /** Cents by which the major third above each note C, C#, … B is wider than pure. */
  majorThirds: number[];
};

/** A temperament laid out: its notes and how far its fifths and major thirds are from pure. */
export function describeTemperament({
  temperament,
  referenceHz = STANDARD_PITCH_HZ,
}: TemperamentInput): TemperamentResult {
  if (!(Number.isFinite(referenceHz) && referenceHz > 0)) {
    throw new AcousticsError("bad-reference", "The reference pitch must be above 0 Hz.", "referenceHz");
  }
  const offsets = temperamentOffsets(temperament);
  const at = (index: number) => offsets[index % 12] ?? 0;
  const c = at(0);
  return {
    offsets,
    centsFromC: offsets.map((offset, index) => 100 * index + offset - c),
    hz: offsets.map((offset, index) => referenceHz * 2 ** ((index - 9) / 12 + offset / 1200)),
    fifths: offsets.map((offset, index) => 700 + at(index + 7) - offset - PURE_FIFTH),
    majorThirds: offsets.map((offset, index) => 400 + at(index + 4) - offset - PURE_MAJOR_THIRD),
  };
}
