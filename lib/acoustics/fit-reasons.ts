import { irregularitySigma } from "./fit-prior";
import type { FitState } from "./fit-state";
import { centsBetween } from "./keys";
import { inharmonicCents } from "./partials";
import type { Rejection } from "./types";

/** Readings nearer to the curve than this are merely off it: no other partial or note is so near. */
const LEAST_MISTAKE_CENTS = 30;
const NEIGHBOUR_TOLERANCE_CENTS = 20;
const HIGHEST_MISTAKEN_PARTIAL = 40;

type Curve = { f1Hz: number; b: number; midi: number };

/**
 * Name the likely mistake behind a rejected reading: the frequency of another partial of this string, a partial of a
 * note one or two keys away, or neither. `residualCents` is its distance from the fitted curve at `partial`.
 */
function reasonFor(partial: number, hz: number, residualCents: number, curve: Curve): Rejection {
  const rejection: Rejection = { partial, reason: "off-curve", residualCents };
  if (Math.abs(residualCents) < LEAST_MISTAKE_CENTS) return rejection;
  const other = nearestPartial(partial, hz, curve);
  if (other !== null) return { ...rejection, reason: "wrong-partial-number", fitsPartial: other };
  const keys = Math.round(residualCents / 100);
  if (Math.abs(keys) <= 2 && Math.abs(residualCents - 100 * keys) <= NEIGHBOUR_TOLERANCE_CENTS) {
    return { ...rejection, reason: "neighbouring-note", fitsMidi: curve.midi + keys };
  }
  return rejection;
}

function nearestPartial(partial: number, hz: number, { f1Hz, b, midi }: Curve): number | null {
  const aboveF1 = centsBetween(f1Hz, hz);
  let best: number | null = null;
  let bestDistance = Math.max(6, 6 * irregularitySigma(midi));
  for (let n = 1; n <= HIGHEST_MISTAKEN_PARTIAL; n += 1) {
    if (n === partial || !(1 + b * n * n > 0)) continue;
    const distance = Math.abs(aboveF1 - 1200 * Math.log2(n) - inharmonicCents(n, b));
    if (distance < bestDistance) {
      best = n;
      bestDistance = distance;
    }
  }
  return best;
}

/** Why reading `i` is not used, with its distance from the curve. */
export function rejectionOf(
  partial: number,
  residualCents: number,
  state: FitState,
  i: number,
  curve: { f1Hz: number; b: number },
): Rejection {
  const aside = state.setAside.get(i);
  if (aside === "dropped-by-hand" || aside === "beyond-range")
    return { partial, reason: aside, residualCents };
  const found = reasonFor(partial, state.frequencies[i] ?? 0, residualCents, { ...curve, midi: state.midi });
  return aside === "duplicate" && found.reason === "off-curve" ? { ...found, reason: "duplicate" } : found;
}
