/** Invented sheets of one string each, with known truth, for simulations. */
import { typicalB } from "@/lib/acoustics/fit-prior";
import { equalTemperedHz } from "@/lib/acoustics/keys";
import { inharmonicCents, partialHzFromF1 } from "@/lib/acoustics/partials";
import type { Reading } from "@/lib/acoustics/types";
import type { Random } from "./simulated-instrument";

export type TrueString = { midi: number; f1Hz: number; b: number; partials: number[] };

export type RandomSheet = TrueString & { readings: Reading[]; sigmas: number[] };

/** A string of a random key with 6 to 12 partials, or `count`. */
export function randomString({ uniform, normal }: Random, count?: number): TrueString {
  const midi = 21 + Math.floor(75 * uniform());
  const size = count ?? 6 + Math.floor(7 * uniform());
  return {
    midi,
    f1Hz: equalTemperedHz(midi) * 2 ** ((10 * normal()) / 1200),
    b: typicalB(midi) * Math.exp(0.4 * normal()),
    partials: Array.from({ length: size }, (_, index) => index + 1),
  };
}

/** Readings with normal errors; `told` gives σ with each reading, and `shift` adds cents to one of them. */
export function sheetOf(
  { normal }: Random,
  string: TrueString,
  sigmas: number[],
  told: boolean,
  shift?: { index: number; cents: number },
): RandomSheet {
  const readings = string.partials.map((partial, index): Reading => {
    const sigma = sigmas[index] ?? 1;
    const error = sigma * normal() + (shift?.index === index ? shift.cents : 0);
    const hz = partialHzFromF1(partial, string.f1Hz, string.b) * 2 ** (error / 1200);
    return told ? { partial, hz, sigmaCents: sigma } : { partial, hz };
  });
  return { ...string, readings, sigmas };
}

/**
 * Cramér–Rao bound of σ(B) for readings with normal errors, from the 2×2 Fisher matrix over (cents of f1, B) with numeric
 * derivatives of the law: deliberately another path than the fit's own.
 */
export function boundOfB(partials: readonly number[], sigmas: readonly number[], b: number): number {
  let cc = 0;
  let cb = 0;
  let bb = 0;
  partials.forEach((n, index) => {
    const w = (sigmas[index] ?? 1) ** -2;
    const h = 1e-4 * b;
    const slope = (inharmonicCents(n, b + h) - inharmonicCents(n, b - h)) / (2 * h);
    cc += w;
    cb += w * slope;
    bb += w * slope * slope;
  });
  return Math.sqrt(cc / (cc * bb - cb * cb));
}
