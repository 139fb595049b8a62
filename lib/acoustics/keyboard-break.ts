import { type Evidence, findMode } from "./keyboard-posterior";
import {
  assumedBreakMidi,
  type BreakBelief,
  knownBreak,
  priorBreakBelief,
  residualCovariance,
} from "./keyboard-prior";

export type BreakInference = { belief: BreakBelief; breakMidi: number; source: "inferred" | "assumed" };

/** Notes this far outside the candidates still tell a jump from a slope. */
const marginKeys = 12;
/** Share of belief that the gap between two measured notes must hold for the break to count as found. */
const foundShare = 0.6;

/**
 * Posterior over the break: prior times the evidence of the notes near it under each division of those notes between the
 * bridges. Breaks between the same two measured notes divide them alike, so one evidence serves all of them.
 */
export function inferBreak(
  firstMidi: number,
  count: number,
  evidence: readonly Evidence[],
  effects: Float64Array,
): BreakInference {
  const prior = priorBreakBelief();
  const lastCandidate = prior.firstMidi + prior.weights.length - 1;
  const near = evidence.filter(({ key, scale }) => {
    const midi = firstMidi + key;
    return scale === "log" && midi >= prior.firstMidi - marginKeys && midi <= lastCandidate + marginKeys;
  });
  const groups = prior.weights.map(
    (_, i) => near.filter(({ key }) => firstMidi + key < prior.firstMidi + i).length,
  );
  const oneBridge = residualCovariance(firstMidi, count, knownBreak(firstMidi));
  const logs = new Map<number, number>();
  groups.forEach((group, i) => {
    if (logs.has(group)) return;
    const residual = divided(oneBridge, near, count, prior.firstMidi + i - firstMidi);
    logs.set(group, findMode({ firstMidi, count, residual }, near, effects, 2).logEvidence);
  });
  if (logs.size < 2) return { belief: prior, breakMidi: assumedBreakMidi, source: "assumed" };
  const best = Math.max(...logs.values());
  const raw = prior.weights.map((weight, i) => weight * Math.exp((logs.get(groups[i] ?? 0) ?? best) - best));
  const total = raw.reduce((sum, weight) => sum + weight, 0);
  const belief = { firstMidi: prior.firstMidi, weights: raw.map((weight) => weight / total) };
  const breakMidi = mostProbable(belief);
  const group = groups[breakMidi - prior.firstMidi];
  const share = belief.weights.reduce((sum, weight, i) => sum + (groups[i] === group ? weight : 0), 0);
  return share >= foundShare
    ? { belief, breakMidi, source: "inferred" }
    : { belief, breakMidi: assumedBreakMidi, source: "assumed" };
}

function mostProbable(belief: BreakBelief): number {
  return belief.firstMidi + belief.weights.indexOf(Math.max(...belief.weights));
}

/** The covariance of one bridge with what crosses the break set to zero, at the observed keys only. */
function divided(
  oneBridge: Float64Array,
  evidence: readonly Evidence[],
  count: number,
  breakKey: number,
): Float64Array {
  const residual = Float64Array.from(oneBridge);
  for (const { key: bass } of evidence) {
    if (bass >= breakKey) continue;
    for (const { key: treble } of evidence) {
      if (treble < breakKey) continue;
      residual[bass * count + treble] = 0;
      residual[treble * count + bass] = 0;
    }
  }
  return residual;
}
