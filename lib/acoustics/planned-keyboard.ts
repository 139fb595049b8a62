import { keyboard } from "./keyboard";
import type { KeyboardInput, KeyboardResult } from "./types";

/**
 * B of all keys as read (`curve`), and as a plan takes them (`planned`). A note that does not belong informs no other,
 * and until it is read again its own reading is in doubt: the plan takes what its neighbours foretell of it.
 *
 * Input, units and errors as in `keyboard`.
 */
export function plannedKeyboard(input: KeyboardInput): { curve: KeyboardResult; planned: KeyboardResult } {
  const curve = keyboard(input);
  const flagged = new Set(curve.keys.filter(({ flag }) => flag !== null).map(({ midi }) => midi));
  if (flagged.size === 0) return { curve, planned: curve };
  const belonging = input.observations.filter(({ midi }) => !flagged.has(midi));
  return { curve, planned: keyboard({ ...input, observations: belonging }) };
}
