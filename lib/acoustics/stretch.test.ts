import { describe, expect, it } from "vitest";
import { planByElimination } from "@/tests/support/plan-by-elimination";
import { recordedNotes, referenceCheck } from "@/tests/support/reference-checks";
import { keyboard } from "./keyboard";
import { publishedMeanB } from "./keyboard-prior";
import { planFrom, stretch } from "./stretch";
import { builtInStyles, publishedOctaveType } from "./styles";
import { temperamentOffsets } from "./temperament";
import type { BuiltInStyle, IntervalRule, StretchResult, Style, TemperamentName } from "./types";

const meanKeys = (firstMidi = 21, lastMidi = 108) =>
  Array.from({ length: lastMidi - firstMidi + 1 }, (_, i) => ({
    midi: firstMidi + i,
    b: publishedMeanB(firstMidi + i),
  }));

const cents = (plan: StretchResult, midi: number) =>
  plan.notes.find((note) => note.midi === midi)?.stretchCents ?? Number.NaN;

const only = (lowerPartial: number, upperPartial: number, semitones: number): Style => ({
  intervals: [{ lowerPartial, upperPartial, semitones, weights: 1 }],
  smoothness: 0,
});

/** Width in cents of the beatless interval between two keys alone. */
function width(
  low: { midi: number; b: number },
  high: { midi: number; b: number },
  rule: IntervalRule,
): number {
  const plan = stretch({
    keys: [low, high],
    anchor: { midi: low.midi, partial: 1 },
    style: { intervals: [rule], smoothness: 0 },
  });
  return 100 * rule.semitones + cents(plan, high.midi) - cents(plan, low.midi);
}

describe("one interval", () => {
  it.each(["A3-A4", "C4-C5", "A4-A5", "A1-A2", "A2-A3"])("beatless octaves on strings like %s", (pair) => {
    const { inputs, expected } = referenceCheck(`octave.${pair}`);
    const { B_low: low = 0, B_high: high = 0 } = inputs;
    for (const [type, wider] of Object.entries(expected)) {
      const [lowerPartial = 0, upperPartial = 0] = type.split(":").map(Number);
      const found = width(
        { midi: 57, b: low },
        { midi: 69, b: high },
        { lowerPartial, upperPartial, semitones: 12, weights: 1 },
      );
      expect(found - 1200).toBeCloseTo(wider, 6);
    }
  });

  it.each([
    ["double_octave_4:1_A3-A5", 24],
    ["twelfth_3:1_A3-E5", 19],
    ["fifth_3:2_A3-E4", 7],
    ["fourth_4:3_A3-D4", 5],
    ["M3_5:4_A3-C#4", 4],
  ])("beatless %s, aimed at the just width", (name, semitones) => {
    const { inputs, expected } = referenceCheck(`interval.${name}`);
    const { p = 0, q = 0, B_low: low = 0, B_high: high = 0 } = inputs;
    const rule = { lowerPartial: p, upperPartial: q, semitones, weights: 1 };
    const keys = [
      { midi: 57, b: low },
      { midi: 57 + semitones, b: high },
    ] as const;
    expect(width(...keys, { ...rule, target: "just" })).toBeCloseTo(expected.total ?? 0, 6);
    expect(width(...keys, { ...rule, target: "tempered" }) - 100 * semitones).toBeCloseTo(
      expected.stretch ?? 0,
      6,
    );
  });

  it.each([1, 2, 3, 4, 5, 6])(
    "octaves 2ρ:ρ with ρ = %i reproduce the closed-form octave relation to 0.01 cent on every octave",
    (rho) => {
      // Rigaud, David & Daudet 2013 (form from memory): F0(m+12) = 2·F0(m)·sqrt((1+4ρ²B(m))/(1+ρ²B(m+12))).
      const keys = meanKeys();
      const plan = stretch({ keys, style: only(2 * rho, rho, 12) });
      const f0 = plan.notes.map(({ targetHz }, i) => targetHz / Math.sqrt(1 + (keys[i]?.b ?? 0)));
      for (let i = 0; i + 12 < keys.length; i += 1) {
        const low = keys[i]?.b ?? 0;
        const high = keys[i + 12]?.b ?? 0;
        const relation = 2 * Math.sqrt((1 + low * 4 * rho * rho) / (1 + high * rho * rho));
        const error = 1200 * Math.log2((f0[i + 12] ?? 0) / (f0[i] ?? 0) / relation);
        expect(Math.abs(error)).toBeLessThan(0.01);
      }
    },
  );
});

