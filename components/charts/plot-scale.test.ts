import { describe, expect, it } from "vitest";
import { logRange, logScale, logTicks, symmetricRange, symmetricScale } from "./plot-scale";

describe("the logarithmic axis of B", () => {
  it("ticks 1, 2, 3 and 5 of every decade within the range", () => {
    expect(logTicks(0.00007, 0.03)).toEqual([
      0.0001, 0.0002, 0.0003, 0.0005, 0.001, 0.002, 0.003, 0.005, 0.01, 0.02, 0.03,
    ]);
  });

  it("gives no ticks for a range that has no logarithm", () => {
    expect(logTicks(0, 1)).toEqual([]);
    expect(logTicks(-1, 1)).toEqual([]);
    expect(logTicks(1, 1)).toEqual([]);
  });

  it("labels decades only, in plain decimals, and all ticks where a range holds less than two", () => {
    const wide = logScale([1e-4, 0.02]);
    expect(wide.ticks.filter((tick) => tick.label).map((tick) => tick.label)).toEqual([
      "0.0001",
      "0.001",
      "0.01",
    ]);
    const narrow = logScale([], { low: 0.0002, high: 0.0012 });
    expect(narrow.ticks.map((tick) => tick.label)).toEqual(["0.0002", "0.0003", "0.0005", "0.001"]);
  });

  it("keeps all values inside and gives every decade the same height", () => {
    const scale = logScale([1.1e-4, 0.027]);
    expect(scale.low).toBeLessThan(1.1e-4);
    expect(scale.high).toBeGreaterThan(0.027);
    const decade = scale.y(1e-4, 276) - scale.y(1e-3, 276);
    expect(scale.y(1e-3, 276) - scale.y(1e-2, 276)).toBeCloseTo(decade, 9);
    expect(scale.y(scale.low, 276)).toBeCloseTo(276, 9);
    expect(scale.y(scale.high, 276)).toBeCloseTo(0, 9);
  });

  it("does not let a B of zero or below, which readings can give, break the axis", () => {
    const { low, high } = logRange([-1e-5, 0, 2e-4, Number.NaN]);
    expect(low).toBeGreaterThan(0);
    expect(high / low).toBeGreaterThanOrEqual(10);
    expect(Number.isFinite(logScale([2e-4]).y(-1e-5, 276))).toBe(true);
    expect(logRange([]).low).toBeGreaterThan(0);
  });
});

describe("the axis of cents", () => {
  it("is symmetric about zero whatever the data", () => {
    for (const values of [[3], [-13.5, 43.7], [-40], [], [0]]) {
      const scale = symmetricScale(values);
      expect(scale.low).toBe(-scale.high);
      expect(scale.y(0, 188)).toBeCloseTo(94, 9);
      const ticks = scale.ticks.map((tick) => tick.value);
      expect(ticks.map((value) => (value === 0 ? 0 : -value)).toReversed()).toEqual(
        ticks.map((value) => (value === 0 ? 0 : value)),
      );
    }
  });

  it("leaves air above the outermost value and labels one to three lines a side", () => {
    for (const largest of [0.05, 0.4, 1, 3, 7, 12, 33, 50, 99, 240, 1200]) {
      const { limit, step } = symmetricRange(largest);
      expect(limit).toBeGreaterThan(largest);
      expect(limit / step).toBeGreaterThanOrEqual(1);
      expect(limit / step).toBeLessThan(3.5);
    }
  });

  it("signs its labels, with a bare zero", () => {
    expect(symmetricScale([50]).ticks.map((tick) => tick.label)).toEqual(["−40", "−20", "0", "+20", "+40"]);
  });

  it("does not blow up a quiet plot", () => {
    expect(symmetricRange(0.3, 20).limit).toBeGreaterThan(20);
  });
});
