import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit } from "./fit";
import type { FitResult, Reading } from "./types";

const string = fc.record({
  f1Hz: fc.double({ min: 27, max: 4200, noNaN: true }),
  b: fc.double({ min: 5e-5, max: 0.02, noNaN: true }),
  count: fc.integer({ min: 4, max: 10 }),
  errors: fc.array(fc.double({ min: -1.5, max: 1.5, noNaN: true }), { minLength: 10, maxLength: 10 }),
});

type DrawnString = { f1Hz: number; b: number; count: number; errors: number[] };

function readingsOf({ f1Hz, b, count, errors }: DrawnString): Reading[] {
  return Array.from({ length: count }, (_, i) => ({
    partial: i + 1,
    hz: (i + 1) * f1Hz * Math.sqrt((1 + b * (i + 1) ** 2) / (1 + b)) * 2 ** ((errors[i] ?? 0) / 1200),
    sigmaCents: 1,
  }));
}

function numbersIn(result: FitResult): number[] {
  const { f1Hz, f1SigmaCents, b, bSigma, bLow, bHigh, correlation, rmsCents, chi2 } = result;
  return [
    f1Hz,
    f1SigmaCents,
    rmsCents,
    chi2,
    ...[b, bSigma, bLow, bHigh, correlation].filter((value) => value !== null),
    ...result.residuals.map(({ cents }) => cents),
    ...result.rejected.map(({ residualCents }) => residualCents),
  ];
}

describe("the fit", () => {
  it("does not care about the unit of frequency: B stays, f1 scales", () => {
    fc.assert(
      fc.property(string, fc.double({ min: 0.25, max: 4, noNaN: true }), (drawn, factor) => {
        const readings = readingsOf(drawn);
        const scaled = readings.map((each) => ({ ...each, hz: (each.hz ?? 0) * factor }));
        const before = fit({ midi: 60, readings });
        const after = fit({ midi: 60, readings: scaled });
        expect(after.used).toEqual(before.used);
        expect(Math.abs((after.b ?? 0) - (before.b ?? 0))).toBeLessThan(1e-9 * (before.bSigma ?? 1));
        expect(after.f1Hz / before.f1Hz / factor).toBeCloseTo(1, 11);
      }),
    );
  });

  it("does not care about the order of the readings", () => {
    const shuffled = string.chain((drawn) => {
      const readings = readingsOf(drawn);
      return fc.tuple(
        fc.constant(readings),
        fc.shuffledSubarray(readings, { minLength: readings.length, maxLength: readings.length }),
      );
    });
    fc.assert(
      fc.property(shuffled, ([readings, other]) => {
        const before = fit({ midi: 60, readings });
        const after = fit({ midi: 60, readings: other });
        expect(after.f1Hz / before.f1Hz).toBeCloseTo(1, 11);
        expect(Math.abs((after.b ?? 0) - (before.b ?? 0))).toBeLessThan(1e-8 * (before.bSigma ?? 1));
        expect([...after.used].sort()).toEqual([...before.used].sort());
        expect(after.residuals.map(({ partial }) => partial)).toEqual(other.map(({ partial }) => partial));
      }),
    );
  });

  it("accounts for every reading exactly once", () => {
    const wild = fc.array(
      fc.record({
        partial: fc.integer({ min: 1, max: 24 }),
        hz: fc.double({ min: 20, max: 9000, noNaN: true }),
      }),
      { minLength: 1, maxLength: 14 },
    );
    fc.assert(
      fc.property(wild, (readings) => {
        const { used, rejected, residuals } = fit({ readings });
        const told = [...used, ...rejected.map(({ partial }) => partial)].sort((a, b) => a - b);
        expect(told).toEqual(readings.map(({ partial }) => partial).sort((a, b) => a - b));
        expect(residuals).toHaveLength(readings.length);
      }),
      { numRuns: 400 },
    );
  });

  it("never answers with NaN or infinity, whatever numbers are typed", () => {
    const absurd = fc.array(
      fc.record(
        {
          partial: fc.integer({ min: 1, max: 128 }),
          hz: fc.oneof(
            fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
            fc.constantFrom(1e-3, 1e6, 440, 880, 1320),
          ),
          sigmaCents: fc.constantFrom(1e-4, 0.1, 1, 1200),
        },
        { requiredKeys: ["partial", "hz"] },
      ),
      { minLength: 1, maxLength: 12 },
    );
    const choice = fc.array(fc.integer({ min: 1, max: 12 }), { maxLength: 3 });
    fc.assert(
      fc.property(absurd, choice, fc.option(fc.integer({ min: 0, max: 127 })), (readings, kept, midi) => {
        const result = fit({ readings, kept, ...(midi === null ? {} : { midi }) });
        for (const value of numbersIn(result)) expect(Number.isFinite(value)).toBe(true);
        expect(result.used.length).toBeGreaterThan(0);
      }),
      { numRuns: 1000 },
    );
  });

  it("lets a person's choice win", () => {
    fc.assert(
      fc.property(
        string,
        fc.integer({ min: 1, max: 10 }),
        fc.integer({ min: 1, max: 10 }),
        (drawn, keep, drop) => {
          fc.pre(keep !== drop && keep <= drawn.count);
          const readings = readingsOf(drawn).map((each) =>
            each.partial === keep ? { ...each, hz: (each.hz ?? 0) * 1.3 } : each,
          );
          const { used, rejected } = fit({ midi: 60, readings, kept: [keep], dropped: [drop] });
          expect(used).toContain(keep);
          expect(used).not.toContain(drop);
          if (drop <= drawn.count) {
            expect(rejected.find(({ partial }) => partial === drop)?.reason).toBe("dropped-by-hand");
          }
        },
      ),
    );
  });
});
