import { assumedSigma } from "@/lib/acoustics";

const Z95 = 1.96;

/** Half-width within which 95 of 100 honest readings of this key lie about the curve, cents. */
export function expectedHalfCents(midi: number): number {
  return Z95 * assumedSigma(midi);
}
