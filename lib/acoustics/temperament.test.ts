import { describe, expect, it } from "vitest";
import { check, checkNumber, checkTable, numbersOf } from "@/tests/support/checks";
import {
  describeTemperament,
  LESSER_DIESIS,
  PURE_FIFTH,
  PURE_MAJOR_THIRD,
  PYTHAGOREAN_COMMA,
  SCHISMA,
  SYNTONIC_COMMA,
  TEMPERAMENT_NAMES,
  temperamentOffsets,
  temperedFifths,
} from "./temperament";

const NAMES = ["C", "C#", "D", "D#", "E", "F", "F#", "G", "G#", "A", "A#", "B"];

describe("commas", () => {
  it("have their values in cents", () => {
    const expected = checkTable("commas");
    expect(PYTHAGOREAN_COMMA).toBeCloseTo(expected.pythagorean ?? 0, 9);
    expect(SYNTONIC_COMMA).toBeCloseTo(expected.syntonic ?? 0, 9);
    expect(SCHISMA).toBeCloseTo(expected.schisma ?? 0, 9);
    expect(LESSER_DIESIS).toBeCloseTo(expected.lesser_diesis ?? 0, 9);
    expect(PURE_FIFTH).toBeCloseTo(expected.pure_fifth ?? 0, 9);
    expect(PURE_MAJOR_THIRD).toBeCloseTo(expected.pure_third ?? 0, 9);
  });
});

describe("named temperaments", () => {
  it.each([
    ["equal", "temperament.Equal"],
    ["pythagorean", "temperament.Pythagorean"],
    ["meantone-quarter", "temperament.Quarter-comma_meantone"],
    ["werckmeister-3", "temperament.Werckmeister_III"],
    ["kirnberger-3", "temperament.Kirnberger_III"],
    ["vallotti", "temperament.Vallotti"],
  ] as const)("%s has the offsets that follow from its comma fractions", (name, id) => {
    // Werckmeister III and Vallotti: fractions as printed in a temperament history (SEEN); the others from memory.
    const { cents_from_C, dev_from_ET_A0 } = check(id).expected as Record<string, unknown>;
    const { offsets, centsFromC } = describeTemperament({ temperament: name });
    NAMES.forEach((note, index) => {
      expect(offsets[index]).toBeCloseTo(numbersOf(dev_from_ET_A0, id)[note] ?? Number.NaN, 3);
      expect(centsFromC[index]).toBeCloseTo(numbersOf(cents_from_C, id)[note] ?? Number.NaN, 3);
    });
  });

  it.each([
    ["young-2", [5.87, -3.91, 1.96, 0, -1.96, 3.91, -5.87, 3.91, -1.96, 0, 1.96, -3.91]],
    ["kellner", [8.21, -1.56, 2.74, 2.35, -2.74, 6.26, -3.52, 5.47, 0.39, 0, 4.3, -0.78]],
  ] as const)(
    "%s has the offsets worked out by hand from six sixths and five fifths of a comma",
    (name, expected) => {
      // Which fifths are tempered: from memory.
      const offsets = temperamentOffsets(name);
      expected.forEach((offset, index) => {
        expect(Math.abs((offsets[index] ?? 0) - offset)).toBeLessThan(0.006);
      });
    },
  );

  it("werckmeister-3 agrees with the list printed in 1998 to the printed tenth", () => {
    // A tuning-list message of 24 March 1998 (SEEN).
    const offsets = temperamentOffsets("werckmeister-3");
    for (const [note, printed] of Object.entries(checkTable("temperament.W3.seen"))) {
      expect(Math.abs((offsets[NAMES.indexOf(note)] ?? 0) - printed)).toBeLessThan(0.06);
    }
  });

  it.each(TEMPERAMENT_NAMES)("%s closes the circle: its fifths give back one comma", (name) => {
    const sum = temperedFifths(name).reduce((total, { cents }) => total + cents, 0);
    expect(sum).toBeCloseTo(checkNumber("temperament.property"), 9);
    const { fifths, majorThirds, offsets } = describeTemperament({ temperament: name });
    expect(fifths.reduce((total, cents) => total + cents, 0)).toBeCloseTo(-PYTHAGOREAN_COMMA, 9);
    expect(majorThirds.reduce((total, cents) => total + cents, 0)).toBeCloseTo(4 * LESSER_DIESIS, 9);
    expect(offsets[9]).toBe(0);
  });

  it("meantone has eight pure major thirds and a wolf of 35.7 cents", () => {
    const { fifths, majorThirds } = describeTemperament({ temperament: "meantone-quarter" });
    expect(majorThirds.filter((cents) => Math.abs(cents) < 1e-9)).toHaveLength(8);
    expect(Math.max(...fifths)).toBeCloseTo(35.682, 3);
  });

  it("puts A4 at the reference pitch", () => {
    for (const temperament of TEMPERAMENT_NAMES) {
      expect(describeTemperament({ temperament, referenceHz: 415 }).hz[9]).toBeCloseTo(415, 9);
    }
  });
});

describe("a temperament of one's own", () => {
  const offsets = [4, 1, 2, 3, 0, 5, 1, 3, 2, 2, 4, 1];

  it("is moved so that A is the reference", () => {
    expect(temperamentOffsets(offsets)).toEqual(offsets.map((offset) => offset - 2));
  });

  it.each([
    ["eleven offsets", offsets.slice(1), "temperament"],
    ["thirteen offsets", [...offsets, 0], "temperament"],
    [
      "an offset that is no number",
      [...offsets.slice(0, 3), Number.NaN, ...offsets.slice(4)],
      "temperament[3]",
    ],
    ["an infinite offset", [...offsets.slice(0, 11), Number.POSITIVE_INFINITY], "temperament[11]"],
    ["a note above the next", [90, -20, ...offsets.slice(2)], "temperament[0]"],
  ])("is refused with %s", (_, given, path) => {
    expect(() => temperamentOffsets(given)).toThrow(
      expect.objectContaining({ code: "bad-temperament", path }),
    );
  });

  it("is refused under a name that is none, even one every object has", () => {
    for (const name of ["well", "constructor", "toString"]) {
      expect(() => temperamentOffsets(name as "equal")).toThrow(
        expect.objectContaining({ code: "unknown-temperament" }),
      );
    }
  });
});