describe("several intervals on three notes A", () => {
  const weights = (first: number, octaveUp: number) => [first, ...new Array<number>(11).fill(0), octaveUp];
  const keys = [
    { midi: 57, b: 2e-4 },
    { midi: 69, b: 5e-4 },
    { midi: 81, b: 1.6e-3 },
  ];
  const rule = (lowerPartial: number, upperPartial: number, semitones: number, w: number | number[]) => ({
    lowerPartial,
    upperPartial,
    semitones,
    weights: w,
  });

  it("a 4:2 and a 2:1 octave close exactly into a 4:1 double octave", () => {
    const plan = stretch({
      keys,
      style: {
        intervals: [rule(4, 2, 12, weights(1, 0)), rule(2, 1, 12, weights(0, 1)), rule(4, 1, 24, 1)],
        smoothness: 0,
      },
    });
    // (p:q) + (q:r) = (p:r) for coincident partials; figures computed from the formula.
    expect(cents(plan, 57)).toBeCloseTo(-1.2956410829992562, 5);
    expect(cents(plan, 69)).toBe(0);
    expect(cents(plan, 81)).toBeCloseTo(1.296804773680325, 5);
  });

  it("contradicting octaves meet where the weights balance", () => {
    // Weights 6:3 and 4:2 below 1, above 4:2 1 and 2:1 2, 4:1 1; figures computed from the formula.
    const plan = stretch({
      keys,
      style: {
        intervals: [
          rule(6, 3, 12, weights(1, 0)),
          rule(4, 2, 12, weights(1, 1)),
          rule(2, 1, 12, weights(0, 2)),
          rule(4, 1, 24, 1),
        ],
        smoothness: 0,
      },
    });
    expect(cents(plan, 57)).toBeCloseTo(-1.670245, 5);
    expect(cents(plan, 81)).toBeCloseTo(1.460519, 5);
  });
});

describe("the whole compass", () => {
  it("follows the published curve of octave types (parameters from memory)", () => {
    const { expected } = referenceCheck("rigaud.rho");
    for (const [midi, rho] of Object.entries(expected)) {
      expect(publishedOctaveType(Number(midi))).toBeCloseTo(rho, 9);
    }
    const plan = stretch({ keys: meanKeys(), style: "published" });
    // f1 of the notes A by a chain of ρ-octaves from A4 on the mean instrument, computed from the formula.
    const chain = { 21: -47.83, 33: -17.98, 45: -7.41, 57: -3.21, 69: 0, 81: 4.73, 93: 13.52, 105: 33.63 };
    for (const [midi, value] of Object.entries(chain)) {
      expect(Math.abs(cents(plan, Number(midi)) - value)).toBeLessThan(0.25);
    }
  });

  it.each(["close", "even", "wide", "published"] as const)(
    "agrees with elimination on the equations as written: %s",
    (style) => {
      const keys = recordedOnEveryKey();
      const plan = stretch({ keys, style });
      planByElimination(keys, builtInStyles[style]).forEach((value, i) => {
        expect(plan.notes[i]?.stretchCents).toBeCloseTo(value, 3);
      });
    },
  );

  it("stretches as average expert tunings do: A0 15 to 50 flat, C8 20 to 50 sharp (Railsback 1938, from memory)", () => {
    for (const style of ["close", "even", "wide", "published"] satisfies BuiltInStyle[]) {
      const plan = stretch({ keys: meanKeys(), style });
      expect(cents(plan, 21)).toBeGreaterThan(-50);
      expect(cents(plan, 21)).toBeLessThan(-12);
      expect(cents(plan, 108)).toBeGreaterThan(20);
      expect(cents(plan, 108)).toBeLessThan(50);
      for (let midi = 57; midi <= 76; midi += 1) expect(Math.abs(cents(plan, midi))).toBeLessThan(4);
    }
  });

  it("orders the styles: wide reaches further than even, even further than close", () => {
    const [close = 0, even = 0, wide = 0] = (["close", "even", "wide"] as const).map((style) => {
      const plan = stretch({ keys: meanKeys(), style });
      return cents(plan, 108) - cents(plan, 21);
    });
    expect(even).toBeGreaterThan(close);
    expect(wide).toBeGreaterThan(even);
  });

  it.each([
    [21, 105],
    [21, 108],
    [17, 108],
    [12, 108],
  ])("plans the keys %i to %i and keeps common keys nearly where 88 keys put them", (firstMidi, lastMidi) => {
    const plan = stretch({ firstMidi, lastMidi });
    const usual = stretch({});
    expect(plan.notes).toHaveLength(lastMidi - firstMidi + 1);
    expect(plan.notes.every(({ bandCents }) => bandCents !== null && bandCents >= 0)).toBe(true);
    for (let midi = 40; midi <= 96; midi += 1) {
      expect(Math.abs(cents(plan, midi) - cents(usual, midi))).toBeLessThan(0.5);
    }
  });

  it("without observations is the mean instrument's plan with the widest band, and with exact B has none", () => {
    const prior = stretch({});
    const measured = stretch({
      observations: recordedNotes.map(({ midi, B, sigma_total: bSigma }) => ({ midi, b: B, bSigma })),
    });
    prior.notes.forEach(({ bandCents }, i) => {
      expect(measured.notes[i]?.bandCents).toBeLessThanOrEqual(bandCents ?? 0);
    });
    expect(stretch({ keys: meanKeys() }).notes.every(({ bandCents }) => bandCents === null)).toBe(true);
    expect(planFrom(keyboard({ observations: [] }))).toEqual(prior);
  });
});

