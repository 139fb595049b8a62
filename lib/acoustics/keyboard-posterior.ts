import { effectCount, effectSigmas, meanGradient, meanLnB } from "./keyboard-prior";
import {
  at,
  backwardSolve,
  choleskyInPlace,
  dot,
  forwardSolve,
  logDeterminant,
  transposedInverseOfFactor,
} from "./linear-algebra";

/** One observed key. On the log scale `sigma` is of ln B, on the linear scale of B itself. */
export type Evidence = { key: number; scale: "log" | "linear"; value: number; sigma: number };

/** Prior of ln B over consecutive keys: residual covariance (row-major) about the mean of the bridge offsets. */
export type Prior = { firstMidi: number; count: number; residual: Float64Array };

/**
 * The posterior linearised at its mode. With R = residual covariance at the observations + noise and H the gradient of
 * the mean by the bridge offsets, whose prior covariance is Σ.
 */
export type Mode = {
  /** Bridge offsets at the mode. */
  effects: Float64Array;
  /** Cholesky factor L of R. */
  factor: Float64Array;
  /** (L⁻¹ H)ᵀ, offsets × observations. */
  reducedGradients: Float64Array;
  /** Cholesky factor of Hᵀ R⁻¹ H + Σ⁻¹: the precision of the offsets. */
  effectFactor: Float64Array;
  /** (R + H Σ Hᵀ)⁻¹ · (observation − prior mean). */
  weights: Float64Array;
  logEvidence: number;
};

const maxIterations = 60;
const converged = 1e-10;
/** An offset or ln B may move at most this far in one step: readings on the linear scale would overshoot. */
const maxStep = 1;

/**
 * Mode of bridge offsets and ln B by Gauss–Newton: at each step the mean and the readings on the linear scale are linearised
 * and the Gaussian posterior with explicit basis functions is solved exactly (Rasmussen & Williams 2006, section 2.7).
 * `start` holds bridge offsets to begin from.
 */
export function findMode(
  prior: Prior,
  evidence: readonly Evidence[],
  start?: Float64Array,
  iterations = maxIterations,
): Mode {
  const n = evidence.length;
  const effects = Float64Array.from(start ?? new Float64Array(effectCount));
  const fitted = new Float64Array(n);
  for (const [i, { key }] of evidence.entries()) fitted[i] = meanLnB(prior.firstMidi + key, effects);
  const allLog = evidence.every(({ scale }) => scale === "log");
  let factor = noiseFactor(prior, evidence, fitted);
  for (let iteration = 1; ; iteration += 1) {
    if (!allLog && iteration > 1) factor = noiseFactor(prior, evidence, fitted);
    const mode = solveLinearised(prior, evidence, effects, fitted, factor);
    if (allLog) {
      if (move(effects, mode.effects) < converged || iteration === iterations) return mode;
      continue;
    }
    const next = evidence.map(({ key }, i) => {
      const sigma = noise(evidence[i], at(fitted, i));
      const misfit = target(evidence[i], at(fitted, i)) - sigma * sigma * at(mode.weights, i);
      return Number.isFinite(misfit) ? misfit : meanLnB(prior.firstMidi + key, mode.effects);
    });
    const change = Math.max(move(effects, mode.effects), move(fitted, next));
    if (change < converged || iteration === iterations) return mode;
  }
}

/** Moves `current` towards `next` by at most `maxStep` each; returns the largest move. */
function move(current: Float64Array, next: ArrayLike<number>): number {
  let largest = 0;
  for (let i = 0; i < current.length; i += 1) {
    const step = Math.min(maxStep, Math.max(-maxStep, (next[i] ?? Number.NaN) - at(current, i)));
    current[i] = at(current, i) + step;
    largest = Math.max(largest, Math.abs(step));
  }
  return largest;
}

function noise(item: Evidence | undefined, fitted: number): number {
  if (item === undefined) return Number.NaN;
  return item.scale === "log" ? item.sigma : item.sigma / Math.exp(fitted);
}

function target(item: Evidence | undefined, fitted: number): number {
  if (item === undefined) return Number.NaN;
  return item.scale === "log" ? item.value : fitted + item.value / Math.exp(fitted) - 1;
}

function noiseFactor(prior: Prior, evidence: readonly Evidence[], fitted: Float64Array): Float64Array {
  const n = evidence.length;
  const factor = new Float64Array(n * n);
  for (const [i, item] of evidence.entries()) {
    for (const [j, other] of evidence.entries()) {
      if (j > i) break;
      factor[i * n + j] = at(prior.residual, item.key * prior.count + other.key);
    }
    factor[i * n + i] = at(factor, i * n + i) + noise(item, at(fitted, i)) ** 2;
  }
  choleskyInPlace(factor, n);
  return factor;
}

