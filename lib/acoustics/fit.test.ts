import { describe, expect, it } from "vitest";
import { fit } from "./fit";
import { equalTemperedHz } from "./keys";
import { partialHzFromF1 } from "./partials";
import { AcousticsError, type Reading } from "./types";

/** Small errors in cents, written down once: no test below depends on luck. */
const ERRORS = [
  0.3, -0.4, 0.1, 0.5, -0.2, -0.3, 0.4, 0, -0.5, 0.2, 0.3, -0.1, -0.3, 0.2, 0.1, -0.2, 0.4, -0.4,
];

function sheet(midi: number, b: number, partials: readonly number[], offsetCents = 0): Reading[] {
  const f1 = equalTemperedHz(midi) * 2 ** (offsetCents / 1200);
  return partials.map((partial, i) => ({
    partial,
    hz: partialHzFromF1(partial, f1, b) * 2 ** ((ERRORS[i] ?? 0) / 1200),
  }));
}

function changed(readings: readonly Reading[], partial: number, to: (hz: number) => number): Reading[] {
  return readings.map((each) => (each.partial === partial ? { ...each, hz: to(each.hz ?? 0) } : each));
}

const A2 = sheet(45, 9e-5, [1, 2, 3, 4, 5, 6, 8, 10]);
const byCents = (cents: number) => (hz: number) => hz * 2 ** (cents / 1200);

describe("a clean sheet", () => {
  it("gives pitch and B with errors, a residual for every reading, and is good", () => {
    const result = fit({ midi: 45, readings: A2 });
    expect(result.used).toEqual([1, 2, 3, 4, 5, 6, 8, 10]);
    expect(result.rejected).toEqual([]);
    expect(result.residuals.map(({ partial }) => partial)).toEqual(result.used);
    expect(1200 * Math.log2(result.f1Hz / 110)).toBeCloseTo(0, 0);
    expect(result.bLow).toBeLessThan(9e-5);
    expect(result.bHigh).toBeGreaterThan(9e-5);
    expect(result.correlation).toBeLessThan(0);
    expect(result).toMatchObject({ dof: 6, nMax: 10, quality: "good", warnings: [] });
  });

  it("is the same in cents as in Hz, at any reference pitch", () => {
    const cents = A2.map(({ partial, hz = 0 }) => ({
      partial,
      cents: 1200 * Math.log2(hz / (partial * equalTemperedHz(45, 442))),
    }));
    const fromHz = fit({ midi: 45, readings: A2 });
    const fromCents = fit({ midi: 45, referenceHz: 442, readings: cents });
    expect(fromCents.f1Hz).toBeCloseTo(fromHz.f1Hz, 9);
    expect(fromCents.b).toBeCloseTo(fromHz.b ?? 0, 12);
  });

  it("reproduces the linear and the refined estimate of a worked string", () => {
    // f0 = 219.9 Hz, B = 4.2e-4, no errors: the law itself.
    const readings = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10].map((n) => ({
      partial: n,
      hz: n * 219.9 * Math.sqrt(1 + 4.2e-4 * n * n),
      sigmaCents: 1,
    }));
    const { b, bSigma } = fit({ midi: 57, readings });
    expect(b).toBeCloseTo(4.2e-4, 12);
    // "1 cent of independent error per partial gives σ(B) = 1.17e-5 with partials 1 to 10" (worked out with numpy).
    expect(bSigma).toBeCloseTo(1.17e-5, 7);
  });

  it("leaves partials beyond the sixteenth out, unless the range or a person says otherwise", () => {
    const readings = sheet(28, 1.5e-4, [2, 4, 6, 8, 10, 12, 14, 16, 18, 20]);
    const result = fit({ midi: 28, readings });
    expect(result.nMax).toBe(16);
    expect(result.rejected).toMatchObject([
      { partial: 18, reason: "beyond-range" },
      { partial: 20, reason: "beyond-range" },
    ]);
    expect(result.quality).toBe("good");
    expect(fit({ midi: 28, readings, maxPartial: 20 }).nMax).toBe(20);
    expect(fit({ midi: 28, readings, kept: [18] }).used).toContain(18);
  });
});

