import { plainDecimal, signed } from "./format";

/** Value axes of the plots: their range, their ticks, and the pixel of a value. */

export type Tick = {
  value: number;
  /** Null for a tick without words between labelled lines. */
  label: string | null;
  /** A line across the plot; else a short tick on the axis. */
  line: boolean;
};

export type ValueScale = {
  low: number;
  high: number;
  log: boolean;
  ticks: readonly Tick[];
  /** Pixel from the top of a plotting area of this height. */
  y: (value: number, height: number) => number;
};

/** 1, 2, 3 and 5 of every decade inside the range. */
export function logTicks(low: number, high: number): number[] {
  if (!(low > 0) || !(high > low)) return [];
  const ticks: number[] = [];
  for (let decade = Math.floor(Math.log10(low)); decade <= Math.ceil(Math.log10(high)); decade++) {
    for (const step of [1, 2, 3, 5]) {
      const value = Number(`${step}e${decade}`);
      if (value >= low && value <= high) ticks.push(value);
    }
  }
  return ticks;
}

const isDecade = (value: number) => {
  const power = Math.log10(value);
  return Math.abs(power - Math.round(power)) < 1e-9;
};

/** Range of a log axis around positive values, with a little air; values at or below zero have no place on it. */
export function logRange(values: readonly number[]): { low: number; high: number } {
  const usable = values.filter((value) => value > 0 && Number.isFinite(value));
  if (usable.length === 0) return { low: 5e-5, high: 0.03 };
  const low = Math.min(...usable);
  const high = Math.max(...usable);
  const air = 10 ** Math.max(0.06, 0.06 * Math.log10(high / low));
  const widened = high / low < 10 ? Math.sqrt(10 / (high / low)) : 1;
  return { low: low / air / widened, high: high * air * widened };
}

export function logScale(values: readonly number[], given: { low?: number; high?: number } = {}): ValueScale {
  const found = logRange(values);
  const low = given.low ?? found.low;
  const high = given.high ?? found.high;
  const values1235 = logTicks(low, high);
  const decadesOnly = values1235.filter(isDecade).length >= 2;
  const ticks = values1235.map((value): Tick => {
    const labelled = decadesOnly ? isDecade(value) : true;
    return { value, label: labelled ? plainDecimal(value) : null, line: labelled };
  });
  const span = Math.log(high / low);
  return {
    low,
    high,
    log: true,
    ticks,
    y: (value, height) => height * (1 - Math.log(Math.max(value, low * 1e-3) / low) / span),
  };
}

const NICE = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 500, 1000];

/** Symmetric about zero with one to three labelled lines a side; the limit leaves air above the outermost value. */
export function symmetricRange(largest: number, atLeast = 0): { limit: number; step: number } {
  const wanted = Number.isFinite(largest)
    ? Math.max(Math.abs(largest), atLeast, 0.1)
    : Math.max(atLeast, 0.1);
  const limit = wanted * 1.12;
  const step = NICE.find((nice) => limit / nice < 3.5) ?? 10 ** Math.ceil(Math.log10(limit / 3));
  return { limit: Math.max(limit, step * 1.25), step };
}

export function symmetricScale(values: readonly number[], atLeast = 0): ValueScale {
  const largest = Math.max(0, ...values.filter(Number.isFinite).map(Math.abs));
  const { limit, step } = symmetricRange(largest, atLeast);
  const ticks: Tick[] = [];
  const count = Math.floor(limit / step + 1e-9);
  const decimals = step < 1 ? 1 : 0;
  for (let index = -count; index <= count; index++) {
    const value = index * step;
    ticks.push({ value, label: index === 0 ? "0" : signed(value, decimals), line: true });
  }
  return {
    low: -limit,
    high: limit,
    log: false,
    ticks,
    y: (value, height) => (height * (limit - value)) / (2 * limit),
  };
}
