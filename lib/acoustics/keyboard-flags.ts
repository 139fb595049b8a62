import { type Evidence, type Mode, precisionBand } from "./keyboard-posterior";
import { at } from "./linear-algebra";

/** Keys of one run stand at most this many semitones apart. */
const neighbourGap = 2;
const longestRun = 3;
/** Chance of any false flag on a sheet of clean notes. */
const falseAlarmShare = 0.01;
/** 90 % power adds this many standard deviations to the threshold. */
const powerQuantile = 1.2816;

export type DeletedResidual = {
  /** Observation minus its prediction from all others, in standard deviations; null on the linear scale. */
  z: number | null;
  /** Standard deviation of that difference, ln B. */
  sigma: number;
};

/** The part of the observations' precision that the tests below read. */
export const flagBand = (mode: Mode): Float64Array => precisionBand(mode, longestRun - 1);

/**
 * Leave-one-out residuals (Rasmussen & Williams 2006, eq. 5.12). For a note set aside its own added scatter is taken off
 * again, so that its z still measures the distance from what the others predict.
 */
export function deletedResiduals(
  evidence: readonly Evidence[],
  mode: Mode,
  band: Float64Array,
  setAside: ReadonlySet<number>,
  setAsideSigma: number,
): DeletedResidual[] {
  return evidence.map((item, i) => {
    const variance = 1 / at(band, i * longestRun);
    const sigma = Math.sqrt(setAside.has(i) ? variance - setAsideSigma ** 2 : variance);
    return { z: item.scale === "log" ? (at(mode.weights, i) * variance) / sigma : null, sigma };
  });
}

/**
 * Most significant run of one, two or three neighbouring measured keys whose ln B are all shifted by one amount against
 * what the other notes predict, or null. With Q the precision and α = Q·innovation, the generalised least-squares shift of
 * the run r, predicted without it, has z = Σ α_r / sqrt(1ᵀ Q_rr 1).
 */
export function worstRun(
  evidence: readonly Evidence[],
  mode: Mode,
  band: Float64Array,
  excluded: ReadonlySet<number>,
): number[] | null {
  const threshold = flagThreshold(evidence.length);
  let worst: { run: number[]; score: number } | null = null;
  for (const run of runs(evidence)) {
    if (run.some((i) => excluded.has(i))) continue;
    let numerator = 0;
    let information = 0;
    for (const i of run) {
      numerator += at(mode.weights, i);
      for (const j of run) information += at(band, Math.min(i, j) * longestRun + Math.abs(i - j));
    }
    const score = Math.abs(numerator) / Math.sqrt(information);
    if (score > threshold && (worst === null || score > worst.score)) worst = { run, score };
  }
  return worst?.run ?? null;
}

function runs(evidence: readonly Evidence[]): number[][] {
  const found: number[][] = [];
  evidence.forEach((_, start) => {
    const run: number[] = [];
    for (let i = start; i < evidence.length && run.length < longestRun; i += 1) {
      const item = evidence[i];
      const before = i > start ? evidence[i - 1] : undefined;
      if (item === undefined || item.scale !== "log") break;
      if (before !== undefined && item.key - before.key > neighbourGap) break;
      run.push(i);
      found.push([...run]);
    }
  });
  return found;
}

/** Two-sided normal threshold, Bonferroni over the up to three runs that start at each note. */
export function flagThreshold(observations: number): number {
  return normalQuantile(1 - falseAlarmShare / (2 * longestRun * Math.max(1, observations)));
}

/** Relative change of B that a note with this deleted σ shows as a flag in nine cases of ten. */
export function detectableChange(sigma: number, threshold: number): number {
  return Math.exp((threshold + powerQuantile) * sigma) - 1;
}

/** Upper-tail normal quantile by Newton steps on the asymptotic tail; p in (0.9, 1). */
function normalQuantile(p: number): number {
  const tail = 1 - p;
  let z = Math.sqrt(-2 * Math.log(tail));
  for (let i = 0; i < 60; i += 1) {
    const density = Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
    const step = (upperTail(z) - tail) / density;
    z += step;
    if (Math.abs(step) < 1e-12) break;
  }
  return z;
}

/** Upper tail of the standard normal by its continued fraction (Abramowitz & Stegun 26.2.14, from memory); z > 1. */
function upperTail(z: number): number {
  let fraction = z;
  for (let k = 200; k >= 1; k -= 1) fraction = z + k / fraction;
  return Math.exp(-0.5 * z * z) / (Math.sqrt(2 * Math.PI) * fraction);
}
