import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readingHz } from "./rules";
import { editedReading, isBlank, readTyped, shownReading, typedFault, typedHz } from "./typed-number";

describe("a typed number", () => {
  it.each([
    ["784.2", 784.2],
    ["784,2", 784.2],
    ["−12.1", -12.1],
    ["–12,1", -12.1],
    ["-12.1", -12.1],
    ["+24.5", 24.5],
    [" 58 ", 58],
    ["1 046.5", 1046.5],
    ["1\u00a0046,5", 1046.5],
    ["12\u202f345.6", 12345.6],
    ["1,046.5", 1046.5],
    ["1.046,5", 1046.5],
    ["5.", 5],
    [".5", 0.5],
  ])("reads %j", (text, value) => {
    expect(readTyped(text)).toBeCloseTo(value, 10);
  });

  it.each([
    "",
    "abc",
    "12e3",
    "Infinity",
    "-Infinity",
    "NaN",
    "0x10",
    "1 2",
    "10 46.5",
    "5..2",
    "1,2,3",
    "12 cents",
    "--3",
  ])("does not guess at %j", (text) => {
    expect(readTyped(text)).toBeNull();
  });

  it("refuses what no string sounds, and says what to do", () => {
    expect(typedFault("abc", "hz")).toBe("Not a number. Write 784.2.");
    expect(typedFault("abc", "cents")).toBe("Not a number. Write −12.1.");
    expect(typedFault("0", "hz")).toBe("A frequency is above zero.");
    expect(typedFault("-440", "hz")).toBe("A frequency is above zero.");
    expect(typedFault("100001", "hz")).toContain("100 kHz");
    expect(typedFault("1046.5", "cents")).toBeNull();
    expect(typedFault("2401", "cents")).toContain("Hz?");
    expect(typedFault("-12.1", "cents")).toBeNull();
  });

  it("takes a lone dash or dot for an empty cell, not for a number", () => {
    for (const text of ["", "  ", "-", "−", "–", "·", "."]) expect(isBlank(text)).toBe(true);
    expect(isBlank("0")).toBe(false);
  });
});

describe("the two units of a reading", () => {
  const a4 = { partial: 3, midi: 69, referenceHz: 440 };

  it("count cents from the harmonic of the equal-tempered note", () => {
    expect(typedHz("0", "cents", a4)).toBeCloseTo(1320, 9);
    expect(typedHz("1200", "cents", a4)).toBeCloseTo(2640, 9);
  });

  it("shows six figures at most, with a true minus and a plus", () => {
    expect(shownReading(110.123, "hz", a4)).toBe("110.12");
    expect(shownReading(1046.52, "hz", a4)).toBe("1046.5");
    expect(shownReading(12_345.6, "hz", a4)).toBe("12346");
    expect(shownReading(readingHz({ partial: 3, cents: -12.14 }, 69, 440), "cents", a4)).toBe("−12.1");
    expect(shownReading(readingHz({ partial: 3, cents: 2.8 }, 69, 440), "cents", a4)).toBe("+2.8");
    expect(shownReading(1320, "cents", a4)).toBe("0.0");
  });

  it("gives a typed number back digit by digit when it is mended", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -240_000, max: 240_000 }),
        fc.integer({ min: 1, max: 16 }),
        (hundredths, partial) => {
          const text = (hundredths / 100).toFixed(2);
          const harmonic = { partial, midi: 57, referenceHz: 441 };
          const hz = typedHz(text, "cents", harmonic);
          expect(hz).not.toBeNull();
          expect(readTyped(editedReading(hz ?? 0, "cents", harmonic))).toBeCloseTo(hundredths / 100, 9);
        },
      ),
    );
  });
});
