import { describe, expect, it } from "vitest";
import { recordedNotes } from "@/tests/support/reference-checks";
import { adviceFrom, advise, typicalLnBSigma } from "./advise";
import { keyboard } from "./keyboard";
import { registerOf } from "./registers";
import { planFrom } from "./stretch";
import { builtInStyles } from "./styles";
import type { KeyboardResult, Observation, StretchResult } from "./types";

const breakMidi = 45;
const recorded = (keep: (i: number) => boolean): Observation[] =>
  recordedNotes.filter((_, i) => keep(i)).map(({ midi, B, sigma_total: bSigma }) => ({ midi, b: B, bSigma }));

const meanBand = ({ notes }: StretchResult) =>
  notes.reduce((sum, { bandCents }) => sum + (bandCents ?? Number.NaN), 0) / notes.length;

/** A reading of typical error exactly where it is predicted. */
function asPredicted({ keys }: KeyboardResult, midi: number): Observation {
  const b = keys.find((key) => key.midi === midi)?.b ?? Number.NaN;
  return { midi, b, bSigma: b * typicalLnBSigma(midi) };
}

describe("advice", () => {
  it.each([
    ["none", []],
    ["six", recorded((i) => i % 5 === 2)],
    ["thirty", recorded(() => true)],
  ])(
    "foretells exactly what a refit gives when the reading falls where predicted: %s measured",
    (_, observations) => {
      const result = keyboard({ observations, breakMidi });
      const advice = adviceFrom(result);
      expect(advice.meanBandCents).toBeCloseTo(meanBand(planFrom(result)), 9);
      for (const midi of [22, 38, 44, 46, 61, 80, 103].filter((key) =>
        observations.every((o) => o.midi !== key),
      )) {
        const refit = keyboard({ observations: [...observations, asPredicted(result, midi)], breakMidi });
        const foretold = advice.next.find((next) => next.midi === midi)?.meanBandCents ?? Number.NaN;
        expect(Math.abs(foretold / meanBand(planFrom(refit)) - 1)).toBeLessThan(1e-6);
      }
    },
  );

  it("names every unmeasured key once, best first, and none that was measured", () => {
    const observations = recorded((i) => i % 2 === 0);
    const { next, meanBandCents } = advise({ observations });
    expect(new Set(next.map(({ midi }) => midi)).size).toBe(88 - observations.length);
    expect(next.some(({ midi }) => observations.some((o) => o.midi === midi))).toBe(false);
    expect(next.map((entry) => entry.meanBandCents)).toEqual(
      next.map((entry) => entry.meanBandCents).toSorted((a, b) => a - b),
    );
    expect(next[0]?.meanBandCents).toBeLessThan(meanBandCents);
  });

  it("asks for a bass note first on an unknown instrument, since there instruments differ most", () => {
    const { next, widest, enough } = advise({});
    expect(registerOf(next[0]?.midi ?? 0)).toBe("bass");
    expect(widest.register).toBe("bass");
    expect(enough).toBe(false);
  });

  it("followed step by step reaches enough within a dozen notes, and the band never widens on the way", () => {
    const observations: Observation[] = [];
    let before = Number.POSITIVE_INFINITY;
    for (let step = 0; step < 12; step += 1) {
      const result = keyboard({ observations, breakMidi });
      const { enough, next, meanBandCents } = adviceFrom(result);
      expect(meanBandCents).toBeLessThanOrEqual(before);
      before = meanBandCents;
      if (enough) {
        console.log(
          `enough after ${step} notes: ${observations.map(({ midi }) => midi).join(" ")}, mean ±${meanBandCents.toFixed(2)}`,
        );
        expect(step).toBeGreaterThanOrEqual(3);
        return;
      }
      observations.push(asPredicted(result, next[0]?.midi ?? 69));
    }
    expect.fail("Twelve notes were not enough");
  });

  it("is not enough when a style asks for more than is known and another reading helps, and is when every register is within tolerance", () => {
    const observations = recorded((i) => [0, 8, 16].includes(i));
    const strict = advise({ observations, style: { ...builtInStyles.even, toleranceCents: 0.1 } });
    const lax = advise({ observations, style: { ...builtInStyles.even, toleranceCents: 100 } });
    expect(strict).toMatchObject({ enough: false, widest: { toleranceCents: 0.1 } });
    expect(lax).toMatchObject({ enough: true, widest: { toleranceCents: 100 } });
  });

  it("has nothing left to ask when every key is measured", () => {
    const { keys } = keyboard({ observations: [] });
    const observations = keys.map(({ midi, b }) => ({ midi, b, bSigma: 0.02 * b }));
    expect(advise({ observations })).toMatchObject({ next: [], enough: true });
  });

  it("weighs every key for the price of a few plans, not of one for each key", () => {
    const result = keyboard({ observations: recorded(() => true) });
    const fastest = (work: () => unknown) => {
      let least = Number.POSITIVE_INFINITY;
      for (let i = 0; i < 30; i += 1) {
        const start = performance.now();
        work();
        least = Math.min(least, performance.now() - start);
      }
      return least;
    };
    const ratio = fastest(() => adviceFrom(result)) / fastest(() => planFrom(result));
    console.log(`advice costs ${ratio.toFixed(1)} plans (fastest of 30)`);
    expect(ratio).toBeLessThan(result.keys.length / 8);
  });
});