describe("a note that does not belong", () => {
  const clean = recordedNotes
    .filter((_, index) => index % 3 === 0)
    .map(({ midi, B }) => ({ midi, b: B, bSigma: 0.01 * B }));
  const wrong = clean[Math.floor(clean.length / 2)]?.midi ?? 0;
  const withWrongWire = clean.map((one) => (one.midi === wrong ? { ...one, b: 1.6 * one.b } : one));

  it("changes nothing of the plan: it is as if it had not been read", () => {
    const { keys } = keyboard({ observations: withWrongWire });
    expect(keys.filter(({ flag }) => flag !== null).map(({ midi }) => midi)).toEqual([wrong]);
    const plan = stretch({ observations: withWrongWire });
    expect(plan).toEqual(stretch({ observations: clean.filter(({ midi }) => midi !== wrong) }));
    expect(plan.notes).not.toEqual(planFrom(keyboard({ observations: withWrongWire })).notes);
  });
});

describe("the anchor and the reference pitch", () => {
  it("puts the named partial of the named key at its pitch", () => {
    const keys = meanKeys();
    const plan = stretch({ keys, referenceHz: 442, anchor: { midi: 57, partial: 2 } });
    const note = plan.notes.find(({ midi }) => midi === 57);
    const b = publishedMeanB(57);
    expect(2 * (note?.targetHz ?? 0) * Math.sqrt((1 + 4 * b) / (1 + b))).toBeCloseTo(442, 9);
    expect(stretch({ keys, referenceHz: 435 }).notes.find(({ midi }) => midi === 69)?.targetHz).toBeCloseTo(
      435,
      9,
    );
  });

  it("moves every note alike", () => {
    const keys = meanKeys();
    const usual = stretch({ keys });
    const moved = stretch({ keys, anchor: { midi: 45, partial: 4 } });
    const shift = cents(moved, 69) - cents(usual, 69);
    for (const { midi } of keys) expect(cents(moved, midi) - cents(usual, midi)).toBeCloseTo(shift, 8);
  });

  it("names a partial to listen to that stands where the string's law puts it", () => {
    const plan = stretch({ keys: meanKeys() });
    for (const { midi, targetHz, listenPartial, listenHz } of plan.notes) {
      const b = publishedMeanB(midi);
      const expected = listenPartial * targetHz * Math.sqrt((1 + b * listenPartial ** 2) / (1 + b));
      expect(listenHz / expected).toBeCloseTo(1, 12);
    }
    expect(plan.notes[0]?.listenPartial).toBeGreaterThan(3);
    expect(plan.notes.at(-1)?.listenPartial).toBe(1);
  });
});