describe("mistakes are named", () => {
  it("a reading off the curve", () => {
    const { rejected } = fit({ midi: 45, readings: changed(A2, 6, byCents(12)) });
    expect(rejected).toMatchObject([{ partial: 6, reason: "off-curve" }]);
    expect(rejected[0]?.residualCents).toBeCloseTo(12, -0.5);
  });

  it("a wrong partial number, with the partial it fits", () => {
    const ninth = partialHzFromF1(9, 110, 9e-5);
    const { rejected, quality } = fit({ midi: 45, readings: changed(A2, 8, () => ninth) });
    expect(rejected).toMatchObject([{ partial: 8, reason: "wrong-partial-number", fitsPartial: 9 }]);
    expect(quality).toBe("good");
  });

  it("a reading of the neighbouring key", () => {
    const neighbour = partialHzFromF1(4, equalTemperedHz(46), 9e-5);
    const { rejected } = fit({ midi: 45, readings: changed(A2, 4, () => neighbour) });
    expect(rejected).toMatchObject([{ partial: 4, reason: "neighbouring-note", fitsMidi: 46 }]);
  });

  it("a partial read twice, keeping the reading that lies on the curve", () => {
    const wrongFirst: Reading[] = [{ partial: 5, hz: 556 }, ...A2];
    const result = fit({ midi: 45, readings: wrongFirst });
    expect(result.rejected).toMatchObject([{ partial: 5, reason: "duplicate" }]);
    expect(result.rejected[0]?.residualCents).toBeGreaterThan(5);
    expect(result.used.filter((n) => n === 5)).toHaveLength(1);
    expect(result.b).toBeCloseTo(fit({ midi: 45, readings: A2 }).b ?? 0, 14);
  });

  it("two at once that hide one another", () => {
    const readings = changed(changed(A2, 8, byCents(40)), 10, byCents(45));
    const { rejected, b } = fit({ midi: 45, readings });
    expect(rejected.map(({ partial }) => partial)).toEqual([8, 10]);
    expect(Math.abs((b ?? 0) / 9e-5 - 1)).toBeLessThan(0.2);
  });

  it("three of nine", () => {
    const readings = sheet(60, 3e-4, [1, 2, 3, 4, 5, 6, 7, 8, 9]);
    const spoiled = changed(changed(changed(readings, 2, byCents(-35)), 5, byCents(60)), 9, byCents(-80));
    const { rejected, quality } = fit({ midi: 60, readings: spoiled });
    expect(rejected.map(({ partial }) => partial)).toEqual([2, 5, 9]);
    expect(quality).toBe("repeat");
  });

  it("a row that skipped a partial: every number from there on is one too low", () => {
    const skipped = sheet(57, 2.2e-4, [1, 2, 3, 4, 5, 6, 8, 9, 10]).map((each, i) => ({
      ...each,
      partial: i + 1,
    }));
    const { rejected, used, quality } = fit({ midi: 57, readings: skipped });
    expect(used).toEqual([1, 2, 3, 4, 5, 6]);
    expect(rejected).toMatchObject(
      [7, 8, 9].map((partial) => ({ partial, reason: "wrong-partial-number", fitsPartial: partial + 1 })),
    );
    expect(quality).toBe("repeat");
  });

  it("of three readings, by what is usual for the key", () => {
    const readings = changed(sheet(84, 2.4e-3, [1, 2, 3]), 2, byCents(90));
    const { rejected, quality } = fit({ midi: 84, readings });
    expect(rejected.map(({ partial }) => partial)).toEqual([2]);
    expect(quality).toBe("repeat");
  });

  it("says so when it could be one reading or another", () => {
    const readings = changed(sheet(60, 3e-4, [1, 2, 3]), 3, byCents(6)).map((each) => ({
      ...each,
      sigmaCents: 0.3,
    }));
    const { rejected, warnings, quality } = fit({ midi: 60, readings });
    expect(rejected).toEqual([]);
    expect(warnings).toContain("ambiguous-outlier");
    expect(quality).not.toBe("good");
  });
});

