import { describe, expect, it } from "vitest";
import { checkFrequency, expectedPartial } from "./expected";
import { fit } from "./fit";
import { typicalB } from "./fit-prior";
import { partialHzFromF1 } from "./partials";

describe("where a partial is expected", () => {
  it("is hundreds of cents above the harmonic for an honest high partial, and no question is asked", () => {
    const b = typicalB(88);
    const hz = partialHzFromF1(8, 1318.5, b);
    const { cents } = expectedPartial({ midi: 88 }, 8);
    expect(cents).toBeGreaterThan(150);
    expect(checkFrequency({ midi: 88 }, 8, hz)).toMatchObject({ ask: false, fitsPartial: null });
  });

  it("follows an instrument that stands a semitone low, which would else be asked about at every note", () => {
    const low = 220 * 2 ** (-250 / 1200);
    expect(checkFrequency({ midi: 57 }, 1, low).ask).toBe(true);
    expect(checkFrequency({ midi: 57, pitchOffsetCents: -250 }, 1, low).ask).toBe(false);
  });

  it("follows the row's running fit more than the typical key once that knows B", () => {
    const b = 3 * typicalB(45);
    const readings = [1, 2, 3, 4, 5, 6].map((partial) => ({ partial, hz: partialHzFromF1(partial, 108, b) }));
    const running = fit({ midi: 45, readings });
    const truth = partialHzFromF1(16, 108, b);
    const { hz } = expectedPartial({ midi: 45, running }, 16);
    expect(Math.abs(1200 * Math.log2(hz / truth))).toBeLessThan(6);
    expect(Math.abs(1200 * Math.log2(expectedPartial({ midi: 45 }, 16).hz / truth))).toBeGreaterThan(20);
  });

  it("takes B from the keyboard model where the row has one reading", () => {
    const running = fit({ midi: 45, readings: [{ partial: 1, hz: 110 }] });
    const model = { b: 5e-4, lnBSigma: 0.1 };
    expect(expectedPartial({ midi: 45, running, model }, 10).hz).toBeCloseTo(
      partialHzFromF1(10, 110, 5e-4),
      6,
    );
  });
});

describe("a frequency typed by mistake", () => {
  it("is asked about, with the partial it fits", () => {
    const third = partialHzFromF1(3, 220, typicalB(57));
    expect(checkFrequency({ midi: 57 }, 2, third)).toMatchObject({ ask: true, fitsPartial: 3 });
  });

  it("is asked about when a digit is missing or the number is none", () => {
    expect(checkFrequency({ midi: 57 }, 1, 22).ask).toBe(true);
    for (const hz of [0, -220, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(checkFrequency({ midi: 57 }, 1, hz)).toMatchObject({ ask: true, awayCents: null });
    }
  });

  it("within 200 cents is taken without a question", () => {
    const expected = expectedPartial({ midi: 57 }, 1).hz;
    expect(checkFrequency({ midi: 57 }, 1, expected * 2 ** (199 / 1200)).ask).toBe(false);
    expect(checkFrequency({ midi: 57 }, 1, expected * 2 ** (-201 / 1200)).ask).toBe(true);
  });
});