describe("temperament", () => {
  const tempered: TemperamentName[] = ["pythagorean", "meantone-quarter", "werckmeister-3", "vallotti"];

  it.each(tempered)("%s is added to the equal plan and never flattened by smoothing", (temperament) => {
    const keys = meanKeys();
    const offsets = temperamentOffsets(temperament);
    for (const smoothness of [0, 20, 5000]) {
      const style = { ...builtInStyles.even, smoothness };
      const equal = stretch({ keys, style });
      const plan = stretch({ keys, style, temperament });
      for (const { midi } of keys) {
        expect(cents(plan, midi) - cents(equal, midi)).toBeCloseTo(offsets[midi % 12] ?? 0, 7);
      }
    }
  });

  it("gives way to just fifths where a style aims at them", () => {
    const keys = meanKeys().map(({ midi }) => ({ midi, b: 0 }));
    const plan = stretch({
      keys,
      temperament: "meantone-quarter",
      style: {
        intervals: [{ lowerPartial: 3, upperPartial: 2, semitones: 7, weights: 1, target: "just" }],
        smoothness: 0,
      },
    });
    for (let midi = 21; midi <= 101; midi += 1) {
      expect(700 + cents(plan, midi + 7) - cents(plan, midi)).toBeCloseTo(1200 * Math.log2(1.5), 3);
    }
  });
});

describe("evenness", () => {
  it("is reported for the plan: thirds quicken over the temperament octaves", () => {
    const thirds = stretch({ keys: meanKeys() }).evenness.intervals.find(
      ({ name }) => name === "major-third",
    );
    expect(thirds?.rates.length).toBeGreaterThan(10);
    expect(thirds?.reversals).toEqual([]);
    expect(thirds?.roughness).toBeLessThan(0.05);
  });
});

describe("bad input", () => {
  const keys = meanKeys();
  const interval = { lowerPartial: 2, upperPartial: 1, semitones: 12, weights: 1 };
  const style = (changed: Partial<IntervalRule>, smoothness = 1) => ({
    intervals: [{ ...interval, ...changed }],
    smoothness,
  });

  it.each([
    [{ keys, observations: [{ midi: 69, b: 1e-3, bSigma: 1e-5 }] }, "observations-or-keys", "keys"],
    [{ keys: [...keys, { midi: 30, b: 1e-4 }] }, "duplicate-key", "keys[88].midi"],
    [{ keys: [{ midi: 69, b: -1e-4 }] }, "negative", "keys[0].b"],
    [{ keys: [{ midi: 69, b: 1e-4 }] }, "too-few-keys", "keys"],
    [{ keys: keys.slice(0, 12) }, "unknown-key", "anchor.midi"],
    [{ keys, style: style({ weights: -1 }) }, "negative", "style.intervals[0].weights"],
    [{ keys, style: style({ weights: [1, 1] }) }, "weights-too-short", "style.intervals[0].weights"],
    [{ keys, style: style({ weights: 0 }) }, "undetermined", "style.intervals"],
    [{ keys, style: style({ semitones: 12.5 }) }, "bad-interval", "style.intervals[0].semitones"],
    [{ keys, style: style({ lowerPartial: 3 }) }, "bad-interval", "style.intervals[0]"],
    [{ keys, style: style({ upperPartial: 0 }) }, "bad-partial", "style.intervals[0].upperPartial"],
    [{ keys, style: style({}, Number.NaN) }, "not-finite", "style.smoothness"],
    [{ keys, style: { intervals: [], smoothness: 1 } }, "no-intervals", "style.intervals"],
    [{ keys, referenceHz: 0 }, "not-positive", "referenceHz"],
    [{ keys, anchor: { midi: 130, partial: 1 } }, "unknown-key", "anchor.midi"],
    [{ keys, anchor: { midi: 69, partial: 1.5 } }, "bad-partial", "anchor.partial"],
  ])("is refused with its place (case %#)", (input, code, path) => {
    expect(() => stretch(input)).toThrow(expect.objectContaining({ name: "AcousticsError", code, path }));
  });
});

/** The thirty recorded notes with ln B joined by straight lines: an irregular but real curve over all keys. */
function recordedOnEveryKey(): { midi: number; b: number }[] {
  return meanKeys().map(({ midi }) => {
    const i = Math.min(28, Math.floor((midi - 21) / 3));
    const low = recordedNotes[i];
    const high = recordedNotes[i + 1];
    if (low === undefined || high === undefined) throw new Error("Thirty recorded notes expected");
    const share = (midi - low.midi) / (high.midi - low.midi);
    return { midi, b: Math.exp((1 - share) * Math.log(low.B) + share * Math.log(high.B)) };
  });
}
