/**
 * Instruments invented for tests, built otherwise than the model under test: a two-exponential curve with its own offsets, smooth
 * curvature per bridge as sinusoids, a step at the break and one where single bass strings give way to pairs, saw teeth where the wire gauge changes, and single-note scatter.
 * Partials depart from the stiff-string law, and B is read from them by least squares as a technician's sheet would be.
 */
import { inharmonicCentsSlope } from "@/lib/acoustics/partials";
import type { Observation } from "@/lib/acoustics/types";

export type Random = { uniform: () => number; normal: () => number };

/** Mulberry32 with Box–Muller normals. */
export function seededRandom(seed: number): Random {
  let state = seed >>> 0;
  const uniform = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}

export type SimulatedKey = {
  midi: number;
  b: number;
  /** Departure of partial n from the law, cents, at index n. */
  irregularity: number[];
};
export type SimulatedInstrument = { breakMidi: number; keys: SimulatedKey[] };

const highestPartial = 16;

export function simulateInstrument(random: Random, firstMidi = 21, lastMidi = 108): SimulatedInstrument {
  const { uniform, normal } = random;
  const breakMidi = 41 + Math.floor(9 * uniform());
  const bassLevel = 0.55 * normal();
  const bassSlope = 0.15 * normal();
  const trebleLevel = 0.14 * normal();
  const trebleSlope = 0.06 * normal();
  const step = 0.15 * normal();
  const pairsFrom = 26 + Math.floor(7 * uniform());
  const pairStep = 0.2 * normal();
  const bassWave = wave(random, 0.12);
  const trebleWave = wave(random, 0.06);
  let toothLength = 0;
  let tooth = 0;
  const keys = Array.from({ length: lastMidi - firstMidi + 1 }, (_, i): SimulatedKey => {
    const midi = firstMidi + i;
    if (tooth >= toothLength) {
      toothLength = 3 + Math.floor(4 * uniform());
      tooth = 0;
    }
    const saw = 0.06 * (tooth / toothLength - 0.5);
    tooth += 1;
    const bass = Math.exp(-0.0847 * midi - 5.82 + bassLevel + (bassSlope * (midi - 33)) / 12);
    const treble = Math.exp(0.0926 * midi - 13.64 + trebleLevel + (trebleSlope * (midi - 69)) / 12);
    const onBass = midi < breakMidi;
    const ends = midi < 45 ? 0.07 : midi > 96 ? 0.05 : 0.015;
    const lnB =
      Math.log(bass + treble) +
      (onBass ? step + bassWave(midi) : trebleWave(midi)) +
      (midi < pairsFrom ? pairStep : 0) +
      saw +
      ends * normal();
    const sigma = irregularityOf(midi);
    const irregularity = Array.from({ length: highestPartial + 1 }, (_, n) => {
      const pulled = midi < 40 && n <= 4 ? (n === 1 ? 4 : 1.5) * ((40 - midi) / 19) : 0;
      return Math.hypot(sigma, pulled) * normal();
    });
    return { midi, b: Math.exp(lnB), irregularity };
  });
  return { breakMidi, keys };
}

function wave({ uniform, normal }: Random, sigma: number): (midi: number) => number {
  const amplitude = sigma * Math.SQRT2 * normal();
  const period = 25 + 35 * uniform();
  const phase = 2 * Math.PI * uniform();
  return (midi) => amplitude * Math.sin((2 * Math.PI * midi) / period + phase);
}

/** 0.5 to 1.3 cents on real notes; the steps follow the residuals of the recorded notes. */
function irregularityOf(midi: number): number {
  if (midi < 40) return 1;
  if (midi < 72) return 0.7;
  return midi < 79 ? 0.9 : 1.2;
}

const partialsOf = (midi: number): number => {
  if (midi < 60) return 12;
  if (midi < 80) return 8;
  if (midi < 90) return 6;
  return midi < 98 ? 4 : 3;
};

/** B as read from the key's partials 1 … n (2 … n in the bass), with measuring noise, and its standard deviation. */
export function observe({ midi, b, irregularity }: SimulatedKey, { normal }: Random): Observation {
  const measuring = 0.2;
  const sigma = Math.hypot(measuring, irregularityOf(midi));
  let count = 0;
  let sumX = 0;
  let sumXX = 0;
  let sumY = 0;
  let sumXY = 0;
  for (let n = midi < 40 ? 5 : 1; n <= partialsOf(midi); n += 1) {
    const x = b * inharmonicCentsSlope(n, b);
    const y = (irregularity[n] ?? 0) + measuring * normal();
    count += 1;
    sumX += x;
    sumXX += x * x;
    sumY += y;
    sumXY += x * y;
  }
  const spread = sumXX - (sumX * sumX) / count;
  const shift = (sumXY - (sumX * sumY) / count) / spread;
  const relative = sigma / Math.sqrt(spread);
  const read = b * (1 + shift);
  return { midi, b: read, bSigma: Math.abs(relative * b) };
}

/** `count` keys spread over the compass with random shifts; all of them when `count` is the number of keys. */
export function spreadKeys<Key>(keys: readonly Key[], count: number, { uniform }: Random): Key[] {
  if (count >= keys.length) return [...keys];
  const stride = keys.length / count;
  const picked = new Set<number>();
  for (let i = 0; i < count; i += 1)
    picked.add(Math.min(keys.length - 1, Math.floor((i + uniform()) * stride)));
  return keys.filter((_, i) => picked.has(i));
}
