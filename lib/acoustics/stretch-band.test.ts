import { describe, expect, it } from "vitest";
import { planByElimination } from "@/tests/support/plan-by-elimination";
import { observe, seededRandom, simulateInstrument, spreadKeys } from "@/tests/support/simulated-instrument";
import { keyboard } from "./keyboard";
import { at } from "./linear-algebra";
import { REGISTERS, registerOf } from "./registers";
import { flatCovariance, planFrom, stretch, systemFrom } from "./stretch";
import { irregularityVariance, partialIrregularitySigma, stretchByLnB } from "./stretch-band";
import { builtInStyles } from "./styles";

describe("the band", () => {
  it.each([0, 6, 12, 30, 88])(
    "covers the true strings' plan in every register with %i notes measured",
    (count) => {
      const random = seededRandom(1000 + count);
      const covered = new Map(REGISTERS.map((register) => [register, { inside: 0, total: 0, band: 0 }]));
      for (let i = 0; i < (count === 0 ? 250 : 100); i += 1) {
        const instrument = simulateInstrument(random);
        const observations = spreadKeys(instrument.keys, count, random).map((key) => observe(key, random));
        const known = i % 2 === 0 ? { breakMidi: instrument.breakMidi } : {};
        const plan = planFrom(keyboard({ observations, ...known }));
        const truth = planByElimination(instrument.keys, builtInStyles.even);
        plan.notes.forEach(({ midi, stretchCents, bandCents }, key) => {
          const tally = covered.get(registerOf(midi));
          if (tally === undefined || midi === 69) return;
          const band = bandCents ?? Number.NaN;
          tally.total += 1;
          tally.band += band;
          if (Math.abs(stretchCents - (truth[key] ?? Number.NaN)) <= band) tally.inside += 1;
        });
      }
      const shares = [...covered].map(([register, { inside, total, band }]) => {
        const share = inside / total;
        return {
          register,
          share,
          text: `${register} ${(100 * share).toFixed(1)} % (±${(band / total).toFixed(2)})`,
        };
      });
      console.log(`${count} notes: ${shares.map(({ text }) => text).join(", ")}`);
      for (const { share } of shares) {
        expect(share).toBeGreaterThanOrEqual(0.9);
        expect(share).toBeLessThanOrEqual(0.98);
      }
    },
  );

  it("is J·cov(ln B)·Jᵀ with J the plan's true derivative", () => {
    const result = keyboard({ observations: [{ midi: 50, b: 1.3e-4, bSigma: 3e-6 }] });
    const anchor = { midi: 57, partial: 4 };
    const system = systemFrom(result, { style: "wide", anchor });
    const n = result.keys.length;
    const columns = stretchByLnB(system);
    const step = 1e-4;
    for (const key of [0, 20, 36, 48, 60, 87]) {
      const moved = (sign: number) =>
        stretch({
          keys: result.keys.map(({ midi, b }, i) => ({ midi, b: i === key ? b * Math.exp(sign * step) : b })),
          style: "wide",
          anchor,
        }).notes;
      const up = moved(1);
      const down = moved(-1);
      for (let i = 0; i < n; i += 1) {
        const numeric = ((up[i]?.stretchCents ?? 0) - (down[i]?.stretchCents ?? 0)) / (2 * step);
        expect(at(columns, key * n + i)).toBeCloseTo(numeric, 4);
      }
    }
  });

  it("contains the partials' irregularity as simulation spreads it through the plan", () => {
    const random = seededRandom(8);
    const result = keyboard({ observations: [] });
    const keys = result.keys.map(({ midi, b }) => ({ midi, b }));
    const anchor = { midi: 69, partial: 2 };
    const predicted = irregularityVariance(systemFrom(result, { anchor }), []);
    const smooth = stretch({ keys, anchor }).notes.map(({ stretchCents }) => stretchCents);
    const squares = new Float64Array(keys.length);
    const draws = 400;
    for (let draw = 0; draw < draws; draw += 1) {
      const rough = keys.map(({ midi, b }) => ({
        midi,
        b,
        irregularity: Array.from(
          { length: 17 },
          (_, n) => partialIrregularitySigma(midi, n) * random.normal(),
        ),
      }));
      const plan = planByElimination(rough, builtInStyles.even);
      const shift = (rough[69 - 21]?.irregularity[2] ?? 0) - (smooth[69 - 21] ?? 0);
      plan.forEach((value, i) => {
        const error = value - shift - (smooth[i] ?? 0);
        squares[i] = at(squares, i) + error * error;
      });
    }
    for (let i = 0; i < keys.length; i += 1) {
      const ratio = Math.sqrt(at(squares, i) / draws / at(predicted, i));
      expect(ratio).toBeGreaterThan(0.88);
      expect(ratio).toBeLessThan(1.12);
    }
  });

  it("narrows for a note whose own partials lie well and widens for one whose do not", () => {
    const observation = { midi: 60, b: 3e-4, bSigma: 3e-6 };
    const band = (residualCents?: number) =>
      stretch({
        observations: [residualCents === undefined ? observation : { ...observation, residualCents }],
      }).notes.find(({ midi }) => midi === 60)?.bandCents ?? Number.NaN;
    expect(band(0.2)).toBeLessThan(band());
    expect(band(3)).toBeGreaterThan(band());
  });

  it("keeps the covariance of the keyboard as it was computed", () => {
    const result = keyboard({ observations: [] });
    const flat = flatCovariance(result);
    expect(at(flat, 3 * result.keys.length + 80)).toBe(result.covariance[3]?.[80]);
  });
});
