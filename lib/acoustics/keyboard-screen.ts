import { type DeletedResidual, deletedResiduals, flagBand, worstRun } from "./keyboard-flags";
import { type Evidence, findMode, type Mode, type Prior } from "./keyboard-posterior";
import { type BreakBelief, residualCovariance } from "./keyboard-prior";
import { at } from "./linear-algebra";

/** Own scatter of a note set aside: wide enough that it tells its neighbours nothing. */
const setAsideSigma = 3;
/**
 * Notes are judged against curves this much freer than believed: an instrument with an unusual scale is no fault of its
 * notes. Between near neighbours it costs no power.
 */
const judgingCurveScale = 2;
/**
 * At most this share of the measured notes is set aside, though always one may be: beyond it the sheet, not the notes, is in
 * question. A lone note is judged by what instruments in general are like.
 */
const largestFlaggedShare = 1 / 3;
/** A note of a flagged run that alone lies within this many σ of the others' prediction is taken back. */
const belongsZ = 2;

/** Notes set aside, the prior in which they carry their own scatter, and the posterior mode under it. */
export type Screened = {
  flagged: ReadonlySet<number>;
  prior: Prior;
  mode: Mode;
  /** Of each note against all others, under the freer curves. */
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
  const judging = residualCovariance(firstMidi, count, belief, judgingCurveScale);
  const flagged = new Set<number>();
  const limit = Math.max(1, Math.floor(evidence.length * largestFlaggedShare));
  let judged = judge(firstMidi, count, judging, evidence, flagged, start);
  for (;;) {
    const run = worstRun(evidence, judged.mode, judged.band, flagged);
    if (run === null || flagged.size + run.length > limit) break;
    for (const i of run) flagged.add(i);
    judged = judge(firstMidi, count, judging, evidence, flagged, judged.mode.effects);
    const belonging = run.filter((i) => Math.abs(judged.residuals[i]?.z ?? belongsZ) < belongsZ);
    if (belonging.length > 0 && belonging.length < run.length) {
      for (const i of belonging) flagged.delete(i);
      judged = judge(firstMidi, count, judging, evidence, flagged, judged.mode.effects);
    }
  }
  const residual = withSetAside(residualCovariance(firstMidi, count, belief), count, evidence, flagged);
  const prior = { firstMidi, count, residual };
  return {
    flagged,
    prior,
    mode: findMode(prior, evidence, judged.mode.effects),
    residuals: judged.residuals,
  };
}

type Judged = { mode: Mode; band: Float64Array; residuals: DeletedResidual[] };

function judge(
  firstMidi: number,
  count: number,
  judging: Float64Array,
  evidence: readonly Evidence[],
  flagged: ReadonlySet<number>,
  start?: Float64Array,
): Judged {
  const residual = withSetAside(judging, count, evidence, flagged);
  const mode = findMode({ firstMidi, count, residual }, evidence, start);
  const band = flagBand(mode);
  return { mode, band, residuals: deletedResiduals(evidence, mode, band, flagged, setAsideSigma) };
}

function withSetAside(
  residual: Float64Array,
  count: number,
  evidence: readonly Evidence[],
  flagged: ReadonlySet<number>,
): Float64Array {
  const widened = Float64Array.from(residual);
  evidence.forEach(({ key }, i) => {
    if (flagged.has(i)) widened[key * count + key] = at(widened, key * count + key) + setAsideSigma ** 2;
  });
  return widened;
}
