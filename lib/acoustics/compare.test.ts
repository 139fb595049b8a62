import { describe, expect, it } from "vitest";
import { type Random, seededRandom } from "@/tests/support/simulated-instrument";
import { compare } from "./compare";
import type { NoteReadings } from "./compare-types";
import { typicalB } from "./fit-prior";
import { equalTemperedHz } from "./keys";
import { partialHzFromF1 } from "./partials";
import { REGISTERS, registerOf } from "./registers";

const PAIRS = 2000;

/** One visit's readings of a string whose own departures from the law are `own`, with a reading error on top. */
function visitOf(
  random: Random,
  midi: number,
  b: number,
  cents: number,
  own: number[],
  error: number,
): NoteReadings {
  const f1Hz = equalTemperedHz(midi) * 2 ** (cents / 1200);
  const readings = own.map((departure, i) => ({
    partial: i + 1,
    hz: partialHzFromF1(i + 1, f1Hz, b) * 2 ** ((departure + error * random.normal()) / 1200),
  }));
  return { midi, readings };
}

type Pair = { before: NoteReadings[]; after: NoteReadings[]; changed: Set<number> };

/** Two visits to an invented instrument: every fourth note read, the whole fallen in pitch, a share of strings replaced. */
function randomPair(random: Random, share: number, error: () => number): Pair {
  const { uniform, normal } = random;
  const pair: Pair = { before: [], after: [], changed: new Set() };
  for (let midi = 22 + Math.floor(4 * uniform()); midi <= 100; midi += 4) {
    const b = typicalB(midi) * Math.exp(0.2 * normal());
    const isChanged = uniform() < share;
    if (isChanged) pair.changed.add(midi);
    const factor = isChanged ? 1.25 ** (uniform() < 0.5 ? -1 : 1) : 1;
    const count = midi < 72 ? 7 + Math.floor(5 * uniform()) : midi < 90 ? 5 : 4;
    const scatter = 0.3 + uniform();
    const own = Array.from({ length: count }, () => scatter * normal());
    const fallen = -8 + 4 * normal();
    const sigma = error();
    pair.before.push(visitOf(random, midi, b, 0, own, sigma));
    pair.after.push(visitOf(random, midi, b * factor * 2 ** (-fallen / 600), fallen, own, sigma));
  }
  return pair;
}

function simulate(seed: number, share: number, spread: (random: Random) => number, pairs = PAIRS) {
  const random = seededRandom(seed);
  let falseShare = 0;
  const power = new Map(REGISTERS.map((register) => [register, { found: 0, all: 0 }]));
  for (let k = 0; k < pairs; k += 1) {
    const { before, after, changed } = randomPair(random, share, () => spread(random));
    const { notes } = compare({ before: { notes: before }, after: { notes: after } });
    const called = notes.filter(({ verdict }) => verdict === "changed").map(({ midi }) => midi);
    const wrong = called.filter((midi) => !changed.has(midi)).length;
    falseShare += called.length === 0 ? 0 : wrong / called.length / pairs;
    for (const midi of changed) {
      const tally = power.get(registerOf(midi));
      if (!tally) continue;
      tally.all += 1;
      if (called.includes(midi)) tally.found += 1;
    }
  }
  return {
    falseShare,
    power: [...power].map(([register, { found, all }]) => ({ register, share: found / Math.max(1, all) })),
  };
}

describe("2 000 simulated pairs of visits", () => {
  it("call at most 7 % of the changed notes wrongly so, and find most changes of 25 %", () => {
    const { falseShare, power } = simulate(900, 0.15, () => 0.3);
    console.info(
      `False-discovery rate ${(100 * falseShare).toFixed(1)} % at q = 0.05; found of 25 % changes: ${power
        .map(({ register, share }) => `${register} ${(100 * share).toFixed(0)} %`)
        .join(", ")}`,
    );
    expect(falseShare).toBeLessThanOrEqual(0.07);
    for (const { share } of power) expect(share).toBeGreaterThan(0.8);
  });
});

describe("harder pairs", () => {
  it.each([
    ["nothing changed", 901, 0, (random: Random) => 0.15 + 0.3 * random.uniform()],
    ["half of the strings changed", 902, 0.5, (random: Random) => 0.15 + 0.3 * random.uniform()],
    [
      "reading errors that differ fivefold from note to note",
      903,
      0.15,
      (random: Random) => 0.1 * 5 ** random.uniform(),
    ],
  ] as const)("keep the rate with %s", (_, seed, share, spread) => {
    expect(simulate(seed, share, spread, 400).falseShare).toBeLessThanOrEqual(0.07);
  });
});

