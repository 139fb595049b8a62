/** Scale of the history's pitch column: set by the usual visit, so that one pitch raise does not flatten the rest. */

const LIMITS = [12.5, 25, 50, 100, 200];
/** Share of the visits that must be drawn to scale; those beyond become an arrow with their number. */
const TO_SCALE = 0.8;

export function historyLimit(values: readonly number[]): number {
  const sizes = values.map(Math.abs).sort((a, b) => a - b);
  const wanted = sizes[Math.max(0, Math.ceil(sizes.length * TO_SCALE) - 1)] ?? 0;
  return LIMITS.find((limit) => wanted <= limit) ?? wanted;
}

export type HistoryPlace = { offset: number; beyond: boolean };

/** Pixels from the string, at most `reach`. */
export function historyPlace(cents: number, limit: number, reach: number): HistoryPlace {
  const offset = (cents / limit) * reach;
  return Math.abs(offset) <= reach
    ? { offset, beyond: false }
    : { offset: Math.sign(offset) * reach, beyond: true };
}
