import { inferBreak } from "./keyboard-break";
import { detectableChange, flagThreshold } from "./keyboard-flags";
import { checkedKey, checkedObservations, checkedRange } from "./keyboard-input";
import { type Evidence, posteriorOverKeys } from "./keyboard-posterior";
import { assumedBreakMidi, knownBreak, priorBreakBelief } from "./keyboard-prior";
import { screen } from "./keyboard-screen";
import { at } from "./linear-algebra";
import type { KeyboardInput, KeyboardResult, KeyEstimate, Observation } from "./types";

const z95 = 1.959964;
/** Above this relative error the logarithm of an estimate is no longer nearly normal. */
const largestLogSigma = 0.3;
/** No string has B below zero: a reading further below than this many σ is in error by more than its σ says. */
const deepestZ = 2;
/** No string's B is known better than this, whatever its sheet says: 0.3 %. */
const smallestLogSigma = 0.003;

/**
 * B of every key from the keys measured so far, from none to all.
 *
 * Input: observations of B with one σ each (any order; B ≤ 0 or σ > 0.3·B is read on the linear scale); `breakMidi`, the lowest
 * key on the treble bridge, inferred when absent. Output: per key the median B with its 95 % ends, σ of ln B, and for
 * measured keys the residual z against all others and the change of B this sheet would have shown; covariance of ln B,
 * keys × keys. `z` is null for keys not measured and for readings on the linear scale.
 * Errors: AcousticsError `unknown-key`, `not-finite`, `not-positive`, `negative`, `range-order`.
 * Sources: Rigaud, David & Daudet 2013, JASA 133:3107 (mean curve; parameters from memory); Rasmussen & Williams 2006.
 */
export function keyboard(input: KeyboardInput): KeyboardResult {
  const range = checkedRange(input);
  const observations = checkedObservations(input.observations, range);
  const given = input.breakMidi === undefined ? null : checkedKey(input.breakMidi, "breakMidi", range);
  const { firstMidi } = range;
  const count = range.lastMidi - firstMidi + 1;
  const evidence = observations.map((observation) => asEvidence(observation, firstMidi));

  let breakMidi = given ?? assumedBreakMidi;
  let breakSource: KeyboardResult["breakSource"] = given === null ? "assumed" : "given";
  let screened = screen(firstMidi, count, given === null ? priorBreakBelief() : knownBreak(given), evidence);
  if (given === null && evidence.length > 0) {
    const believed = evidence.filter((_, i) => !screened.flagged.has(i));
    const inference = inferBreak(firstMidi, count, believed, screened.mode.effects);
    breakMidi = inference.breakMidi;
    breakSource = inference.source;
    screened = screen(firstMidi, count, inference.belief, evidence, screened.mode.effects);
  }

  const { mean, covariance } = posteriorOverKeys(screened.prior, evidence, screened.mode);
  const threshold = flagThreshold(evidence.length);
  const measured = new Map(evidence.map((item, i) => [item.key, i]));
  const keys = Array.from({ length: count }, (_, key): KeyEstimate => {
    const lnBSigma = Math.sqrt(at(covariance, key * count + key));
    const median = at(mean, key);
    const i = measured.get(key);
    const residual = i === undefined ? undefined : screened.residuals[i];
    const estimate: KeyEstimate = {
      midi: firstMidi + key,
      b: Math.exp(median),
      bLow: Math.exp(median - z95 * lnBSigma),
      bHigh: Math.exp(median + z95 * lnBSigma),
      lnBSigma,
      source: i === undefined ? "predicted" : "measured",
      flag: i !== undefined && screened.flagged.has(i) ? "does-not-belong" : null,
      z: residual?.z ?? null,
      expectedB:
        i === undefined || !residual || residual.z === null
          ? null
          : Math.exp((evidence[i]?.value ?? median) - residual.z * residual.sigma),
      detectableChange:
        residual === undefined || residual.z === null ? null : detectableChange(residual.sigma, threshold),
    };
    const residualCents = i === undefined ? undefined : observations[i]?.residualCents;
    return residualCents === undefined ? estimate : { ...estimate, residualCents };
  });
  return {
    breakMidi,
    breakSource,
    priorOnly: evidence.length === 0,
    keys,
    covariance: Array.from({ length: count }, (_, row) =>
      Array.from(covariance.subarray(row * count, (row + 1) * count)),
    ),
  };
}

function asEvidence({ midi, b, bSigma }: Observation, firstMidi: number): Evidence {
  const key = midi - firstMidi;
  if (b <= 0) return { key, scale: "linear", value: b, sigma: Math.max(bSigma, -b / deepestZ) };
  if (bSigma / b > largestLogSigma) return { key, scale: "linear", value: b, sigma: bSigma };
  return { key, scale: "log", value: Math.log(b), sigma: Math.max(bSigma / b, smallestLogSigma) };
}
