import { bAtPitch, equalTemperedHz, inharmonicCents, raiseByCents, stretch } from "@/lib/acoustics";
import type { Chance } from "./random";

/** What is true of an invented instrument's strings, before anybody measures. */
export type Strings = {
  firstMidi: number;
  lastMidi: number;
  breakMidi: number;
  referenceHz: number;
  b: Map<number, number>;
  /** Departure of partial n of a key from the stiff-string law, cents: it belongs to the string and stays. */
  irregularity: Map<number, number[]>;
  /** Cents of f1 from equal temperament when the instrument is in tune. */
  inTune: Map<number, number>;
};

const highestPartial = 16;

/** Cents of scatter about the law: real notes scatter by about half a cent to a cent, low bass partials by more. */
function scatterOf(midi: number, partial: number): number {
  const note = midi < 40 ? 1.1 : midi < 60 ? 0.6 : 0.5;
  return midi < 36 && partial <= 2 ? 5 * note : note;
}

/** Bass level and slope vary with the instrument's size, the treble hardly: a short instrument has a stiff bass. */
export function makeStrings(
  chance: Chance,
  instrument: {
    firstMidi: number;
    lastMidi: number;
    breakMidi: number;
    referenceHz: number;
    size: "small" | "medium" | "large";
  },
): Strings {
  const { firstMidi, lastMidi, breakMidi, referenceHz } = instrument;
  const bassLevel = { small: 0.75, medium: 0.1, large: -0.45 }[instrument.size] + 0.15 * chance.normal();
  const trebleLevel = 0.1 * chance.normal();
  const trebleTilt = 0.04 * chance.normal();
  const b = new Map<number, number>();
  const irregularity = new Map<number, number[]>();
  for (let midi = firstMidi; midi <= lastMidi; midi += 1) {
    const bass = Math.exp(-0.0847 * midi - 5.82 + bassLevel);
    const treble = Math.exp(0.0926 * midi - 13.8 + trebleLevel + (trebleTilt * (midi - 69)) / 12);
    const step = midi < breakMidi ? 0.06 : 0;
    const scatter = 0.025 * chance.normal();
    b.set(midi, (bass + treble) * Math.exp(step + scatter));
    irregularity.set(
      midi,
      Array.from({ length: highestPartial + 1 }, (_, partial) => scatterOf(midi, partial) * chance.normal()),
    );
  }
  return { firstMidi, lastMidi, breakMidi, referenceHz, b, irregularity, inTune: tunedTo(b, instrument) };
}

function tunedTo(
  b: Map<number, number>,
  { firstMidi, lastMidi, referenceHz }: { firstMidi: number; lastMidi: number; referenceHz: number },
) {
  const { notes } = stretch({
    keys: [...b].map(([midi, value]) => ({ midi, b: value })),
    firstMidi,
    lastMidi,
    referenceHz,
    style: "even",
  });
  return new Map(notes.map(({ midi, stretchCents }) => [midi, stretchCents]));
}

/** B of plain wire at the same pitch and length goes with the square of its diameter. */
export function withOtherWire(strings: Strings, midi: number, fromMm: number, toMm: number): Strings {
  const b = new Map(strings.b);
  b.set(midi, (strings.b.get(midi) ?? 0) * (toMm / fromMm) ** 2);
  return { ...strings, b };
}

export type RawReading = { partial: number; hz: number };

/** Which partials a technician gets from a key: many in the bass, few at the top, the first ones missing at the bottom. */
function heardPartials(chance: Chance, midi: number): number[] {
  const first = midi < 28 ? 3 : midi < 36 ? 2 : 1;
  const count = midi > 100 ? 3 : midi > 92 ? 4 : midi > 80 ? 6 : midi > 68 ? 8 : 10;
  const all = Array.from({ length: count }, (_, index) => first + index);
  const missing = chance.uniform() < 0.25 && count > 6 ? chance.pick(all.slice(2, -1)) : null;
  return all.filter((partial) => partial !== missing && partial <= highestPartial);
}

/** One key as read: the string's own law, its irregularity, and a measuring error of a tenth or two of a cent. */
export function readKey(chance: Chance, strings: Strings, midi: number, offsetCents: number): RawReading[] {
  const inTuneHz = raiseByCents(equalTemperedHz(midi, strings.referenceHz), strings.inTune.get(midi) ?? 0);
  const f1 = raiseByCents(inTuneHz, offsetCents);
  // A string let down is slacker, and so stiffer for its tension.
  const b = bAtPitch(strings.b.get(midi) ?? 0, inTuneHz, f1);
  const own = strings.irregularity.get(midi) ?? [];
  return heardPartials(chance, midi).map((partial) => {
    const cents = inharmonicCents(partial, b) + (own[partial] ?? 0) + 0.15 * chance.normal();
    return { partial, hz: Math.round(raiseByCents(partial * f1, cents) * 1000) / 1000 };
  });
}