function solveLinearised(
  prior: Prior,
  evidence: readonly Evidence[],
  effects: Float64Array,
  fitted: Float64Array,
  factor: Float64Array,
): Mode {
  const n = evidence.length;
  const k = effectCount;
  const columns = new Float64Array(k * n);
  const gradient = new Float64Array(k);
  const innovation = new Float64Array(n);
  for (const [i, item] of evidence.entries()) {
    const midi = prior.firstMidi + item.key;
    meanGradient(midi, effects, gradient, 0);
    let value = target(item, at(fitted, i)) - meanLnB(midi, effects);
    for (let e = 0; e < k; e += 1) {
      columns[e * n + i] = at(gradient, e);
      value += at(gradient, e) * at(effects, e);
    }
    innovation[i] = value;
  }
  for (let e = 0; e < k; e += 1) forwardSolve(factor, n, columns, e * n);
  forwardSolve(factor, n, innovation);

  const effectFactor = new Float64Array(k * k);
  const next = new Float64Array(k);
  let effectLogDeterminant = 0;
  for (let a = 0; a < k; a += 1) {
    const sigma = effectSigmas[a] ?? Number.NaN;
    for (let b = 0; b <= a; b += 1) effectFactor[a * k + b] = dot(columns, a * n, columns, b * n, n);
    effectFactor[a * k + a] = at(effectFactor, a * k + a) + sigma ** -2;
    next[a] = dot(columns, a * n, innovation, 0, n);
    effectLogDeterminant += 2 * Math.log(sigma);
  }
  choleskyInPlace(effectFactor, k);
  forwardSolve(effectFactor, k, next);
  const explained = dot(next, 0, next, 0, k);
  const total = dot(innovation, 0, innovation, 0, n);
  backwardSolve(effectFactor, k, next);

  const weights = innovation;
  for (let i = 0; i < n; i += 1) {
    let value = at(weights, i);
    for (let e = 0; e < k; e += 1) {
      value -= at(columns, e * n + i) * at(next, e);
    }
    weights[i] = value;
  }
  backwardSolve(factor, n, weights);
  const determinant = logDeterminant(factor, n) + logDeterminant(effectFactor, k) + effectLogDeterminant;
  return {
    effects: next,
    factor,
    reducedGradients: columns,
    effectFactor,
    weights,
    logEvidence: -0.5 * (total - explained + determinant),
  };
}

/** Mean and covariance (row-major) of ln B over all keys (Rasmussen & Williams 2006, eq. 2.41 and 2.42). */
export function posteriorOverKeys(
  prior: Prior,
  evidence: readonly Evidence[],
  mode: Mode,
): { mean: Float64Array; covariance: Float64Array } {
  const { count, firstMidi, residual } = prior;
  const n = evidence.length;
  const k = effectCount;
  const mean = new Float64Array(count);
  const reduced = new Float64Array(count * n);
  const remaining = new Float64Array(count * k);
  for (let m = 0; m < count; m += 1) {
    let shift = 0;
    for (const [i, { key }] of evidence.entries()) {
      const cross = at(residual, m * count + key);
      reduced[m * n + i] = cross;
      shift += cross * at(mode.weights, i);
    }
    forwardSolve(mode.factor, n, reduced, m * n);
    mean[m] = meanLnB(firstMidi + m, mode.effects) + shift;
    meanGradient(firstMidi + m, mode.effects, remaining, m * k);
    for (let e = 0; e < k; e += 1) {
      remaining[m * k + e] = at(remaining, m * k + e) - dot(reduced, m * n, mode.reducedGradients, e * n, n);
    }
    forwardSolve(mode.effectFactor, k, remaining, m * k);
  }
  const covariance = new Float64Array(count * count);
  for (let a = 0; a < count; a += 1) {
    for (let b = 0; b <= a; b += 1) {
      const value =
        at(residual, a * count + b) -
        dot(reduced, a * n, reduced, b * n, n) +
        dot(remaining, a * k, remaining, b * k, k);
      covariance[a * count + b] = value;
      covariance[b * count + a] = value;
    }
  }
  return { mean, covariance };
}

/**
 * Elements (i, i), (i, i+1), …, (i, i+reach) of the precision (R + H Σ Hᵀ)⁻¹, row by row; its blocks give leave-out
 * predictions of neighbouring observations.
 */
export function precisionBand(mode: Mode, reach: number): Float64Array {
  const n = mode.weights.length;
  const k = effectCount;
  const inverse = transposedInverseOfFactor(mode.factor, n);
  const scaled = new Float64Array(n * k);
  for (let i = 0; i < n; i += 1) {
    for (let e = 0; e < k; e += 1) {
      scaled[i * k + e] = dot(inverse, i * n + i, mode.reducedGradients, e * n + i, n - i);
    }
    forwardSolve(mode.effectFactor, k, scaled, i * k);
  }
  const band = new Float64Array(n * (reach + 1));
  for (let i = 0; i < n; i += 1) {
    for (let j = i; j <= i + reach && j < n; j += 1) {
      band[i * (reach + 1) + j - i] =
        dot(inverse, i * n + j, inverse, j * n + j, n - j) - dot(scaled, i * k, scaled, j * k, k);
    }
  }
  return band;
}
