import { type DeletedResidual, deletedResiduals, flagBand, worstRun } from "./keyboard-flags";
import { type Evidence, findMode, type Mode, type Prior } from "./keyboard-posterior";
import { type BreakBelief, residualCovariance } from "./keyboard-prior";
import { at } from "./linear-algebra";

/** Own scatter of a note set aside: wide enough that it tells its neighbours nothing. */
const setAsideSigma = 3;
/** At most this share of the measured notes is set aside: beyond it the sheet, not the notes, is in question. */
const largestFlaggedShare = 1 / 3;
/** A note of a flagged run that alone lies within this many σ of the others' prediction is taken back. */
const belongsZ = 2;

/** Notes set aside, the prior in which they carry their own scatter, and the posterior mode under it. */
export type Screened = {
  flagged: ReadonlySet<number>;
  prior: Prior;
  mode: Mode;
  /** Diagonals of the observations' precision at the mode. */
  band: Float64Array;
  residuals: DeletedResidual[];
};

/**
 * Sets aside, worst first, the runs of neighbouring notes that the others contradict, until none is left. A note set aside keeps its
 * own B in the result but informs no other key.
 */
export function screen(
  firstMidi: number,
  count: number,
  belief: BreakBelief,
  evidence: readonly Evidence[],
  start?: Float64Array,
): Screened {
  const plain = residualCovariance(firstMidi, count, belief);
  const flagged = new Set<number>();
  const limit = Math.floor(evidence.length * largestFlaggedShare);
  let current = solve(firstMidi, count, plain, evidence, flagged, start);
  for (;;) {
    const run = worstRun(evidence, current.mode, current.band, flagged);
    if (run === null || flagged.size + run.length > limit) return current;
    for (const i of run) flagged.add(i);
    current = solve(firstMidi, count, plain, evidence, flagged, current.mode.effects);
    const belonging = run.filter((i) => Math.abs(current.residuals[i]?.z ?? belongsZ) < belongsZ);
    if (belonging.length > 0 && belonging.length < run.length) {
      for (const i of belonging) flagged.delete(i);
      current = solve(firstMidi, count, plain, evidence, flagged, current.mode.effects);
    }
  }
}

function solve(
  firstMidi: number,
  count: number,
  plain: Float64Array,
  evidence: readonly Evidence[],
  flagged: ReadonlySet<number>,
  start?: Float64Array,
): Screened {
  const residual = Float64Array.from(plain);
  evidence.forEach(({ key }, i) => {
    if (flagged.has(i)) residual[key * count + key] = at(residual, key * count + key) + setAsideSigma ** 2;
  });
  const prior = { firstMidi, count, residual };
  const mode = findMode(prior, evidence, start);
  const band = flagBand(mode);
  const residuals = deletedResiduals(evidence, mode, band, flagged, setAsideSigma);
  return { flagged: new Set(flagged), prior, mode, band, residuals };
}
