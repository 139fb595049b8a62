import { at } from "./linear-algebra";

/**
 * What is believed about ln B over the keyboard before a string is measured.
 *
 * ln B(m) = ln[exp(bB·m + aB + u0 + u1·(m−33)/12) + exp(bT·m + aT + v0 + v1·(m−69)/12)] + g(m) + e(m)
 *
 * The two-exponential sum and its mean parameters: Rigaud, David & Daudet 2013, JASA 133:3107 (parameters from
 * memory). u and v are level and slope offsets of the bass and treble bridge, g a Gaussian process per bridge
 * (Rasmussen & Williams 2006, ch. 2 and 4), e the scatter of single notes about their bridge's curve.
 */
const bassBridge = { slope: -8.47e-2, level: -5.82, pivotMidi: 33 };
const trebleBridge = { slope: 9.26e-2, level: -13.64, pivotMidi: 69 };

/** Standard deviations of u0, u1 (per octave), v0, v1 (per octave). */
export const effectSigmas = [0.7, 0.25, 0.16, 0.06] as const;
export const effectCount = effectSigmas.length;

/** Correlation length of a bridge's departure from the two-exponential curve, in keys. */
const lengthKeys = 12;

export type Knot = readonly [midi: number, value: number];

/** Standard deviation of g: largest about the break, where bridges differ most from the sum's smooth valley. */
const curveSigmas: readonly Knot[] = [
  [21, 0.24],
  [40, 0.2],
  [52, 0.1],
  [60, 0.07],
  [78, 0.09],
  [96, 0.09],
  [108, 0.1],
];

/** Standard deviation of e: wound strings and short strings are made less alike than the plain middle. */
const scatterSigmas: readonly Knot[] = [
  [21, 0.1],
  [40, 0.08],
  [52, 0.035],
  [60, 0.025],
  [90, 0.025],
  [108, 0.07],
];

/** Straight lines between knots in rising order, constant beyond them. */
export function interpolate(knots: readonly Knot[], x: number): number {
  let previous: Knot | undefined;
  for (const knot of knots) {
    if (x <= knot[0]) {
      if (previous === undefined) return knot[1];
      return previous[1] + ((knot[1] - previous[1]) * (x - previous[0])) / (knot[0] - previous[0]);
    }
    previous = knot;
  }
  return previous?.[1] ?? Number.NaN;
}

/** Standard deviation of one note's ln B about its bridge's curve. */
const noteScatterSigma = (midi: number): number => interpolate(scatterSigmas, midi);

/** Mean of ln B at a key for given bridge offsets; zeros give the published mean instrument. */
export function meanLnB(midi: number, effects: Float64Array): number {
  return Math.log(bassTerm(midi, effects) + trebleTerm(midi, effects));
}

/** The published mean B(m) = exp(bB·m + aB) + exp(bT·m + aT). */
export const publishedMeanB = (midi: number): number =>
  Math.exp(meanLnB(midi, new Float64Array(effectCount)));

/** Derivatives of `meanLnB` by the four offsets, written at `offset` of `into`. */
export function meanGradient(midi: number, effects: Float64Array, into: Float64Array, offset: number): void {
  const bass = bassTerm(midi, effects);
  const share = bass / (bass + trebleTerm(midi, effects));
  into[offset] = share;
  into[offset + 1] = (share * (midi - bassBridge.pivotMidi)) / 12;
  into[offset + 2] = 1 - share;
  into[offset + 3] = ((1 - share) * (midi - trebleBridge.pivotMidi)) / 12;
}

function bassTerm(midi: number, effects: Float64Array): number {
  const offset = at(effects, 0) + (at(effects, 1) * (midi - bassBridge.pivotMidi)) / 12;
  return Math.exp(bassBridge.slope * midi + bassBridge.level + offset);
}

function trebleTerm(midi: number, effects: Float64Array): number {
  const offset = at(effects, 2) + (at(effects, 3) * (midi - trebleBridge.pivotMidi)) / 12;
  return Math.exp(trebleBridge.slope * midi + trebleBridge.level + offset);
}

/** Belief about the break: `weights[i]` is the probability that key `firstMidi + i` is the treble bridge's lowest. */
export type BreakBelief = { firstMidi: number; weights: readonly number[] };

/** Centre of the belief below; the answer when nothing measured tells where the break is. */
export const assumedBreakMidi = 45;

/** Bass sections commonly end between E2 and C3: common practice, no source. */
export function priorBreakBelief(): BreakBelief {
  const firstMidi = 36;
  const weights = Array.from({ length: 19 }, (_, i) =>
    Math.exp(-0.5 * ((firstMidi + i - assumedBreakMidi) / 4.5) ** 2),
  );
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return { firstMidi, weights: weights.map((weight) => weight / total) };
}

export const knownBreak = (breakMidi: number): BreakBelief => ({ firstMidi: breakMidi, weights: [1] });

/** Probability that the key stands on the treble bridge. */
function onTrebleBridge(midi: number, belief: BreakBelief): number {
  let sum = 0;
  belief.weights.forEach((weight, i) => {
    if (belief.firstMidi + i <= midi) sum += weight;
  });
  return sum;
}

/** Matérn 5/2 correlation (Rasmussen & Williams 2006, eq. 4.17) at a distance in keys. */
function matern(distance: number): number {
  const r = (Math.sqrt(5) * distance) / lengthKeys;
  return (1 + r + (r * r) / 3) * Math.exp(-r);
}

/**
 * Covariance of g + e over consecutive keys, row-major. Two keys share g only while on one bridge; with an uncertain
 * break the covariance is the average over where the break may be, which stays positive definite. `curveScale` widens g.
 */
export function residualCovariance(
  firstMidi: number,
  count: number,
  belief: BreakBelief,
  curveScale = 1,
): Float64Array {
  const matrix = new Float64Array(count * count);
  const sigmas = new Float64Array(count);
  const treble = new Float64Array(count);
  const correlation = new Float64Array(count);
  for (let i = 0; i < count; i += 1) {
    sigmas[i] = curveScale * interpolate(curveSigmas, firstMidi + i);
    treble[i] = onTrebleBridge(firstMidi + i, belief);
    correlation[i] = matern(i);
  }
  for (let i = 0; i < count; i += 1) {
    for (let j = 0; j <= i; j += 1) {
      const sameBridge = 1 - (at(treble, i) - at(treble, j));
      const value = at(sigmas, i) * at(sigmas, j) * at(correlation, i - j) * sameBridge;
      matrix[i * count + j] = value;
      matrix[j * count + i] = value;
    }
    matrix[i * count + i] = at(matrix, i * count + i) + noteScatterSigma(firstMidi + i) ** 2;
  }
  return matrix;
}
