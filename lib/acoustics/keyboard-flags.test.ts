import { describe, expect, it } from "vitest";
import { keyOf } from "@/tests/support/key-of";
import { observe, seededRandom, simulateInstrument, spreadKeys } from "@/tests/support/simulated-instrument";
import { keyboard } from "./keyboard";
import type { Observation } from "./types";

describe("notes that do not belong", () => {
  const twoGauges = 1.12 ** 2;

  /** Every third key, and every key of the run that starts at `start`. */
  function sheet(seed: number, start: number, length: number, factor: number): Observation[] {
    const random = seededRandom(seed);
    const run = new Set(Array.from({ length }, (_, i) => start + i));
    return simulateInstrument(random).keys.flatMap((key) => {
      if (run.has(key.midi)) return [observe({ ...key, b: key.b * factor }, random)];
      return key.midi % 3 === 0 ? [observe(key, random)] : [];
    });
  }

  const flagged = (observations: Observation[]) =>
    keyboard({ observations }).keys.flatMap(({ midi, flag }) => (flag === null ? [] : [midi]));

  it.each([
    [73, twoGauges],
    [79, 1 / twoGauges],
    [85, twoGauges],
  ])(
    "three treble keys from %i strung two gauges off are named although they vouch for each other",
    (start, factor) => {
      const sheets = 25;
      let whole = 0;
      let others = 0;
      for (let i = 0; i < sheets; i += 1) {
        const found = flagged(sheet(100 * start + i, start, 3, factor));
        const hits = found.filter((midi) => midi >= start && midi < start + 3).length;
        if (hits === 3) whole += 1;
        others += found.length - hits;
      }
      console.log(
        `run from ${start}: all three named on ${whole} of ${sheets} sheets, ${others} other keys named`,
      );
      expect(whole / sheets).toBeGreaterThanOrEqual(0.9);
      expect(others).toBeLessThanOrEqual(1);
    },
  );

  it("one note half as stiff again is named, and its neighbours are predicted as if it had not been read", () => {
    const clean = sheet(3, 80, 1, 1);
    const spoiled = clean.map((o) => (o.midi === 80 ? { ...o, b: 1.5 * o.b, bSigma: 1.5 * o.bSigma } : o));
    const without = keyboard({ observations: clean.filter(({ midi }) => midi !== 80), breakMidi: 45 });
    const withIt = keyboard({ observations: spoiled, breakMidi: 45 });
    expect(keyOf(withIt, 80)).toMatchObject({ flag: "does-not-belong", source: "measured" });
    expect(keyOf(withIt, 80).b / (spoiled.find(({ midi }) => midi === 80)?.b ?? 0)).toBeCloseTo(1, 2);
    for (const midi of [77, 79, 82]) {
      expect(keyOf(withIt, midi).b / keyOf(without, midi).b).toBeCloseTo(1, 3);
      expect(keyOf(withIt, midi).lnBSigma / keyOf(without, midi).lnBSigma).toBeCloseTo(1, 3);
    }
  });

  it("clean sheets are rarely accused", () => {
    const random = seededRandom(77);
    const sheets = 120;
    let accused = 0;
    for (let i = 0; i < sheets; i += 1) {
      const instrument = simulateInstrument(random);
      const count = [8, 15, 30, 60][i % 4] ?? 8;
      if (flagged(spreadKeys(instrument.keys, count, random).map((key) => observe(key, random))).length > 0) {
        accused += 1;
      }
    }
    console.log(`clean sheets with a false flag: ${accused} of ${sheets}`);
    expect(accused / sheets).toBeLessThanOrEqual(0.03);
  });

  it("the change a sheet says it would detect is detected nine times in ten", () => {
    let seen = 0;
    const sheets = 60;
    for (let i = 0; i < sheets; i += 1) {
      const clean = sheet(500 + i, 81, 1, 1);
      const change = keyOf(keyboard({ observations: clean }), 81).detectableChange ?? Number.NaN;
      expect(change).toBeGreaterThan(0.1);
      const factor = 1 + change;
      const changed = clean.map((o) =>
        o.midi === 81 ? { ...o, b: factor * o.b, bSigma: factor * o.bSigma } : o,
      );
      if (flagged(changed).includes(81)) seen += 1;
    }
    console.log(`detectable change seen on ${seen} of ${sheets} sheets`);
    expect(seen / sheets).toBeGreaterThanOrEqual(0.85);
  });
});
