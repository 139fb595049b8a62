import { equalTemperedHz, pitchClassOf, STANDARD_PITCH_HZ } from "./keys";
import { partialHzFromF1 } from "./partials";
import { temperamentOffsets } from "./temperament";
import { AcousticsError, type Evenness, type Temperament } from "./types";

/** A tuned note: its first partial in Hz and its B. */
export type TunedNote = { midi: number; f1Hz: number; b: number };

export type BeatingInterval = {
  name: string;
  semitones: number;
  lowerPartial: number;
  upperPartial: number;
};

/** Intervals and the coincident partials a tuner listens to: `lowerPartial` of the lower note meets `upperPartial` of the upper. */
export const BEATING_INTERVALS = [
  { name: "minor-third", semitones: 3, lowerPartial: 6, upperPartial: 5 },
  { name: "major-third", semitones: 4, lowerPartial: 5, upperPartial: 4 },
  { name: "fourth", semitones: 5, lowerPartial: 4, upperPartial: 3 },
  { name: "fifth", semitones: 7, lowerPartial: 3, upperPartial: 2 },
  { name: "fifth-6-4", semitones: 7, lowerPartial: 6, upperPartial: 4 },
  { name: "minor-sixth", semitones: 8, lowerPartial: 8, upperPartial: 5 },
  { name: "major-sixth", semitones: 9, lowerPartial: 5, upperPartial: 3 },
  { name: "octave-2-1", semitones: 12, lowerPartial: 2, upperPartial: 1 },
  { name: "octave-4-2", semitones: 12, lowerPartial: 4, upperPartial: 2 },
  { name: "octave-6-3", semitones: 12, lowerPartial: 6, upperPartial: 3 },
  { name: "octave-8-4", semitones: 12, lowerPartial: 8, upperPartial: 4 },
  { name: "octave-10-5", semitones: 12, lowerPartial: 10, upperPartial: 5 },
  { name: "octave-12-6", semitones: 12, lowerPartial: 12, upperPartial: 6 },
  { name: "major-tenth", semitones: 16, lowerPartial: 5, upperPartial: 2 },
  { name: "twelfth", semitones: 19, lowerPartial: 3, upperPartial: 1 },
  { name: "twelfth-6-2", semitones: 19, lowerPartial: 6, upperPartial: 2 },
  { name: "double-octave-4-1", semitones: 24, lowerPartial: 4, upperPartial: 1 },
  { name: "double-octave-8-2", semitones: 24, lowerPartial: 8, upperPartial: 2 },
  { name: "triple-octave-8-1", semitones: 36, lowerPartial: 8, upperPartial: 1 },
] as const satisfies readonly BeatingInterval[];

/**
 * Beats per second where partial `lowerPartial` of `lower` meets `upperPartial` of `upper`:
 * positive when the interval is wide there, negative when narrow.
 * Theory: R. Rasch, "Theory of Helmholtz-beat frequencies", Music Perception 1 (1984) 308-322.
 */
export function beatsPerSecond(
  lower: Pick<TunedNote, "f1Hz" | "b">,
  lowerPartial: number,
  upper: Pick<TunedNote, "f1Hz" | "b">,
  upperPartial: number,
): number {
  return (
    partialHzFromF1(upperPartial, upper.f1Hz, upper.b) - partialHzFromF1(lowerPartial, lower.f1Hz, lower.b)
  );
}

export type Beat = {
  interval: string;
  lowerMidi: number;
  upperMidi: number;
  lowerPartial: number;
  upperPartial: number;
  beatsPerSecond: number;
};

/** Beat rates of every interval of `intervals` whose two keys are both in `notes`, by interval and rising lower key. */
export function beatRates(
  notes: readonly TunedNote[],
  intervals: readonly BeatingInterval[] = BEATING_INTERVALS,
): Beat[] {
  const byMidi = new Map(notes.map((note) => [note.midi, note]));
  const rising = [...notes].sort((left, right) => left.midi - right.midi);
  return intervals.flatMap((interval) =>
    rising.flatMap((lower) => {
      const upper = byMidi.get(lower.midi + interval.semitones);
      if (!upper) return [];
      const { name, lowerPartial, upperPartial } = interval;
      return [
        {
          interval: name,
          lowerMidi: lower.midi,
          upperMidi: upper.midi,
          lowerPartial,
          upperPartial,
          beatsPerSecond: beatsPerSecond(lower, lowerPartial, upper, upperPartial),
        },
      ];
    }),
  );
}

/** Lower keys over which evenness is judged, C3 to F4: there thirds, sixths and tenths beat 5 to 16 times a second. */
const EVENNESS_LOWEST_KEY = 48;
const EVENNESS_HIGHEST_KEY = 65;

const EVENNESS_INTERVALS = ["major-third", "major-sixth", "major-tenth"] as const;

