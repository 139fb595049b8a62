import { type Register, registerOf } from "./registers";
import type { BuiltInStyle, IntervalRule, Style } from "./types";

export const defaultStyle: BuiltInStyle = "even";
/** Half-width of the band that counts as settled when a style does not say, cents. */
export const defaultToleranceCents = 2;

type RegisterWeights = Readonly<Record<Register, number>>;

/** An interval weighed by the register of its lower key: how a shop writes its own style. */
export type RegisterRule = {
  lowerPartial: number;
  upperPartial: number;
  semitones: number;
  weights: RegisterWeights;
  target?: "tempered" | "just";
};
export type RegisterStyle = {
  intervals: readonly RegisterRule[];
  smoothness: number;
  toleranceCents?: number;
};

/** A style by register laid out over the keys of one instrument, one weight per lower key. */
export function styleFromRegisters(style: RegisterStyle, firstMidi: number, lastMidi: number): Style {
  const intervals = style.intervals.map(
    ({ weights, ...rule }): IntervalRule => ({
      ...rule,
      weights: overKeys(firstMidi, lastMidi, (midi) => weights[registerOf(midi)]),
    }),
  );
  return { ...style, intervals };
}

function overKeys(firstMidi: number, lastMidi: number, weight: (midi: number) => number): number[] {
  return Array.from({ length: lastMidi - firstMidi + 1 }, (_, i) => weight(firstMidi + i));
}

const weigh = (
  bass: number,
  tenor: number,
  middle: number,
  treble: number,
  top: number,
): RegisterWeights => ({
  bass,
  tenor,
  middle,
  treble,
  top,
});

function rule(
  lowerPartial: number,
  upperPartial: number,
  semitones: number,
  weights: RegisterWeights,
): RegisterRule {
  return { lowerPartial, upperPartial, semitones, weights };
}

/**
 * The built-in styles by register. Which coincident partials are listened to where is common practice, no source; the weights are ours.
 */
export const registerStyles: Readonly<Record<Exclude<BuiltInStyle, "published">, RegisterStyle>> = {
  close: {
    intervals: [
      rule(2, 1, 12, weigh(0, 0.5, 1, 1, 1)),
      rule(4, 2, 12, weigh(0.4, 1, 0.8, 0.2, 0)),
      rule(6, 3, 12, weigh(1, 0.5, 0, 0, 0)),
      rule(3, 1, 19, weigh(0.2, 0.2, 0.1, 0, 0)),
      rule(3, 2, 7, weigh(0, 0.1, 0.2, 0, 0)),
      rule(4, 3, 5, weigh(0, 0.1, 0.1, 0, 0)),
    ],
    smoothness: 20,
    toleranceCents: 2,
  },
  even: {
    intervals: [
      rule(2, 1, 12, weigh(0, 0.2, 0.6, 1, 1)),
      rule(4, 2, 12, weigh(0.3, 1, 1, 0.6, 0.2)),
      rule(6, 3, 12, weigh(1, 0.8, 0.3, 0, 0)),
      rule(8, 4, 12, weigh(0.6, 0.2, 0, 0, 0)),
      rule(4, 1, 24, weigh(0.3, 0.4, 0.5, 0.5, 0)),
      rule(3, 1, 19, weigh(0.3, 0.4, 0.5, 0.3, 0)),
      rule(3, 2, 7, weigh(0, 0.1, 0.2, 0.1, 0)),
      rule(6, 4, 7, weigh(0.1, 0.2, 0.1, 0, 0)),
      rule(4, 3, 5, weigh(0, 0.1, 0.2, 0, 0)),
    ],
    smoothness: 20,
    toleranceCents: 2,
  },
  wide: {
    intervals: [
      rule(2, 1, 12, weigh(0, 0, 0.1, 0.3, 0.6)),
      rule(4, 2, 12, weigh(0, 0.4, 1, 0.8, 0.4)),
      rule(6, 3, 12, weigh(0.5, 1, 0.6, 0.1, 0)),
      rule(8, 4, 12, weigh(1, 0.5, 0, 0, 0)),
      rule(10, 5, 12, weigh(0.7, 0, 0, 0, 0)),
      rule(12, 6, 12, weigh(0.3, 0, 0, 0, 0)),
      rule(4, 1, 24, weigh(0, 0.3, 0.8, 1, 0)),
      rule(8, 2, 24, weigh(0.4, 0.4, 0.2, 0, 0)),
      rule(8, 1, 36, weigh(0.2, 0.4, 0.4, 0, 0)),
      rule(3, 1, 19, weigh(0.1, 0.4, 0.6, 0.6, 0)),
      rule(6, 2, 19, weigh(0.4, 0.4, 0.2, 0, 0)),
      rule(3, 2, 7, weigh(0, 0.1, 0.2, 0.1, 0)),
    ],
    smoothness: 20,
    toleranceCents: 3,
  },
};

/**
 * Octave type 2ρ:ρ over the compass, by the MIDI number of the lower key: ρ(m) = (κ/2)[1 − tanh((m − m0)/α)] + 1.
 * Rigaud, David & Daudet 2013, JASA 133:3107; the form and κ = 3.5, m0 = 64, α = 24 are from memory.
 */
export function publishedOctaveType(midi: number): number {
  return (3.5 / 2) * (1 - Math.tanh((midi - 64) / 24)) + 1;
}

/**
 * A fractional ρ is shared between its two whole neighbours so that the mean of ρ² is kept: the octave's width is then exact to first
 * order in B.
 */
function publishedStyle(firstMidi: number, lastMidi: number): Style {
  const intervals = [1, 2, 3, 4, 5].map(
    (whole): IntervalRule => ({
      lowerPartial: 2 * whole,
      upperPartial: whole,
      semitones: 12,
      weights: overKeys(firstMidi, lastMidi, (midi) => octaveShare(publishedOctaveType(midi), whole)),
    }),
  );
  return { intervals, smoothness: 0, toleranceCents: 2 };
}

function octaveShare(rho: number, whole: number): number {
  const below = Math.floor(rho);
  const upperShare = (rho ** 2 - below ** 2) / ((below + 1) ** 2 - below ** 2);
  if (whole === below) return 1 - upperShare;
  return whole === below + 1 ? upperShare : 0;
}

/** A built-in style over the keys of an instrument, 88 keys unless said otherwise. */
export function builtInStyle(name: BuiltInStyle, firstMidi = 21, lastMidi = 108): Style {
  return name === "published"
    ? publishedStyle(firstMidi, lastMidi)
    : styleFromRegisters(registerStyles[name], firstMidi, lastMidi);
}

/** The built-in styles over 88 keys. */
export const builtInStyles: Readonly<Record<BuiltInStyle, Style>> = {
  close: builtInStyle("close"),
  even: builtInStyle("even"),
  wide: builtInStyle("wide"),
  published: builtInStyle("published"),
};

export const isBuiltInStyle = (name: string): name is BuiltInStyle => Object.hasOwn(builtInStyles, name);
