import { describe, expect, it } from "vitest";
import {
  countOf,
  isFarFlat,
  jobToOpen,
  type NoteFacts,
  progressOf,
  type SheetFacts,
  type Standing,
  stepAfter,
  strangersAmong,
} from "./rules";

const sheet = (facts: Partial<SheetFacts>): SheetFacts => ({
  id: "s",
  stage: "as-found",
  takenAt: "2026-05-14T08:10:00.000Z",
  referenceHz: 440,
  humidityPercent: 58,
  temperatureC: 21.4,
  ...facts,
});

const note = (facts: Partial<NoteFacts>): NoteFacts => ({
  sheetId: "s",
  midi: 69,
  string: 0,
  f1Hz: 440,
  b: 6e-4,
  bSigma: 2e-5,
  rmsCents: 0.2,
  quality: "good",
  ...facts,
});

const standing = (facts: Partial<Standing>): Standing => ({
  sheetId: "s",
  takenAt: "2026-05-14T08:10:00.000Z",
  notes: 1,
  referenceHz: 440,
  a4Cents: 0,
  pitchCents: 0,
  humidityPercent: null,
  temperatureC: null,
  ...facts,
});

describe("how far a job is", () => {
  it("tells A4 apart from the instrument as a whole", () => {
    // 1200 log2(441/440) = 3.93 cents; A3 stands a cent above its 220 Hz.
    const { found } = progressOf(
      [sheet({})],
      [note({ f1Hz: 441 }), note({ midi: 57, f1Hz: 220 * 2 ** (1 / 1200) })],
      null,
    );
    expect(found?.a4Cents).toBeCloseTo(3.93, 2);
    expect(found?.pitchCents).toBeCloseTo((3.93 + 1) / 2, 2);
    expect(found).toMatchObject({ notes: 2, humidityPercent: 58, temperatureC: 21.4 });
  });

  it("measures A4 from the sheet's own reference", () => {
    const { found } = progressOf([sheet({ referenceHz: 442 })], [note({ f1Hz: 442 })], null);
    expect(found?.a4Cents).toBeCloseTo(0, 9);
  });

  it("lets the fullest sheet carry the readings, not the newest", () => {
    const full = sheet({ id: "found" });
    const short = sheet({ id: "left", stage: "as-left", takenAt: "2026-05-14T10:00:00.000Z" });
    const notes = [
      note({ sheetId: "found" }),
      note({ sheetId: "found", midi: 60, quality: "repeat" }),
      note({ sheetId: "left" }),
    ];
    const progress = progressOf([full, short], notes, null);
    expect(progress.readings).toMatchObject({ sheetId: "found", notes: 2, good: 1, usable: 0, repeat: 1 });
    expect(progress.left?.sheetId).toBe("left");
  });

  it("does not take an empty sheet for a reading where a later one was read", () => {
    const empty = sheet({ id: "empty" });
    const read = sheet({ id: "read", takenAt: "2026-05-14T09:00:00.000Z" });
    const progress = progressOf([empty, read], [note({ sheetId: "read" })], null);
    expect(progress.found?.sheetId).toBe("read");
    expect(progress.otherSheets.map(({ id }) => id)).toEqual(["empty"]);
  });

  it("loses no sheet: a second one as found is named beside the rest", () => {
    const sheets = ["1", "2", "3"].map((id) => sheet({ id }));
    const notes = ["1", "2", "3"].map((sheetId) => note({ sheetId }));
    expect(progressOf(sheets, notes, null).otherSheets.map(({ id }) => id)).toEqual(["2", "3"]);
  });
});

describe("counting notes", () => {
  it("takes the best take of a string and the worst string of a note", () => {
    const repeated = [note({ quality: "repeat" }), note({ quality: "good" })];
    const twoStrings = [
      note({ midi: 60, string: 1, quality: "good" }),
      note({ midi: 60, string: 2, quality: "usable" }),
    ];
    expect(countOf([...repeated, ...twoStrings])).toEqual({ notes: 2, good: 1, usable: 1, repeat: 0 });
  });
});

describe("notes that do not belong", () => {
  const range = { firstMidi: 21, lastMidi: 108, breakMidi: null };
  // B doubling every octave is a smooth treble; the figures are made up for this test.
  const smooth = [57, 60, 64, 67, 69, 72, 76, 79, 84, 88].map((midi) => {
    const b = 3e-4 * 2 ** ((midi - 57) / 12);
    return note({ midi, b, bSigma: b * 0.02 });
  });

  it("names the one far off the others' curve, and none of a smooth scale", () => {
    expect(strangersAmong(smooth, range)).toEqual([]);
    const odd = smooth.map((one) => (one.midi === 76 ? { ...one, b: (one.b ?? 0) * 2 } : one));
    const strangers = strangersAmong(odd, range);
    expect(strangers[0]?.midi).toBe(76);
    expect(strangers[0]?.b).toBeGreaterThan(strangers[0]?.expectedB ?? Number.POSITIVE_INFINITY);
  });

  it("has nothing to say of notes without B", () => {
    expect(strangersAmong([note({ b: null, bSigma: null })], range)).toEqual([]);
  });
});

describe("what comes next", () => {
  const plan = {
    sheetId: "s",
    styleName: "Even",
    temperament: "equal" as const,
    referenceHz: 440,
    createdAt: "2026-05-14T08:40:00.000Z",
  };
  const found = standing({});

  it("goes from found to plan to left, and stops there", () => {
    expect(stepAfter({ found: null, plan: null, left: null }, [])).toBe("found");
    expect(stepAfter({ found: standing({ notes: 0 }), plan: null, left: null }, [])).toBe("found");
    expect(stepAfter({ found, plan: null, left: null }, [])).toBe("plan");
    expect(stepAfter({ found, plan, left: null }, [])).toBe("left");
    expect(stepAfter({ found, plan, left: standing({}) }, [])).toBeNull();
  });

  it("puts a note that does not belong first, until the instrument is read as left", () => {
    expect(stepAfter({ found, plan, left: null }, [76])).toBe("look");
    expect(stepAfter({ found, plan, left: standing({}) }, [76])).toBeNull();
  });

  it("opens the job asked for, else the first not finished", () => {
    const jobs = [
      { id: "1", progress: { left: standing({}) } },
      { id: "2", progress: { left: null } },
    ];
    expect(jobToOpen(jobs)?.id).toBe("2");
    expect(jobToOpen(jobs, "1")?.id).toBe("1");
    expect(jobToOpen(jobs.slice(0, 1), "gone")?.id).toBe("1");
  });
});

describe("the caution before a pitch raise", () => {
  it("is given beyond 20 cents flat, by A4 or by the whole, and never for sharp", () => {
    expect(isFarFlat({ a4Cents: -20, pitchCents: -19 })).toBe(false);
    expect(isFarFlat({ a4Cents: -20.1, pitchCents: null })).toBe(true);
    expect(isFarFlat({ a4Cents: -4, pitchCents: -26 })).toBe(true);
    expect(isFarFlat({ a4Cents: 40, pitchCents: 38 })).toBe(false);
    expect(isFarFlat(null)).toBe(false);
  });
});
