import { describe, expect, it } from "vitest";
import { keyOf } from "@/tests/support/key-of";
import { recordedNotes } from "@/tests/support/reference-checks";
import { observe, seededRandom, simulateInstrument, spreadKeys } from "@/tests/support/simulated-instrument";
import { keyboard } from "./keyboard";
import { publishedMeanB } from "./keyboard-prior";

const median = (values: readonly number[]) => {
  const sorted = values.toSorted((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? Number.NaN;
};

describe("thirty recorded notes of one grand", () => {
  const draws = 200;

  for (const sigma of ["sigma_B", "sigma_total"] as const) {
    for (const count of [5, 8, 12]) {
      it(`are predicted from ${count} of them, errors as ${sigma}`, () => {
        const random = seededRandom(count);
        const errors: number[] = [];
        let covered = 0;
        for (let draw = 0; draw < draws; draw += 1) {
          const shuffled = recordedNotes
            .map((note) => ({ note, order: random.uniform() }))
            .toSorted((a, b) => a.order - b.order)
            .map(({ note }) => note);
          const observations = shuffled
            .slice(0, count)
            .map((note) => ({ midi: note.midi, b: note.B, bSigma: note[sigma] }));
          const result = keyboard({ observations });
          for (const { midi, B } of shuffled.slice(count)) {
            const { b, bLow, bHigh } = keyOf(result, midi);
            errors.push(Math.abs(Math.log(b / B)));
            if (B >= bLow && B <= bHigh) covered += 1;
          }
        }
        const coverage = covered / errors.length;
        console.log(
          `${count} notes, ${sigma}: median |Δ ln B| ${median(errors).toFixed(4)}, coverage ${(100 * coverage).toFixed(1)} %`,
        );
        expect(median(errors)).toBeLessThanOrEqual(0.08);
        expect(coverage).toBeGreaterThanOrEqual(0.9);
        expect(coverage).toBeLessThanOrEqual(0.98);
      });
    }
  }

  it("all belong to their instrument", () => {
    const observations = recordedNotes.map(({ midi, B, sigma_total: bSigma }) => ({ midi, b: B, bSigma }));
    expect(keyboard({ observations }).keys.filter(({ flag }) => flag !== null)).toEqual([]);
  });
});

describe("a simulated sheet", () => {
  it("leaves intervals for ln B that cover the truth, from no note to all", () => {
    const random = seededRandom(31);
    for (const count of [0, 6, 12, 30, 88]) {
      let covered = 0;
      let total = 0;
      for (let i = 0; i < (count === 0 ? 300 : 25); i += 1) {
        const instrument = simulateInstrument(random);
        const observations = spreadKeys(instrument.keys, count, random).map((key) => observe(key, random));
        keyboard({ observations }).keys.forEach(({ bLow, bHigh }, key) => {
          const truth = instrument.keys[key]?.b ?? Number.NaN;
          if (truth >= bLow && truth <= bHigh) covered += 1;
          total += 1;
        });
      }
      console.log(`${count} notes: coverage of B ${((100 * covered) / total).toFixed(1)} %`);
      expect(covered / total).toBeGreaterThan(0.9);
      expect(covered / total).toBeLessThan(0.99);
    }
  });

  it("finds a clear break between the notes that bracket it", () => {
    const observations = [];
    for (let midi = 24; midi <= 84; midi += 3) {
      const b = publishedMeanB(midi) * (midi < 42 ? 2 : 1);
      observations.push({ midi, b, bSigma: 0.02 * b });
    }
    const result = keyboard({ observations });
    expect(result.breakSource).toBe("inferred");
    expect(result.breakMidi).toBeGreaterThan(39);
    expect(result.breakMidi).toBeLessThanOrEqual(42);
    expect(keyboard({ observations: [] }).breakSource).toBe("assumed");
    expect(keyboard({ observations, breakMidi: 44 })).toMatchObject({ breakMidi: 44, breakSource: "given" });
  });

  it("keeps the bridges apart: a bass note says less across the break than on its own side", () => {
    const observations = [40, 42, 44].map((midi) => ({ midi, b: 3e-4, bSigma: 3e-6 }));
    const sigma = (breakMidi: number) => keyOf(keyboard({ observations, breakMidi }), 47).lnBSigma;
    expect(sigma(45)).toBeGreaterThan(1.2 * sigma(38));
  });
});
