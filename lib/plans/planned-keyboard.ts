import { keyboard } from "@/lib/acoustics";
import type { KeyboardResult, Observation } from "@/lib/acoustics/types";
import type { KeyRange } from "@/lib/readings/rules";

/**
 * B of all keys as read, and as a plan takes them: a note that does not belong informs no other, so plan and beats
 * take what its neighbours foretell of it.
 */
export function plannedKeyboard(
  observations: readonly Observation[],
  { firstMidi, lastMidi, breakMidi }: KeyRange,
): { curve: KeyboardResult; planned: KeyboardResult } {
  const curveOf = (some: readonly Observation[]) =>
    keyboard({
      observations: some,
      firstMidi,
      lastMidi,
      ...(breakMidi === null ? {} : { breakMidi }),
    });
  const curve = curveOf(observations);
  const flagged = new Set(curve.keys.filter(({ flag }) => flag !== null).map(({ midi }) => midi));
  if (flagged.size === 0) return { curve, planned: curve };
  return { curve, planned: curveOf(observations.filter(({ midi }) => !flagged.has(midi))) };
}
