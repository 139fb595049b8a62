import { describe, expect, it } from "vitest";
import { check, input, numbersOf } from "@/tests/support/checks";
import { BEATING_INTERVALS, beatRates, beats, beatsPerSecond, evenness, harmonicNotes } from "./beats";
import { equalTemperedHz, keyFromName } from "./keys";
import { inharmonicCents } from "./partials";

const SHORT = {
  m3: "minor-third",
  M3: "major-third",
  P4: "fourth",
  P5: "fifth",
  m6: "minor-sixth",
  M6: "major-sixth",
} as const;

function idealRate(short: keyof typeof SHORT, lowerMidi: number): number {
  const found = beatRates(harmonicNotes(21, 108)).find(
    (beat) => beat.interval === SHORT[short] && beat.lowerMidi === lowerMidi,
  );
  if (!found) throw new Error(`No ${short} on ${lowerMidi}`);
  return found.beatsPerSecond;
}

describe("beats of equal temperament without inharmonicity", () => {
  it("are the fifty printed by Capleton, to the printed digit", () => {
    // B. Capleton 2007, as Table 1 of Teki et al. 2012, J. Neurosci. 32:12251 (SEEN).
    const printed = check("et.beats.capleton").expected as Record<keyof typeof SHORT, number[]>;
    let compared = 0;
    for (const short of Object.keys(SHORT) as (keyof typeof SHORT)[]) {
      printed[short].forEach((rate, step) => {
        expect(Math.abs(Math.abs(idealRate(short, 53 + step)) - rate)).toBeLessThan(0.06);
        compared += 1;
      });
    }
    expect(compared).toBe(50);
  });

  it("have the sign of the interval: thirds and sixths wide or narrow as tempered", () => {
    const table = check("et.beats.F3F4").expected as Record<string, unknown>;
    for (const [note, row] of Object.entries(table)) {
      const midi = keyFromName(note) ?? 0;
      for (const [short, rate] of Object.entries(numbersOf(row, note))) {
        expect(idealRate(short as keyof typeof SHORT, midi)).toBeCloseTo(rate, 3);
      }
    }
  });

  it("quicken by a semitone's ratio per semitone", () => {
    const ratio = numbersOf(check("et.semitone.property").expected, "ratio").ratio ?? 0;
    expect(idealRate("M3", 60) / idealRate("M3", 59)).toBeCloseTo(ratio, 10);
  });

  it("are shared by an interval and what completes it to the octave", () => {
    // Algebra: shared coincident partial.
    expect(-idealRate("m3", 53)).toBeCloseTo(idealRate("M6", 56), 9);
    expect(-idealRate("m6", 53)).toBeCloseTo(idealRate("M3", 61), 9);
    expect(2 * idealRate("M3", 53)).toBeCloseTo(-idealRate("m6", 57), 9);
    expect(-2 * idealRate("P5", 53)).toBeCloseTo(idealRate("P4", 60), 9);
    expect(2 * idealRate("M6", 53)).toBeCloseTo(-idealRate("m3", 62), 9);
  });

  it.each([
    ["m3", 3],
    ["M3", 4],
    ["P4", 5],
    ["P5", 7],
    ["m6", 8],
    ["M6", 9],
    ["P8", 12],
    ["M10", 16],
    ["P12", 19],
    ["P15", 24],
  ])("come from the tempering of %s", (short, semitones) => {
    const { just, et_minus_just } = numbersOf(check(`tempering.${short}`).expected, short);
    const rule = BEATING_INTERVALS.find((interval) => interval.semitones === semitones);
    const pure = 1200 * Math.log2((rule?.lowerPartial ?? 0) / (rule?.upperPartial ?? 1));
    expect(pure).toBeCloseTo(just ?? Number.NaN, 9);
    expect(100 * semitones - pure).toBeCloseTo(et_minus_just ?? Number.NaN, 9);
  });
});

