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

export type HistoryMeasures = {
  /** The string's distance from the right edge: humidity stands between. */
  stringFromRight: number;
  /** Longest deviation drawn, to either side. */
  reach: number;
  /** Free to the left of the string, right of the dates, and to the right of it, left of the humidity. */
  leftRoom: number;
  rightRoom: number;
};

const DATE = 88;
const HUMIDITY = 38;
/** A number such as −12.5 with its distance from the mark. */
const NUMBER = 44;

export function historyMeasures(width: number): HistoryMeasures {
  const narrow = width < 300;
  const stringFromRight = narrow ? 96 : 118;
  return {
    stringFromRight,
    reach: narrow ? 36 : 62,
    leftRoom: width - stringFromRight - DATE,
    rightRoom: stringFromRight - HUMIDITY,
  };
}

/** Beyond its mark where there is room, else on the free side of the string: −1 left, 1 right. */
export function numberSide(offset: number, measures: HistoryMeasures): -1 | 1 {
  const way = offset < 0 ? -1 : 1;
  const room = way < 0 ? measures.leftRoom : measures.rightRoom;
  if (Math.abs(offset) + NUMBER <= room) return way;
  return way < 0 ? 1 : -1;
}
