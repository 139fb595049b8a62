import { levenbergMarquardt } from "ml-levenberg-marquardt";
import { describe, expect, it } from "vitest";
import reference from "@/tests/reference/scipy-fits.json";
import { randomString, sheetOf } from "@/tests/support/random-sheets";
import { seededRandom } from "@/tests/support/simulated-instrument";
import { fit } from "./fit";
import { type Sheet, solve } from "./fit-core";
import { CENTS_PER_LN_SQUARE } from "./partials";

describe("the fit against scipy", () => {
  it.each(reference.fits)("gives the estimate and covariance of its least squares (key $midi)", (each) => {
    // Values: scripts/reference/scipy-fits.py with Debian's python3-scipy.
    const result = fit(each);
    expect(result.rejected).toEqual([]);
    expect(result.f1Hz / each.expected.f1Hz).toBeCloseTo(1, 9);
    expect((result.b ?? 0) / each.expected.b).toBeCloseTo(1, 6);
    expect(result.f1SigmaCents / each.expected.f1SigmaCents).toBeCloseTo(1, 5);
    expect((result.bSigma ?? 0) / each.expected.bSigma).toBeCloseTo(1, 5);
    expect(result.correlation).toBeCloseTo(each.expected.correlation, 5);
    expect(result.chi2).toBeCloseTo(each.expected.chi2, 7);
  });
});

describe("the fit against a general least-squares library", () => {
  it("gives the same B to a millionth on 200 clean sheets", () => {
    const random = seededRandom(700);
    let compared = 0;
    for (let k = 0; k < 200; k += 1) {
      const string = randomString(random);
      const { readings, midi } = sheetOf(
        random,
        string,
        string.partials.map(() => 0.5),
        true,
      );
      const own = fit({ midi, readings });
      if (own.rejected.length > 0) continue;
      const x = readings.map(({ partial }) => partial);
      const y = readings.map(({ partial, hz = 0 }) => 1200 * Math.log2(hz / partial / string.f1Hz));
      const scale = string.b;
      const general = levenbergMarquardt(
        { x, y },
        ([c = 0, u = 0]) =>
          (n) =>
            c + CENTS_PER_LN_SQUARE * Math.log((1 + u * scale * n * n) / (1 + u * scale)),
        {
          initialValues: [0, 0.8],
          jacobianFunction:
            ([, u = 0]) =>
            (n) => [
              1,
              (CENTS_PER_LN_SQUARE * scale * (n * n - 1)) / ((1 + u * scale * n * n) * (1 + u * scale)),
            ],
          damping: 1e-3,
          maxIterations: 60,
          errorTolerance: 1e-14,
        },
      );
      const [c = 0, u = 0] = general.parameterValues;
      expect((own.b ?? 0) / (u * scale)).toBeCloseTo(1, 6);
      expect(1200 * Math.log2(own.f1Hz / string.f1Hz)).toBeCloseTo(c, 6);
      compared += 1;
    }
    expect(compared).toBeGreaterThan(190);
  });
});

describe("the solver", () => {
  const random = seededRandom(800);
  const partials = [1, 2, 3, 5, 7, 8, 11];
  const b = 4e-4;
  const sheet: Sheet = {
    count: partials.length,
    squares: Float64Array.from(partials, (n) => n * n),
    cents: Float64Array.from(
      partials,
      (n) => CENTS_PER_LN_SQUARE * Math.log((1 + b * n * n) / (1 + b)) + 0.8 * random.normal(),
    ),
    weights: Float64Array.from(partials, () => 0.5 + random.uniform()),
  };
  const everything = new Uint8Array(partials.length).fill(1);

  function chi2(c: number, at: number): number {
    return partials.reduce((sum, n, i) => {
      const r = (sheet.cents[i] ?? 0) - c - CENTS_PER_LN_SQUARE * Math.log((1 + at * n * n) / (1 + at));
      return sum + (sheet.weights[i] ?? 0) * r * r;
    }, 0);
  }

  it("stops where χ² is least, by numeric derivatives", () => {
    const found = solve(sheet, everything, 1e-4);
    const least = chi2(found.c, found.b);
    expect(found.chi2).toBeCloseTo(least, 10);
    for (const [dc, db] of [
      [1e-3, 0],
      [-1e-3, 0],
      [0, 1e-7],
      [0, -1e-7],
      [1e-3, -1e-7],
      [-1e-3, 1e-7],
    ] as const) {
      expect(chi2(found.c + dc, found.b + db)).toBeGreaterThan(least);
    }
    const slopeC = (chi2(found.c + 1e-4, found.b) - chi2(found.c - 1e-4, found.b)) / 2e-4;
    const slopeB = (chi2(found.c, found.b + 1e-8) - chi2(found.c, found.b - 1e-8)) / 2e-8;
    expect(Math.abs(slopeC)).toBeLessThan(1e-6);
    expect(Math.abs(slopeB) / found.information).toBeLessThan(1e-7);
  });

  it("has the information about B that the curvature of the projected χ² shows", () => {
    const found = solve(sheet, everything, 1e-4);
    // With exact data the Gauss-Newton information is the curvature; here residuals of a cent change it by a few per mille.
    const projected = (at: number) => {
      const total = sheet.weights.reduce((sum, w) => sum + w, 0);
      const c =
        partials.reduce((sum, n, i) => {
          const r = (sheet.cents[i] ?? 0) - CENTS_PER_LN_SQUARE * Math.log((1 + at * n * n) / (1 + at));
          return sum + (sheet.weights[i] ?? 0) * r;
        }, 0) / total;
      return chi2(c, at);
    };
    const h = 2e-6;
    const curvature =
      (projected(found.b + h) - 2 * projected(found.b) + projected(found.b - h)) / (2 * h * h);
    expect(curvature / found.information).toBeGreaterThan(0.98);
    expect(curvature / found.information).toBeLessThan(1.02);
  });

  it.each([-1e-3, 0, 1e-4, 1e-2, 0.2])("finds the same B from a start at %f", (start) => {
    expect(solve(sheet, everything, start).b).toBeCloseTo(solve(sheet, everything, b).b, 12);
  });

  it("leaving one reading out is leaving it out", () => {
    const mask = everything.slice();
    mask[3] = 0;
    const { iterations: _, ...skipped } = solve(sheet, everything, b, 3);
    const { iterations: __, ...masked } = solve(sheet, mask, b);
    expect(skipped).toEqual(masked);
  });
});
