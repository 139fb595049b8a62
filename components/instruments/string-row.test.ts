import { expect, it } from "vitest";
import { readPastedStrings } from "@/lib/instruments/strings/paste";
import { emptyRow, isBlank, parseRow, pasteOver, rowOf } from "./string-row";

const typed = (cells: Partial<ReturnType<typeof emptyRow>>) => ({ ...emptyRow(69), ...cells });

it("reads decimal commas, and leaves out what was not typed", () => {
  expect(parseRow(typed({ strings: "3", speakingLengthMm: "402,5", diameterMm: " 1.0 " }))).toEqual({
    values: { strings: 3, wound: false, speakingLengthMm: 402.5, diameterMm: 1, outerDiameterMm: null },
  });
});

it("names the field of what is no number, out of range, or at odds with another field", () => {
  const wrong = (cells: Parameters<typeof typed>[0]) => {
    const parsed = parseRow(typed(cells));
    return "errors" in parsed ? Object.keys(parsed.errors) : [];
  };
  expect(wrong({ strings: "three" })).toEqual(["strings"]);
  expect(wrong({ strings: "" })).toEqual(["strings"]);
  expect(wrong({ strings: "3", speakingLengthMm: "-402", diameterMm: "1e3" })).toEqual([
    "speakingLengthMm",
    "diameterMm",
  ]);
  expect(wrong({ strings: "1", wound: true, diameterMm: "2", outerDiameterMm: "1" })).toEqual([
    "outerDiameterMm",
  ]);
});

it("goes from record to row and back without change", () => {
  const record = {
    midi: 21,
    strings: 1,
    wound: true,
    speakingLengthMm: 1330,
    diameterMm: 1.2,
    outerDiameterMm: 4.6,
    version: 3,
  };
  const { midi: _, version: __, ...values } = record;
  expect(parseRow(rowOf(record))).toEqual({ values });
  expect(isBlank(rowOf(record))).toBe(false);
  expect(isBlank(emptyRow(21))).toBe(true);
});

it("says which pasted lines have no place, and keeps wrong rows to be mended where they belong", () => {
  const text = "A4\t3\tplain\t402\t1.0\nH4\t3\nC9\t3\tplain\t50\t0.8\nB4\tmany\tplain\nC5\t3\tsilver";
  const { rows, problems } = pasteOver(readPastedStrings(text), 21, 108);
  expect(rows.map(({ midi, state }) => [midi, state])).toEqual([
    [69, "typed"],
    [71, "refused"],
  ]);
  expect(rows[1]).toMatchObject({ strings: "many", errors: { strings: expect.any(String) } });
  expect(problems).toEqual([
    expect.stringContaining("Line 2: “H4” is no note"),
    expect.stringContaining("Line 3: this instrument has no C9"),
    expect.stringContaining("Line 5: “silver” is neither"),
  ]);
});