describe("a person's choice", () => {
  const spoiled = changed(A2, 6, byCents(12));

  it("keeps a reading the computation would reject, and the result says so", () => {
    const { rejected, used, warnings, quality } = fit({ midi: 45, readings: spoiled, kept: [6] });
    expect(rejected).toEqual([]);
    expect(used).toContain(6);
    expect(warnings).toContain("kept-off-curve");
    expect(quality).not.toBe("good");
  });

  it("drops a reading the computation would use", () => {
    const { rejected, used } = fit({ midi: 45, readings: A2, dropped: [3] });
    expect(rejected).toMatchObject([{ partial: 3, reason: "dropped-by-hand" }]);
    expect(used).not.toContain(3);
  });

  it("of dropping everything is refused", () => {
    expect(() => fit({ midi: 45, readings: A2.slice(0, 2), dropped: [1, 2] })).toThrow(
      expect.objectContaining({ code: "all-dropped" }),
    );
  });
});

describe("few readings", () => {
  it("two give B exactly, without a check", () => {
    const result = fit({ midi: 69, readings: sheet(69, 7e-4, [1, 4]) });
    expect(result.rmsCents).toBeLessThan(1e-9);
    expect(result.dof).toBe(0);
    expect(result.warnings).toContain("exact-no-check");
    expect(result.quality).toBe("repeat");
    expect(result.bSigma).toBeGreaterThan(0);
  });

  it("three give B with one degree of freedom and a wide interval", () => {
    const result = fit({ midi: 69, readings: sheet(69, 7e-4, [1, 2, 4]) });
    expect(result.warnings).toContain("few-partials");
    expect(((result.bHigh ?? 0) - (result.b ?? 0)) / (result.bSigma ?? 1)).toBeGreaterThan(2.5);
  });

  it("one gives f1 only; a higher partial is brought down with the typical B of the key", () => {
    const first = fit({ midi: 69, readings: [{ partial: 1, hz: 441 }] });
    expect(first).toMatchObject({ f1Hz: 441, b: null, bSigma: null, used: [1], quality: "repeat" });
    const fourth = fit({ midi: 69, readings: [{ partial: 4, hz: 1766.4 }] });
    expect(Math.abs(1200 * Math.log2(fourth.f1Hz / 440))).toBeLessThan(4);
    expect(fourth.f1SigmaCents).toBeGreaterThan(first.f1SigmaCents);
    expect(fourth.warnings).toContain("single-reading");
  });

  it("two that no stiff string has are one reading and a mistake", () => {
    const result = fit({
      midi: 69,
      readings: [
        { partial: 1, hz: 440 },
        { partial: 5, hz: 880.9 },
      ],
    });
    expect(result.b).toBeNull();
    expect(result.rejected).toMatchObject([{ partial: 5, reason: "wrong-partial-number", fitsPartial: 2 }]);
  });
});

describe("a small B", () => {
  it("may come out negative within its error, and is reported so with its upper limit", () => {
    const readings = [1, 2, 3, 4].map((partial, i) => ({
      partial,
      hz: 100 * partial * 2 ** (([0.2, 0, -0.1, -0.4][i] ?? 0) / 1200),
      sigmaCents: 1,
    }));
    const { b, bHigh, warnings } = fit({ midi: 43, readings });
    expect(b).toBeLessThan(0);
    expect(bHigh).toBeGreaterThan(0);
    expect(warnings).toContain("b-not-significant");
  });
});

