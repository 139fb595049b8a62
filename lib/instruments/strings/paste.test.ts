import { expect, it } from "vitest";
import { readPastedStrings, readWound } from "./paste";

it("reads rows of a spreadsheet, passing over the line that names the columns", () => {
  const text =
    "Note\tStrings\tKind\tLength\tCore\tOuter\r\nA0\t1\twound\t1330\t1,2\t4.6\r\n\r\nC#4\t3\tplain\t654.5\t1.0\t";
  expect(readPastedStrings(text)).toEqual([
    {
      line: 2,
      note: "A0",
      midi: 21,
      strings: "1",
      wound: "wound",
      speakingLengthMm: "1330",
      diameterMm: "1,2",
      outerDiameterMm: "4.6",
    },
    expect.objectContaining({
      line: 4,
      midi: 61,
      strings: "3",
      speakingLengthMm: "654.5",
      outerDiameterMm: "",
    }),
  ]);
});

it("takes MIDI numbers for notes, and semicolons between cells", () => {
  expect(readPastedStrings("69;3;;402;1")).toMatchObject([
    { midi: 69, strings: "3", wound: "", speakingLengthMm: "402", diameterMm: "1" },
  ]);
});

it("hands back a row that names no note instead of dropping it", () => {
  expect(readPastedStrings("A4\t3\nH4\t3")).toMatchObject([
    { midi: 69 },
    { note: "H4", midi: null, line: 2 },
  ]);
  expect(readPastedStrings("H4\t3")).toMatchObject([{ note: "H4", midi: null }]);
});

it("knows wound from plain in the words people use, and does not guess at others", () => {
  expect(["wound", "W", "yes", "1"].map(readWound)).toEqual([true, true, true, true]);
  expect(["plain", "P", "no", "0", " "].map(readWound)).toEqual([false, false, false, false, false]);
  expect(readWound("copper?")).toBeNull();
});
