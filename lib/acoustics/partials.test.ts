import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { check, checkNumber, checkTable, input, numbersOf } from "@/tests/support/checks";
import { centsBetween, equalTemperedHz, keyFromName, keyName, nearestKey } from "./keys";
import {
  bAtPitch,
  bFromCentsAboveIdealString,
  bFromTwoPartials,
  CENTS_PER_LN_SQUARE,
  centsAboveIdealString,
  f0FromF1,
  f1FromF0,
  inharmonicCents,
  inharmonicCentsSlope,
  partialHzFromF0,
  partialHzFromF1,
} from "./partials";

const stiffness = fc.double({ min: 1e-6, max: 0.05, noNaN: true });
const partial = fc.integer({ min: 1, max: 40 });

describe("partials of a stiff string", () => {
  it.each(["partials.B0.0001", "partials.B0.00035", "partials.B0.001"])(
    "lie above the harmonics as computed from Fletcher's law (%s)",
    (id) => {
      // Formula: Fletcher 1964, JASA 36:203, as quoted by Hodgkinson et al. 2009 (DAFx-09).
      const b = input(check(id), "B");
      const { rel_f1, rel_f0 } = check(id).expected as { rel_f1: unknown; rel_f0: unknown };
      for (const [n, cents] of Object.entries(numbersOf(rel_f1, id))) {
        expect(inharmonicCents(Number(n), b)).toBeCloseTo(cents, 8);
      }
      for (const [n, cents] of Object.entries(numbersOf(rel_f0, id))) {
        expect(centsAboveIdealString(Number(n), b)).toBeCloseTo(cents, 8);
      }
    },
  );

  it("are over-read by 3.28 cents at the sixteenth when the law is taken as linear in B", () => {
    // Source: formula (partials.linear.error).
    const linear = CENTS_PER_LN_SQUARE * 3.5e-4 * 256;
    expect(linear - centsAboveIdealString(16, 3.5e-4)).toBeCloseTo(checkNumber("partials.linear.error"), 6);
  });

  it("keep their ratios with clamped ends, so B does not depend on the end condition", () => {
    // Fletcher 1964, clamped ends: factor from memory.
    const b = 3.5e-4;
    const expected = checkTable("partials.clamped");
    const clamped = 1 + (2 / Math.PI) * Math.sqrt(b) + (4 / Math.PI ** 2) * b;
    expect(partialHzFromF0(4, 1, b) * clamped).toBeCloseTo(expected.f4_over_f0 ?? 0, 9);
    expect(1200 * Math.log2(clamped)).toBeCloseTo(expected.factor_cents ?? 0, 6);
    const pair = bFromTwoPartials(
      1,
      clamped * partialHzFromF0(1, 100, b),
      4,
      clamped * partialHzFromF0(4, 100, b),
    );
    expect(pair).toBeCloseTo(b, 12);
  });

  it("are the same from f0 and from f1", () => {
    fc.assert(
      fc.property(stiffness, partial, (b, n) => {
        const fromF0 = partialHzFromF0(n, 100, b);
        expect(partialHzFromF1(n, f1FromF0(100, b), b) / fromF0).toBeCloseTo(1, 12);
        expect(f0FromF1(f1FromF0(100, b), b)).toBeCloseTo(100, 10);
      }),
    );
  });

  it("move with B as the analytic derivative says", () => {
    fc.assert(
      fc.property(stiffness, partial, (b, n) => {
        const h = 1e-5 * b;
        const numeric = (inharmonicCents(n, b + h) - inharmonicCents(n, b - h)) / (2 * h);
        const analytic = inharmonicCentsSlope(n, b);
        expect(Math.abs(numeric - analytic)).toBeLessThanOrEqual(1e-5 * analytic + 1e-6);
      }),
    );
  });
});

describe("B from little", () => {
  it("is 3.47e-4 at middle C by Young's 1.2 cents for the second mode", () => {
    // R. W. Young 1952, JASA 24:267, abstract (SEEN).
    expect(1.2 / (CENTS_PER_LN_SQUARE * 4)).toBeCloseTo(checkNumber("young.middleC.B"), 9);
    expect(bFromCentsAboveIdealString(2, 1.2)).toBeCloseTo(checkNumber("young.middleC.B.exact"), 9);
  });

  it("is recovered exactly from two partials", () => {
    // Algebra; the same relation balances partials in Hodgkinson et al. 2009.
    expect(bFromTwoPartials(2, 440.169277, 8, 1782.686863)).toBeCloseTo(4.2e-4, 9);
  });

  it("differs from pair to pair on a real string", () => {
    // Partials of one medium grand quoted in a technicians' list message (SEEN).
    const expected = checkTable("B.irregular.A4");
    expect(bFromTwoPartials(1, 440, 2, 880.92)).toBeCloseTo(expected.B_1_2 ?? 0, 9);
    expect(bFromTwoPartials(1, 440, 4, 1766.4)).toBeCloseTo(expected.B_1_4 ?? 0, 9);
    expect(bFromTwoPartials(1, 440, 8, 3609.36)).toBeCloseTo(expected.B_1_8 ?? 0, 9);
    expect(bFromTwoPartials(1, 220, 2, 440.48)).toBeCloseTo(checkNumber("B.pair.A3"), 9);
  });

  it("is refused where no stiff string has both partials", () => {
    expect(bFromTwoPartials(1, 100, 2, 400)).toBeNull();
    expect(bFromTwoPartials(1, 100, 2, 900)).toBeNull();
    expect(bFromTwoPartials(3, 300, 3, 300)).toBeNull();
  });

  it("does not care which of the two partials comes first", () => {
    fc.assert(
      fc.property(stiffness, partial, partial, (b, m, n) => {
        fc.pre(m !== n);
        const low = partialHzFromF0(m, 55, b);
        const high = partialHzFromF0(n, 55, b);
        const forward = bFromTwoPartials(m, low, n, high);
        expect(forward).toBe(bFromTwoPartials(n, high, m, low));
        expect((forward ?? 0) / b).toBeCloseTo(1, 5);
      }),
    );
  });

  it("falls by a quarter of a percent for two cents up, tension going with the square of pitch", () => {
    expect(bAtPitch(1e-3, 440, 440 * 2 ** (2 / 1200))).toBeCloseTo(1e-3 * (1 - 0.00231), 7);
  });
});

describe("keys", () => {
  it("have the equal-tempered frequencies of the table", () => {
    // A4 = 440 Hz: ISO 16:1975 (from memory).
    for (const [name, hz] of Object.entries(checkTable("et.table"))) {
      const midi = keyFromName(name);
      expect(midi).not.toBeNull();
      expect(equalTemperedHz(midi ?? 0)).toBeCloseTo(hz, 5);
    }
  });

  it("are read back from their own names", () => {
    for (let midi = 21; midi <= 108; midi += 1) {
      expect(keyFromName(keyName(midi))).toBe(midi);
      expect(nearestKey(equalTemperedHz(midi, 415) * 1.02, 415)).toBe(midi);
    }
  });

  it("understand flats and lower case, and refuse what is no note", () => {
    expect(keyFromName("eb4")).toBe(63);
    expect(keyFromName("Cb4")).toBe(59);
    expect(keyFromName("H4")).toBeNull();
    expect(keyFromName("A")).toBeNull();
    expect(centsBetween(440, 880)).toBe(1200);
  });
});