describe("the bass", () => {
  const partials = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];

  it("does not hang on the first partial: half a semitone off, it is left out", () => {
    const readings = changed(sheet(21, 3e-4, partials), 1, byCents(55));
    const { f1Hz, used } = fit({ midi: 21, readings });
    expect(used).not.toContain(1);
    expect(Math.abs(1200 * Math.log2(f1Hz / 27.5))).toBeLessThan(1);
  });

  it("warns when f1 rests on the first partial", () => {
    expect(fit({ midi: 21, readings: sheet(21, 3e-4, [1, 8, 10]) }).warnings).toContain(
      "first-partial-unreliable",
    );
    expect(fit({ midi: 21, readings: sheet(21, 3e-4, partials) }).warnings).toEqual([]);
  });
});

describe("σ that is too small for the string", () => {
  it("does not throw half the sheet away, but asks for a repeat", () => {
    const readings = sheet(60, 3e-4, [1, 2, 3, 4, 5, 6, 7, 8]).map((each) => ({ ...each, sigmaCents: 0.02 }));
    const { used, warnings, quality } = fit({ midi: 60, readings });
    expect(used).toHaveLength(8);
    expect(warnings).toContain("scatter-exceeds-sigma");
    expect(quality).toBe("repeat");
  });

  it("of some readings only is believed for those, the others take theirs from the residuals", () => {
    const readings = A2.map((each, i) => (i < 4 ? { ...each, sigmaCents: 0.3 } : each));
    const mixed = fit({ midi: 45, readings });
    expect(mixed.rejected).toEqual([]);
    expect(mixed.bSigma).toBeGreaterThan(0);
    expect((mixed.bLow ?? 1) < 9e-5 && (mixed.bHigh ?? 0) > 9e-5).toBe(true);
  });
});

describe("bad input names its field", () => {
  const good = { partial: 2, hz: 220 };
  it.each([
    ["no-readings", "readings", { readings: [] }],
    ["bad-frequency", "readings[1].hz", { readings: [good, { partial: 3, hz: 0 }] }],
    ["bad-frequency", "readings[1].hz", { readings: [good, { partial: 3, hz: -5 }] }],
    ["bad-frequency", "readings[1].hz", { readings: [good, { partial: 3, hz: Number.NaN }] }],
    ["bad-frequency", "readings[0].hz", { readings: [{ partial: 3, hz: Number.POSITIVE_INFINITY }] }],
    ["bad-frequency", "readings[0].hz", { readings: [{ partial: 3, hz: 1e300 }] }],
    ["bad-frequency", "readings[0].hz", { readings: [{ partial: 3, hz: 5e-324 }] }],
    ["missing-frequency", "readings[1]", { readings: [good, { partial: 3 }] }],
    ["two-frequencies", "readings[0]", { midi: 45, readings: [{ partial: 3, hz: 330, cents: 0 }] }],
    ["note-needed", "midi", { readings: [{ partial: 3, cents: 4 }] }],
    ["bad-cents", "readings[0].cents", { midi: 45, readings: [{ partial: 3, cents: Number.NaN }] }],
    ["bad-partial", "readings[0].partial", { readings: [{ partial: 0, hz: 330 }] }],
    ["bad-partial", "readings[0].partial", { readings: [{ partial: 2.5, hz: 330 }] }],
    ["bad-partial", "kept[0]", { readings: [good], kept: [-1] }],
    ["bad-sigma", "readings[0].sigmaCents", { readings: [{ ...good, sigmaCents: 0 }] }],
    ["bad-sigma", "readings[0].sigmaCents", { readings: [{ ...good, sigmaCents: Number.NaN }] }],
    ["bad-note", "midi", { midi: 45.5, readings: [good] }],
    ["bad-note", "midi", { midi: 400, readings: [good] }],
    ["bad-reference", "referenceHz", { midi: 45, referenceHz: 0, readings: [good] }],
    ["too-many-readings", "readings", { readings: new Array<Reading>(1001).fill(good) }],
  ])("%s at %s", (code, path, input) => {
    expect(() => fit(input)).toThrow(AcousticsError);
    expect(() => fit(input)).toThrow(expect.objectContaining({ code, path }));
  });
});