describe("beats of stiff strings", () => {
  it("are slower on the third F3-A3 than the tables say", () => {
    const lower = { f1Hz: equalTemperedHz(53), b: 2e-4 };
    const upper = { f1Hz: equalTemperedHz(57), b: 2.2e-4 };
    // Formula (beats.inharm.F3A3): 6.2875 where the table has 6.9294.
    expect(beatsPerSecond(lower, 5, upper, 4)).toBeCloseTo(6.2875, 4);
  });

  it.each(["octave.A3-A4", "octave.C4-C5", "octave.A4-A5"])(
    "vanish in an octave of the width computed: %s",
    (id) => {
      const { inputs, expected } = check(id);
      const bLow = inputs.B_low ?? 0;
      const bHigh = inputs.B_high ?? 0;
      for (const [type, width] of Object.entries(numbersOf(expected, id))) {
        const [p = 0, q = 0] = type.split(":").map(Number);
        expect(inharmonicCents(p, bLow) - inharmonicCents(q, bHigh)).toBeCloseTo(width, 6);
        const upper = { f1Hz: 440 * 2 ** (width / 1200), b: bHigh };
        expect(beatsPerSecond({ f1Hz: 220, b: bLow }, p, upper, q)).toBeCloseTo(0, 5);
      }
    },
  );
});

describe("beatless widths", () => {
  it.each([
    "interval.double_octave_4:1_A3-A5",
    "interval.twelfth_3:1_A3-E5",
    "interval.fifth_3:2_A3-E4",
    "interval.fourth_4:3_A3-D4",
    "interval.M3_5:4_A3-C#4",
  ])("exceed the just ratio as the formula says: %s", (id) => {
    const each = check(id);
    const { total = Number.NaN } = numbersOf(each.expected, id);
    const upper = { f1Hz: 220 * 2 ** (total / 1200), b: input(each, "B_high") };
    const lower = { f1Hz: 220, b: input(each, "B_low") };
    expect(beatsPerSecond(lower, input(each, "p"), upper, input(each, "q"))).toBeCloseTo(0, 6);
  });
});

describe("evenness", () => {
  it("of ideal equal temperament is near perfect: thirds, sixths and tenths rise without a reversal", () => {
    const { intervals } = evenness(harmonicNotes(21, 108));
    expect(intervals.map(({ name }) => name)).toEqual(["major-third", "major-sixth", "major-tenth"]);
    for (const { rates, roughness, reversals } of intervals) {
      expect(rates).toHaveLength(18);
      expect(roughness).toBeLessThan(0.005);
      expect(reversals).toEqual([]);
    }
  });

  it("names the third that a note two cents flat spoils", () => {
    const notes = harmonicNotes(21, 108).map((note) =>
      note.midi === 60 ? { ...note, f1Hz: note.f1Hz * 2 ** (-2 / 1200) } : note,
    );
    const [thirds] = evenness(notes).intervals;
    // The third below it comes out slow; after the wide third above it the next one falls back.
    expect(thirds?.reversals).toEqual([56, 61]);
    expect(thirds?.roughness).toBeGreaterThan(0.03);
  });

  it("of a well temperament is rougher than of the equal", () => {
    const roughness = (temperament: "equal" | "werckmeister-3") =>
      beats({ temperament }).evenness.intervals[0]?.roughness ?? 0;
    expect(roughness("werckmeister-3")).toBeGreaterThan(20 * roughness("equal"));
  });

  it("is empty, not broken, without notes", () => {
    for (const { rates, roughness } of evenness([]).intervals) {
      expect(rates).toEqual([]);
      expect(roughness).toBe(0);
    }
  });
});

describe("beats of given notes", () => {
  it("refuse a note without a frequency and a note given twice", () => {
    const good = { midi: 60, f1Hz: 261.6, b: 3e-4 };
    expect(() => beats({ notes: [good, { ...good, midi: 61, f1Hz: 0 }] })).toThrow(
      expect.objectContaining({ code: "bad-frequency", path: "notes[1].f1Hz" }),
    );
    expect(() => beats({ notes: [good, good] })).toThrow(
      expect.objectContaining({ code: "duplicate-note", path: "notes[1].midi" }),
    );
    expect(() => beats({ notes: [{ ...good, b: 2 }] })).toThrow(
      expect.objectContaining({ path: "notes[0].b" }),
    );
  });
});
