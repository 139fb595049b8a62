import { describe, expect, it } from "vitest";
import reference from "@/tests/reference/scipy-fits.json";
import {
  chiSquareUpperTail,
  lnGamma,
  normalQuantile,
  studentQuantile,
  studentTwoSided,
} from "./distributions";
import { adjustedPValues } from "./false-discovery";
import { commonVariance, digamma, trigamma } from "./moderated-variance";

// Values: scripts/reference/scipy-fits.py with Debian's python3-scipy.
describe("distributions against scipy", () => {
  it.each(reference.studentQuantiles)("Student's t: $twoSided with $dof degrees", ({ twoSided, dof, t }) => {
    // scipy's own inversion is good to a few parts in 10⁹.
    expect(studentQuantile(twoSided, dof) / t).toBeCloseTo(1, 7);
    expect(studentTwoSided(t, dof) / twoSided).toBeCloseTo(1, 7);
    expect(studentTwoSided(-t, dof)).toBe(studentTwoSided(t, dof));
  });

  it.each([0.5, 0.05, 1e-3, 1e-6])("Student's t in closed form with one and two degrees: %f", (p) => {
    expect(studentQuantile(p, 1) * Math.tan((Math.PI * p) / 2)).toBeCloseTo(1, 12);
    expect(studentQuantile(p, 2) / ((1 - p) * Math.sqrt(2 / (p * (2 - p))))).toBeCloseTo(1, 12);
  });

  it.each(reference.normalQuantiles)("normal: $twoSided", ({ twoSided, z }) => {
    expect(normalQuantile(twoSided) / z).toBeCloseTo(1, 9);
  });

  it.each(reference.chiSquareTails)("χ²: $value with $dof degrees", ({ value, dof, upperTail }) => {
    expect(chiSquareUpperTail(value, dof)).toBeCloseTo(upperTail, 12);
  });

  it("false-discovery adjustment of p-values in any order", () => {
    const { pValues, adjusted } = reference.adjustedPValues;
    adjustedPValues(pValues).forEach((p, index) => {
      expect(p).toBeCloseTo(adjusted[index] ?? Number.NaN, 14);
    });
    expect(adjustedPValues([])).toEqual([]);
  });
});

describe("special functions", () => {
  it("have their known values", () => {
    expect(lnGamma(0.5)).toBeCloseTo(0.5 * Math.log(Math.PI), 13);
    expect(lnGamma(11)).toBeCloseTo(Math.log(3628800), 12);
    expect(digamma(1)).toBeCloseTo(-0.5772156649015329, 11);
    expect(trigamma(1)).toBeCloseTo(Math.PI ** 2 / 6, 11);
    expect(trigamma(0.5)).toBeCloseTo(Math.PI ** 2 / 2, 11);
  });
});

describe("the variance many small groups have in common", () => {
  it("is theirs, with all weight, when they differ by no more than chance", () => {
    const groups = [0.8, 1.1, 1.2, 0.9, 1, 1.05].map((variance) => ({ variance, dof: 6 }));
    const common = commonVariance(groups, 1e-6);
    expect(common?.dof).toBe(200);
    expect(common?.variance).toBeGreaterThan(0.9);
    expect(common?.variance).toBeLessThan(1.3);
  });

  it("weighs little when they differ widely, and is not made from two groups", () => {
    const groups = [0.01, 10, 0.1, 3, 0.03, 1].map((variance) => ({ variance, dof: 10 }));
    expect(commonVariance(groups, 1e-6)?.dof).toBeLessThan(2);
    expect(commonVariance(groups.slice(0, 2), 1e-6)).toBeNull();
  });
});
