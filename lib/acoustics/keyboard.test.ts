import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { keyOf } from "@/tests/support/key-of";
import { recordedNotes, referenceCheck } from "@/tests/support/reference-checks";
import { keyboard } from "./keyboard";
import { publishedMeanB } from "./keyboard-prior";
import { AcousticsError } from "./types";

describe("the mean instrument", () => {
  it("is the published sum of two exponentials (Rigaud, David & Daudet 2013, parameters from memory)", () => {
    const { expected } = referenceCheck("rigaud.B");
    const result = keyboard({ observations: [] });
    expect(result.priorOnly).toBe(true);
    for (const [midi, b] of Object.entries(expected)) {
      expect(publishedMeanB(Number(midi)) / b).toBeCloseTo(1, 8);
      expect(keyOf(result, Number(midi)).b / b).toBeCloseTo(1, 8);
    }
  });

  it("has its valley where calculus puts it (from memory as above)", () => {
    const { m_min: lowest = Number.NaN, B_min: smallest = Number.NaN } =
      referenceCheck("rigaud.min").expected;
    expect(publishedMeanB(lowest) / smallest).toBeCloseTo(1, 8);
    expect(publishedMeanB(lowest - 0.5)).toBeGreaterThan(smallest);
    expect(publishedMeanB(lowest + 0.5)).toBeGreaterThan(smallest);
  });

  it("doubles every seven and a half semitones in the treble (slope from memory; Young 1952 says eight)", () => {
    const { rigaud = Number.NaN } = referenceCheck("rigaud.doubling").expected;
    expect(publishedMeanB(100 + rigaud) / publishedMeanB(100)).toBeCloseTo(2, 2);
    expect(publishedMeanB(108) / publishedMeanB(100)).toBeGreaterThan(2);
  });

  it("is near the 1.2 cents of middle C's second mode that Young (1952) measured on six pianos", () => {
    const key = keyOf(keyboard({ observations: [] }), 60);
    expect(3.46814e-4).toBeGreaterThan(key.bLow);
    expect(3.46814e-4).toBeLessThan(key.bHigh);
  });
});

describe("poor observations", () => {
  it("a B below zero within its error acts as an upper limit, not as the logarithm of nonsense", () => {
    const prior = keyOf(keyboard({ observations: [] }), 40);
    const result = keyboard({ observations: [{ midi: 40, b: -2e-5, bSigma: 6e-5 }] });
    const key = keyOf(result, 40);
    expect(key).toMatchObject({ source: "measured", flag: null, z: null, detectableChange: null });
    expect(key.b).toBeLessThan(prior.b);
    expect(key.bHigh).toBeLessThan(prior.bHigh);
    expect(key.b).toBeGreaterThan(0);
  });

  it("an impossible reading far below zero, or absurdly high, cannot drag the keyboard along", () => {
    const prior = keyboard({ observations: [] });
    for (const observation of [
      { midi: 69, b: -0.1, bSigma: 1e-5 },
      { midi: 69, b: 5, bSigma: 0.1 },
    ]) {
      const result = keyboard({ observations: [observation] });
      for (const midi of [57, 68, 70, 81]) {
        expect(Math.abs(Math.log(keyOf(result, midi).b / keyOf(prior, midi).b))).toBeLessThan(0.25);
      }
    }
    expect(keyOf(keyboard({ observations: [{ midi: 69, b: 5, bSigma: 0.1 }] }), 69).flag).toBe(
      "does-not-belong",
    );
  });

  it("a reading much poorer than the prior changes nothing", () => {
    const prior = keyOf(keyboard({ observations: [] }), 60);
    const key = keyOf(keyboard({ observations: [{ midi: 60, b: 5e-3, bSigma: 1 }] }), 60);
    expect(key.b / prior.b).toBeCloseTo(1, 3);
  });

  it("the linear and the logarithmic reading agree where they meet", () => {
    const at = (share: number) =>
      keyOf(keyboard({ observations: [{ midi: 30, b: 2e-4, bSigma: share * 2e-4 }] }), 30);
    expect(Math.abs(Math.log(at(0.301).b / at(0.299).b))).toBeLessThan(0.12);
  });

  it("several strings of one key are joined by their inverse variances", () => {
    const two = keyboard({
      observations: [
        { midi: 69, b: 7e-4, bSigma: 2e-5 },
        { midi: 69, b: 7.4e-4, bSigma: 2e-5 },
      ],
    });
    const one = keyboard({ observations: [{ midi: 69, b: 7.2e-4, bSigma: 2e-5 / Math.SQRT2 }] });
    expect(keyOf(two, 69).b / keyOf(one, 69).b).toBeCloseTo(1, 9);
  });
});