/**
 * How evenly the beats of rising major thirds, sixths and tenths quicken over the temperament octaves.
 * `roughness` is the root mean square departure of the rates from a least-squares parabola over the keys,
 * divided by their mean size; `reversals` are the lower keys at which the rate falls instead of rising.
 */
export function evenness(notes: readonly TunedNote[]): Evenness {
  const within = notes.filter(({ midi }) => midi >= EVENNESS_LOWEST_KEY && midi <= EVENNESS_HIGHEST_KEY + 16);
  return {
    intervals: EVENNESS_INTERVALS.map((name) => {
      const rule = BEATING_INTERVALS.filter((interval) => interval.name === name);
      const rates = beatRates(within, rule)
        .filter(({ lowerMidi }) => lowerMidi <= EVENNESS_HIGHEST_KEY)
        .map(({ lowerMidi, beatsPerSecond: rate }) => ({ lowerMidi, beatsPerSecond: rate }));
      const reversals = rates.flatMap(({ lowerMidi, beatsPerSecond: rate }, index) => {
        const before = rates[index - 1];
        return before && before.lowerMidi === lowerMidi - 1 && rate < before.beatsPerSecond
          ? [lowerMidi]
          : [];
      });
      return { name, rates, roughness: roughness(rates), reversals };
    }),
  };
}

/** Departure from a parabola fitted through discrete orthogonal polynomials (Gram-Schmidt on 1, x, x²). */
function roughness(rates: readonly { lowerMidi: number; beatsPerSecond: number }[]): number {
  const size = rates.reduce((sum, rate) => sum + Math.abs(rate.beatsPerSecond), 0) / rates.length;
  if (rates.length < 4 || size === 0) return 0;
  const keys = rates.map(({ lowerMidi }) => lowerMidi);
  let left = rates.map(({ beatsPerSecond: rate }) => rate);
  const basis: number[][] = [];
  for (const power of [0, 1, 2]) {
    let vector = keys.map((key) => ((key - EVENNESS_LOWEST_KEY) / 12) ** power);
    for (const earlier of basis) vector = without(vector, earlier);
    basis.push(vector);
    left = without(left, vector);
  }
  return Math.sqrt(left.reduce((sum, value) => sum + value * value, 0) / left.length) / size;
}

function dot(left: readonly number[], right: readonly number[]): number {
  return left.reduce((sum, value, index) => sum + value * (right[index] ?? 0), 0);
}

function without(vector: readonly number[], direction: readonly number[]): number[] {
  const share = dot(vector, direction) / dot(direction, direction);
  return vector.map((value, index) => value - share * (direction[index] ?? 0));
}

export type BeatsInput = {
  /** A tuned instrument or plan. Absent: strings without stiffness in `temperament`. */
  notes?: readonly TunedNote[];
  temperament?: Temperament;
  referenceHz?: number;
  firstMidi?: number;
  lastMidi?: number;
};

export type BeatsResult = { beats: Beat[]; evenness: Evenness };

/** Notes of ideal strings without stiffness, tuned in a temperament. */
export function harmonicNotes(
  firstMidi: number,
  lastMidi: number,
  temperament: Temperament = "equal",
  referenceHz: number = STANDARD_PITCH_HZ,
): TunedNote[] {
  const offsets = temperamentOffsets(temperament);
  return Array.from({ length: Math.max(0, lastMidi - firstMidi + 1) }, (_, index) => {
    const midi = firstMidi + index;
    const offset = offsets[pitchClassOf(midi)] ?? 0;
    return { midi, f1Hz: equalTemperedHz(midi, referenceHz) * 2 ** (offset / 1200), b: 0 };
  });
}

/** Beat rates and their evenness for tuned notes, or for ideal strings in a temperament. */
export function beats(input: BeatsInput): BeatsResult {
  const { firstMidi = 21, lastMidi = 108, referenceHz = STANDARD_PITCH_HZ } = input;
  if (!(Number.isFinite(referenceHz) && referenceHz > 0)) {
    throw new AcousticsError("bad-reference", "The reference pitch must be above 0 Hz.", "referenceHz");
  }
  input.notes?.forEach((note, index) => {
    if (!(Number.isFinite(note.f1Hz) && note.f1Hz > 0)) {
      throw new AcousticsError("bad-frequency", "A frequency must be above 0 Hz.", `notes[${index}].f1Hz`);
    }
    if (!(Number.isFinite(note.b) && note.b > -0.001 && note.b < 1)) {
      throw new AcousticsError("bad-b", "B lies between 0 and 1.", `notes[${index}].b`);
    }
    if (input.notes?.findIndex(({ midi }) => midi === note.midi) !== index) {
      throw new AcousticsError("duplicate-note", "This note is given twice.", `notes[${index}].midi`);
    }
  });
  const notes = (
    input.notes ?? harmonicNotes(firstMidi, lastMidi, input.temperament ?? "equal", referenceHz)
  ).filter(({ midi }) => midi >= firstMidi && midi <= lastMidi);
  return { beats: beatRates(notes), evenness: evenness(notes) };
}