describe("two visits", () => {
  const random = seededRandom(910);
  const keys = [33, 40, 45, 52, 57, 60, 64, 69, 76, 81];
  const own = new Map(keys.map((midi) => [midi, Array.from({ length: 8 }, () => 0.9 * random.normal())]));
  const visit = (factor: (midi: number) => number, cents: (midi: number) => number) =>
    keys.map((midi) =>
      visitOf(
        random,
        midi,
        typicalB(midi) * factor(midi) * 2 ** (-cents(midi) / 600),
        cents(midi),
        own.get(midi) ?? [],
        0.2,
      ),
    );
  const before = visit(
    () => 1,
    () => 0,
  );
  const after = visit(
    (midi) => (midi === 60 ? 1.25 : 1),
    (midi) => (midi < 60 ? -6 : -3),
  );
  const result = compare({
    before: { notes: before, humidityPercent: 52 },
    after: { notes: after, humidityPercent: 38 },
  });

  it("find the one replaced string, and say how small a change would have been found", () => {
    expect(result.notes.filter(({ verdict }) => verdict === "changed").map(({ midi }) => midi)).toEqual([60]);
    const note = result.notes.find(({ midi }) => midi === 60);
    expect(note?.deltaLnB).toBeCloseTo(Math.log(1.25), 1);
    for (const { detectableChange, verdict } of result.notes) {
      expect(verdict).not.toBe("not-comparable");
      expect(detectableChange).toBeGreaterThan(0);
      expect(detectableChange).toBeLessThan(1);
    }
  });

  it("report the fall of pitch by register, with the humidity", () => {
    const fall = Object.fromEntries(result.pitch.map(({ register, meanCents }) => [register, meanCents]));
    expect(fall.bass).toBeCloseTo(-6, 0);
    expect(fall.treble).toBeCloseTo(-3, 0);
    expect(result.humidity).toEqual({ beforePercent: 52, afterPercent: 38, changePercent: -14 });
  });

  it("are not fooled by tension: a string raised 100 cents keeps its B at common pitch", () => {
    const [note] = visit(
      () => 1,
      () => 0,
    ).slice(-1);
    const [raised] = visit(
      () => 1,
      () => 100,
    ).slice(-1);
    if (!note || !raised) throw new Error("No note");
    const { notes } = compare({ before: { notes: [note] }, after: { notes: [raised] } });
    expect(notes[0]?.verdict).toBe("unchanged");
    expect(Math.abs(notes[0]?.deltaLnB ?? 1)).toBeLessThan(0.03);
    expect(notes[0]?.pitchCents).toBeCloseTo(100, 0);
  });

  it("leave out a partial misread on one visit", () => {
    const spoiled = after.map((note) =>
      note.midi !== 45
        ? note
        : {
            ...note,
            readings: note.readings.map((each) =>
              each.partial === 6 ? { ...each, hz: (each.hz ?? 0) * 2 ** (9 / 1200) } : each,
            ),
          },
    );
    const { notes } = compare({ before: { notes: before }, after: { notes: spoiled } });
    const note = notes.find(({ midi }) => midi === 45);
    expect(note?.matchedPartials).not.toContain(6);
    expect(note?.verdict).toBe("unchanged");
  });

  it.each([
    ["not-read-after", { notes: before }, { notes: after.slice(1) }],
    ["not-read-before", { notes: before.slice(1) }, { notes: after }],
    [
      "different-string",
      {
        notes: [
          { ...before[0], midi: 33, readings: before[0]?.readings ?? [], string: 1 },
          ...before.slice(1),
        ],
      },
      {
        notes: [{ ...after[0], midi: 33, readings: after[0]?.readings ?? [], string: 2 }, ...after.slice(1)],
      },
    ],
    [
      "too-few-matched-partials",
      { notes: [{ midi: 33, readings: (before[0]?.readings ?? []).slice(0, 4) }, ...before.slice(1)] },
      { notes: [{ midi: 33, readings: (after[0]?.readings ?? []).slice(2) }, ...after.slice(1)] },
    ],
  ] as const)("call a note not comparable: %s", (reason, first, second) => {
    const note = compare({ before: first, after: second }).notes.find(({ midi }) => midi === 33);
    expect(note).toMatchObject({ verdict: "not-comparable", reason, deltaLnB: null, pValue: null });
  });

  it("name the field of bad input inside the visit", () => {
    const [first] = before;
    if (!first) throw new Error("No note");
    const bad = { ...first, readings: [{ partial: 1, hz: -1 }] };
    expect(() =>
      compare({ before: { notes: before }, after: { notes: [first, { ...bad, midi: 34 }] } }),
    ).toThrow(expect.objectContaining({ code: "bad-frequency", path: "after.notes[1].readings[0].hz" }));
    expect(() => compare({ before: { notes: [first, first] }, after: { notes: after } })).toThrow(
      expect.objectContaining({ code: "duplicate-note", path: "before.notes[1].midi" }),
    );
    expect(() => compare({ before: { notes: [] }, after: { notes: after } })).toThrow(
      expect.objectContaining({ code: "no-notes", path: "before.notes" }),
    );
    expect(() =>
      compare({ before: { notes: before }, after: { notes: after }, falseDiscoveryRate: 1.5 }),
    ).toThrow(expect.objectContaining({ code: "bad-rate" }));
    expect(() =>
      compare({ before: { notes: before, humidityPercent: 130 }, after: { notes: after } }),
    ).toThrow(expect.objectContaining({ code: "bad-humidity", path: "before.humidityPercent" }));
  });
});