describe("what a result always is", () => {
  const observation = fc.record({
    midi: fc.integer({ min: 21, max: 108 }),
    b: fc.double({ min: -1e-4, max: 0.05, noNaN: true }),
    bSigma: fc.double({ min: 1e-7, max: 0.05, noNaN: true }),
  });

  it("finite, ordered and symmetric for any readings", () => {
    fc.assert(
      fc.property(fc.array(observation, { maxLength: 12 }), (observations) => {
        const { keys, covariance } = keyboard({ observations });
        const ordered = keys.filter(
          ({ b, bLow, bHigh }) => 0 < bLow && bLow < b && b < bHigh && bHigh < Infinity,
        );
        expect(ordered).toHaveLength(keys.length);
        const variances = covariance.map((row, i) => row[i] ?? Number.NaN);
        expect(variances.map(Math.sqrt)).toEqual(keys.map(({ lnBSigma }) => lnBSigma));
        expect(covariance.every((row, i) => row.every((value, j) => value === covariance[j]?.[i]))).toBe(
          true,
        );
      }),
      { numRuns: 60 },
    );
  });

  it("does not depend on the order of the observations", () => {
    const observations = recordedNotes
      .slice(0, 12)
      .map(({ midi, B, sigma_B: bSigma }) => ({ midi, b: B, bSigma }));
    expect(keyboard({ observations: observations.toReversed() })).toEqual(keyboard({ observations }));
  });

  it.each([
    [21, 105],
    [17, 108],
    [12, 108],
    [28, 100],
  ])("covers the keys %i to %i", (firstMidi, lastMidi) => {
    const { keys } = keyboard({ observations: [], firstMidi, lastMidi });
    expect(keys[0]?.midi).toBe(firstMidi);
    expect(keys.at(-1)?.midi).toBe(lastMidi);
    expect(keys).toHaveLength(lastMidi - firstMidi + 1);
  });
});

describe("bad input", () => {
  const good = { midi: 69, b: 7e-4, bSigma: 1e-5 };

  it.each([
    [{ observations: [{ ...good, midi: 110 }] }, "unknown-key", "observations[0].midi"],
    [{ observations: [good, { ...good, midi: 60.5 }] }, "unknown-key", "observations[1].midi"],
    [{ observations: [{ ...good, b: Number.NaN }] }, "not-finite", "observations[0].b"],
    [
      { observations: [{ ...good, bSigma: Number.POSITIVE_INFINITY }] },
      "not-finite",
      "observations[0].bSigma",
    ],
    [{ observations: [{ ...good, bSigma: 0 }] }, "not-positive", "observations[0].bSigma"],
    [{ observations: [{ ...good, residualCents: -1 }] }, "negative", "observations[0].residualCents"],
    [{ observations: [], breakMidi: 300 }, "unknown-key", "breakMidi"],
    [{ observations: [], firstMidi: 60, lastMidi: 60 }, "range-order", "lastMidi"],
    [{ observations: [], firstMidi: -4 }, "unknown-key", "firstMidi"],
  ])("is refused with its place: %j", (input, code, path) => {
    expect(() => keyboard(input)).toThrow(expect.objectContaining({ name: "AcousticsError", code, path }));
    expect(() => keyboard(input)).toThrow(AcousticsError);
  });
});
