import { v7 } from "uuid";

/** Chance from a fixed seed: the demo is the same on every machine. */
export type Chance = {
  uniform(): number;
  normal(): number;
  /** A whole number from `low` to `high`, both included. */
  whole(low: number, high: number): number;
  pick<T>(items: readonly T[]): T;
  /** A UUIDv7 as if made at this instant. */
  id(at: Date): string;
};

/** Mulberry32 for the uniform numbers, Box–Muller for the normal ones. */
export function chance(seed: number): Chance {
  let state = seed >>> 0;
  const uniform = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  const whole = (low: number, high: number) => low + Math.floor(uniform() * (high - low + 1));
  return {
    uniform,
    whole,
    normal: () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
    pick: <T>(items: readonly T[]) => {
      const item = items[whole(0, items.length - 1)];
      if (item === undefined) throw new Error("Nothing to pick from");
      return item;
    },
    id: (at) => v7({ msecs: at.getTime(), random: Uint8Array.from({ length: 16 }, () => whole(0, 255)) }),
  };
}
