import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { publishedMeanB } from "./keyboard-prior";
import { inharmonicCents } from "./partials";
import { stretch } from "./stretch";
import type { IntervalRule, Style } from "./types";

const midis = Array.from({ length: 88 }, (_, i) => 21 + i);

/** Instruments with every B scaled at random, from half to double. */
const instrument = fc
  .array(fc.double({ min: -0.7, max: 0.7, noNaN: true }), { minLength: 88, maxLength: 88 })
  .map((logs) => midis.map((midi, i) => ({ midi, b: publishedMeanB(midi) * Math.exp(logs[i] ?? 0) })));

const octaves: IntervalRule[] = [
  { lowerPartial: 2, upperPartial: 1, semitones: 12, weights: 1 },
  { lowerPartial: 4, upperPartial: 2, semitones: 12, weights: 1 },
  { lowerPartial: 6, upperPartial: 3, semitones: 12, weights: 1 },
  { lowerPartial: 4, upperPartial: 1, semitones: 24, weights: 1 },
];

const octaveStyle = fc.record({
  intervals: fc.subarray(octaves, { minLength: 1 }),
  smoothness: fc.constantFrom(0, 1, 100),
});

/** Sum of the weighted squared mistunings and the smoothness term, straight from the definition. */
function cost(keys: readonly { midi: number; b: number }[], cents: readonly number[], style: Style): number {
  let sum = 0;
  for (const { lowerPartial, upperPartial, semitones, weights } of style.intervals) {
    for (let i = 0; i + semitones < keys.length; i += 1) {
      const j = i + semitones;
      const mistuning =
        (cents[j] ?? 0) +
        inharmonicCents(upperPartial, keys[j]?.b ?? 0) -
        (cents[i] ?? 0) -
        inharmonicCents(lowerPartial, keys[i]?.b ?? 0);
      sum += (typeof weights === "number" ? weights : 0) * mistuning ** 2;
    }
  }
  for (let i = 1; i + 1 < keys.length; i += 1) {
    sum += style.smoothness * ((cents[i - 1] ?? 0) - 2 * (cents[i] ?? 0) + (cents[i + 1] ?? 0)) ** 2;
  }
  return sum;
}

describe("any plan", () => {
  it("without inharmonicity and with octaves only is equal temperament", () => {
    const keys = midis.map((midi) => ({ midi, b: 0 }));
    fc.assert(
      fc.property(octaveStyle, (style) => {
        for (const { stretchCents } of stretch({ keys, style }).notes)
          expect(Math.abs(stretchCents)).toBeLessThan(1e-6);
      }),
      { numRuns: 20 },
    );
  });

  it("closes: mutually consistent octaves are all beatless", () => {
    fc.assert(
      fc.property(instrument, (keys) => {
        const style = {
          intervals: [octaves[0], octaves[1], octaves[3]].flatMap((rule) => (rule ? [rule] : [])),
          smoothness: 0,
        };
        const lowest = [33, 45, 57]
          .map((midi) => keys.find((key) => key.midi === midi))
          .flatMap((key) => (key ? [key] : []));
        const rules = style.intervals.map(
          (rule): IntervalRule => ({
            ...rule,
            weights:
              rule.semitones === 24
                ? 1
                : [
                    rule.lowerPartial === 4 ? 1 : 0,
                    ...new Array<number>(11).fill(0),
                    rule.lowerPartial === 4 ? 0 : 1,
                  ],
          }),
        );
        const { notes } = stretch({
          keys: lowest,
          style: { intervals: rules, smoothness: 0 },
          anchor: { midi: 45, partial: 1 },
        });
        const partial = (i: number, n: number) =>
          (notes[i]?.stretchCents ?? 0) + inharmonicCents(n, lowest[i]?.b ?? 0);
        expect(partial(1, 2)).toBeCloseTo(partial(0, 4), 5);
        expect(partial(2, 1)).toBeCloseTo(partial(1, 2), 5);
        expect(partial(2, 1)).toBeCloseTo(partial(0, 4), 5);
      }),
      { numRuns: 30 },
    );
  });

  it("is the least of all plans: no small change of any notes lowers the sum of squares, nor does moving all alike change it", () => {
    fc.assert(
      fc.property(
        instrument,
        octaveStyle,
        fc.array(fc.double({ min: -0.5, max: 0.5, noNaN: true }), { minLength: 88, maxLength: 88 }),
        fc.double({ min: -20, max: 20, noNaN: true }),
        (keys, style, change, shift) => {
          const best = stretch({ keys, style }).notes.map(({ stretchCents }) => stretchCents);
          const least = cost(keys, best, style);
          const changed = best.map((value, i) => value + (change[i] ?? 0));
          expect(cost(keys, changed, style)).toBeGreaterThanOrEqual(least - 1e-4);
          const moved = best.map((value) => value + shift);
          expect(cost(keys, moved, style)).toBeCloseTo(least, 6);
        },
      ),
      { numRuns: 40 },
    );
  });

  it("keeps the notes in rising order", () => {
    fc.assert(
      fc.property(instrument, fc.constantFrom("close", "even", "wide", "published"), (keys, style) => {
        const { notes } = stretch({ keys, style });
        const falling = notes.filter(({ targetHz }, i) => i > 0 && targetHz <= (notes[i - 1]?.targetHz ?? 0));
        expect(falling).toEqual([]);
      }),
      { numRuns: 40 },
    );
  });

  it("is never less sure after another reading that agrees with the prediction", () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(fc.integer({ min: 21, max: 108 }), { minLength: 2, maxLength: 10 }),
        fc.double({ min: 0.005, max: 0.2, noNaN: true }),
        (measured, error) => {
          const observations = measured.map((midi) => {
            const b = publishedMeanB(midi);
            return { midi, b, bSigma: error * b };
          });
          const fewer = stretch({ observations: observations.slice(1), breakMidi: 45 }).notes;
          const more = stretch({ observations, breakMidi: 45 }).notes;
          const wider = more.filter(
            ({ bandCents }, i) => (bandCents ?? 0) > (fewer[i]?.bandCents ?? 0) + 1e-6,
          );
          expect(wider).toEqual([]);
        },
      ),
      { numRuns: 30 },
    );
  });
});
