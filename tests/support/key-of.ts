import type { KeyboardResult, KeyEstimate } from "@/lib/acoustics/types";

/** The estimate of one key; throws when the keyboard does not have it. */
export function keyOf(result: KeyboardResult, midi: number): KeyEstimate {
  const key = result.keys.find((candidate) => candidate.midi === midi);
  if (key === undefined) throw new Error(`No key ${midi}`);
  return key;
}
