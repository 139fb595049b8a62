import { describe, expect, it } from "vitest";
import { boundOfB, randomString, sheetOf } from "@/tests/support/random-sheets";
import { type Random, seededRandom } from "@/tests/support/simulated-instrument";
import { fit } from "./fit";

const SHEETS = 2000;

type Tally = {
  /** Standard deviation and mean of (b − B) in units of the Cramér–Rao bound. */
  spread: number;
  bias: number;
  coverage: number;
  cleanRejected: number;
  named: number;
};

type Setting = {
  seed: number;
  count?: number;
  sigmas: (random: Random, count: number) => number[];
  told: boolean;
  /** Outlier in units of that reading's σ, at an index of the sheet or anywhere. */
  outlier?: { sigmas: (random: Random) => number; index?: number };
};

function simulate({ seed, count, sigmas, told, outlier }: Setting): Tally {
  const random = seededRandom(seed);
  let squares = 0;
  let sum = 0;
  let covered = 0;
  let cleanRejected = 0;
  let clean = 0;
  let named = 0;
  for (let sheet = 0; sheet < SHEETS; sheet += 1) {
    const string = randomString(random, count);
    const own = sigmas(random, string.partials.length);
    const index = outlier ? (outlier.index ?? Math.floor(random.uniform() * own.length)) : -1;
    const shift = outlier && { index, cents: (own[index] ?? 1) * outlier.sigmas(random) };
    const { readings, midi, b, partials } = sheetOf(random, string, own, told, shift);
    const result = fit({ midi, readings });
    const good = partials.filter((_, i) => i !== index);
    const bound = boundOfB(
      good,
      own.filter((_, i) => i !== index),
      b,
    );
    const z = ((result.b ?? Number.NaN) - b) / bound;
    squares += z * z;
    sum += z;
    if ((result.bLow ?? Number.NaN) <= b && b <= (result.bHigh ?? Number.NaN)) covered += 1;
    if (result.rejected.some(({ partial }) => partial === partials[index])) named += 1;
    cleanRejected += result.rejected.filter(({ partial }) => partial !== partials[index]).length;
    clean += good.length;
  }
  const bias = sum / SHEETS;
  return {
    spread: Math.sqrt(squares / SHEETS - bias * bias),
    bias,
    coverage: covered / SHEETS,
    cleanRejected: cleanRejected / clean,
    named: named / SHEETS,
  };
}

const mixed = (random: Random, count: number) =>
  Array.from({ length: count }, () => 0.2 + 1.3 * random.uniform());
const common = (random: Random, count: number) => new Array<number>(count).fill(0.2 + 1.3 * random.uniform());
const fixed = (sigma: number) => (_: Random, count: number) => new Array<number>(count).fill(sigma);
const eitherWay = (size: number) => (random: Random) => (random.uniform() < 0.5 ? -size : size);

describe("2 000 random sheets with σ given", () => {
  it.each([
    [101, mixed],
    [102, mixed],
    [103, common],
  ] as const)(
    "estimate B as well as the Cramér–Rao bound allows, with honest intervals (seed %i)",
    (seed, sigmas) => {
      const { spread, bias, coverage, cleanRejected } = simulate({ seed, sigmas, told: true });
      expect(spread).toBeGreaterThan(0.95);
      expect(spread).toBeLessThan(1.05);
      expect(Math.abs(bias)).toBeLessThan(0.1);
      expect(coverage).toBeGreaterThan(0.93);
      expect(coverage).toBeLessThan(0.97);
      expect(cleanRejected).toBeLessThan(0.005);
    },
  );

  it.each([
    [10, mixed],
    [10, common],
    [15, mixed],
    [40, common],
    [300, mixed],
  ] as const)("name one outlier of %i σ anywhere and are not moved by it", (size, sigmas) => {
    const tally = simulate({ seed: 200 + size, sigmas, told: true, outlier: { sigmas: eitherWay(size) } });
    expect(tally.named).toBeGreaterThanOrEqual(0.97);
    expect(Math.abs(tally.bias)).toBeLessThan(0.3);
    expect(tally.cleanRejected).toBeLessThan(0.005);
  });

  it.each([0, 3, 6, 7])("name an outlier of 10 to 20 σ at index %i of eight, always upwards", (index) => {
    const upwards = (random: Random) => 10 + 10 * random.uniform();
    const tally = simulate({
      seed: 300 + index,
      count: 8,
      sigmas: common,
      told: true,
      outlier: { sigmas: upwards, index },
    });
    expect(tally.named).toBeGreaterThanOrEqual(0.97);
    expect(Math.abs(tally.bias)).toBeLessThan(0.3);
  });
});

describe("2 000 random sheets without σ", () => {
  it.each([0.3, 0.6, 1, 1.5])("have intervals that cover B when partials scatter by %f cents", (scatter) => {
    const tally = simulate({ seed: 400, sigmas: fixed(scatter), told: false });
    expect(tally.coverage).toBeGreaterThan(0.92);
    expect(tally.coverage).toBeLessThan(0.98);
    expect(tally.cleanRejected).toBeLessThan(0.005);
  });

  it.each([6, 12])("cover B with %i partials whose scatter differs from note to note", (count) => {
    const { coverage } = simulate({ seed: 500, count, sigmas: common, told: false });
    expect(coverage).toBeGreaterThan(0.92);
    expect(coverage).toBeLessThan(0.98);
  });

  it("name a reading 30 σ off", () => {
    const outlier = { sigmas: eitherWay(30) };
    const tally = simulate({ seed: 600, sigmas: common, told: false, outlier });
    expect(tally.named).toBeGreaterThanOrEqual(0.97);
  });
});
