import { describe, expect, it } from "vitest";
import { equalTemperedHz, partialHzFromF1, raiseByCents } from "@/lib/acoustics";
import {
  fitInputOf,
  keyModel,
  observationsOf,
  pitchOf,
  pitchOffset,
  questionAbout,
  readingCents,
  readingHz,
  readingsToAskAbout,
} from "./rules";

const fitted = (midi: number, b: number | null, bSigma = 1e-5, f1Hz = equalTemperedHz(midi, 440)) => ({
  midi,
  b,
  bSigma: b === null ? null : bSigma,
  f1Hz,
  rmsCents: 0.5,
});

/** Partials of a stiff string, Fletcher's law, with f1 and B given. */
const string = (midi: number, b: number, partials: readonly number[], offsetCents = 0) =>
  partials.map((partial) => ({
    partial,
    hz: partialHzFromF1(partial, raiseByCents(equalTemperedHz(midi, 440), offsetCents), b),
  }));

const ask = (
  midi: number,
  readings: readonly { partial: number; hz: number }[],
  more: Partial<Parameters<typeof readingsToAskAbout>[0]> = {},
) =>
  readingsToAskAbout({
    fitInput: { midi, readings, kept: [], dropped: [] },
    midi,
    referenceHz: 440,
    pitchOffsetCents: null,
    model: undefined,
    confirmed: [],
    ...more,
  });

describe("readings in hertz and cents", () => {
  it("count cents from the nth harmonic at the sheet's reference", () => {
    expect(readingHz({ partial: 2, cents: 0 }, 69, 442)).toBeCloseTo(884, 9);
    expect(readingCents(2, readingHz({ partial: 2, cents: 13.7 }, 40, 442), 40, 442)).toBeCloseTo(13.7, 9);
    expect(readingHz({ partial: 2, hz: 881.3 }, 69, 442)).toBe(881.3);
  });

  it("carry a reading's own error to the fit only where it was given", () => {
    const input = fitInputOf({
      midi: 69,
      referenceHz: 440,
      partials: [1, 2],
      hz: [440, 881],
      sigmaCents: [0.3, null],
      kept: [2],
      dropped: [],
    });
    expect(input.readings).toEqual([
      { partial: 1, hz: 440, sigmaCents: 0.3 },
      { partial: 2, hz: 881 },
    ]);
    expect(input.kept).toEqual([2]);
  });
});

describe("several strings and takes of one key", () => {
  it("pool to one observation weighted by their errors", () => {
    const [one] = observationsOf([fitted(60, 4e-4, 1e-5), fitted(60, 4.1e-4, 2e-5)]);
    expect(one?.b).toBeCloseTo((4e-4 * 4 + 4.1e-4) / 5, 12);
    expect(one?.bSigma).toBeCloseTo(1e-5 / Math.sqrt(1.25), 12);
  });

  it("widen the error where they disagree by more than they should", () => {
    const [one] = observationsOf([fitted(60, 4e-4, 1e-6), fitted(60, 5e-4, 1e-6)]);
    expect(one?.bSigma).toBeGreaterThan(3e-5);
  });

  it("leave out what has no B, and keep the keys in order", () => {
    expect(
      observationsOf([fitted(72, 8e-4), fitted(60, null), fitted(40, 1e-4)]).map(({ midi }) => midi),
    ).toEqual([40, 72]);
  });
});

describe("the instrument's pitch", () => {
  it("is the median of its middle keys, whatever the ends do", () => {
    const pitch = [
      { midi: 24, cents: -30 },
      { midi: 50, cents: -7 },
      { midi: 60, cents: -6 },
      { midi: 70, cents: -8 },
      { midi: 105, cents: 60 },
    ];
    expect(pitchOffset(pitch)).toBe(-7);
    expect(pitchOffset(pitch.filter(({ midi }) => midi < 30 || midi > 100))).toBe(15);
    expect(pitchOffset([])).toBeNull();
  });

  it("takes the mean of a key's takes", () => {
    const up = (cents: number) => raiseByCents(equalTemperedHz(60, 440), cents);
    const [one] = pitchOf([fitted(60, 4e-4, 1e-5, up(4)), fitted(60, 4e-4, 1e-5, up(8))], 440);
    expect(one?.cents).toBeCloseTo(6, 9);
  });
});

describe("readings to ask about", () => {
  it("does not ask about honest high partials, hundreds of cents above the harmonic", () => {
    const readings = string(96, 8e-3, [1, 2, 3, 4, 5, 6]);
    expect(readingCents(6, readings[5]?.hz ?? 0, 96, 440)).toBeGreaterThan(150);
    expect(ask(96, readings, { model: { b: 8e-3, lnBSigma: 0.1 } })).toEqual([]);
  });

  it("asks about a partial that lies more than 200 cents off the others, and says which partial it looks like", () => {
    const readings = string(57, 2e-4, [1, 2, 3, 4, 5]).map((reading) =>
      reading.partial === 4 ? { partial: 4, hz: string(57, 2e-4, [6])[0]?.hz ?? 0 } : reading,
    );
    const [question, ...more] = ask(57, readings);
    expect(more).toEqual([]);
    expect(question).toMatchObject({ partial: 4, fitsPartial: 6 });
    expect(question?.awayCents).toBeGreaterThan(650);
    expect(question && questionAbout(question)).toMatch(
      /^Partial 4 is \d+ cents above where it is expected \(\d+\.\d\d Hz\)\. It looks like partial 6\./,
    );
  });

  it("asks nothing below 200 cents, but lets the fit name it", () => {
    const readings = string(57, 2e-4, [1, 2, 3, 4, 5]).map((reading) =>
      reading.partial === 4 ? { partial: 4, hz: raiseByCents(reading.hz, 150) } : reading,
    );
    expect(ask(57, readings)).toEqual([]);
  });

  it("expects the first reading where the instrument stands, not where it should", () => {
    const flat = string(57, 2e-4, [1], -230);
    expect(ask(57, flat)).toHaveLength(1);
    expect(ask(57, flat, { pitchOffsetCents: -220 })).toEqual([]);
  });

  it("does not ask again about what was confirmed, nor about what is dropped", () => {
    const far = [{ partial: 1, hz: 440 }];
    expect(ask(57, far)).toHaveLength(1);
    expect(ask(57, far, { confirmed: [1] })).toEqual([]);
    expect(ask(57, [], { fitInput: { midi: 57, readings: far, dropped: [1] } })).toEqual([]);
  });

  it("predicts a key from the others and stays silent on a key outside the keyboard", () => {
    const others = [28, 40, 52, 64, 76].map((midi) => fitted(midi, 2e-4 * Math.exp((midi - 40) / 16)));
    const range = { firstMidi: 21, lastMidi: 108, breakMidi: 41 };
    const model = keyModel(others, 60, range);
    expect(model?.b).toBeGreaterThan(2e-4);
    expect(model?.b).toBeLessThan(2e-3);
    expect(keyModel(others, 120, range)).toBeUndefined();
  });
});
