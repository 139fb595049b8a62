import { describe, expect, it } from "vitest";
import { TEMPERAMENT_NAMES } from "@/lib/acoustics/temperament";
import {
  kindLabels,
  kinds,
  moveFaults,
  rangeFaults,
  rangeLabel,
  sinceFaults,
  stringFaults,
  temperamentLabels,
  usualRanges,
} from "./rules";

describe("the compass of an instrument", () => {
  it("offers the compasses makers build, each with as many keys as it says", () => {
    // Common practice, no source: 85 keys end at A7, 92 begin at F0, 97 at C0.
    expect(usualRanges.map(rangeLabel)).toEqual([
      "88 keys, A0 to C8",
      "85 keys, A0 to A7",
      "92 keys, F0 to C8",
      "97 keys, C0 to C8",
    ]);
    for (const range of usualRanges) {
      expect(range.lastMidi - range.firstMidi + 1).toBe(range.keys);
      expect(rangeFaults({ ...range, breakMidi: null })).toEqual({});
    }
  });

  it("puts the break above the lowest key, and no higher than the highest", () => {
    const at = (breakMidi: number) => Object.keys(rangeFaults({ firstMidi: 21, lastMidi: 108, breakMidi }));
    expect(at(21)).toEqual(["breakMidi"]);
    expect(at(22)).toEqual([]);
    expect(at(108)).toEqual([]);
    expect(at(109)).toEqual(["breakMidi"]);
  });

  it("names each end that no stringed keyboard has", () => {
    expect(Object.keys(rangeFaults({ firstMidi: 8, lastMidi: 121, breakMidi: null }))).toEqual([
      "firstMidi",
      "lastMidi",
    ]);
  });
});

describe("an instrument's place", () => {
  const now = { today: "2026-05-14", locale: "en-GB" };

  it("ends later than it began, and not in the future", () => {
    expect(moveFaults("2026-05-14", { ...now, since: "2026-05-13" })).toEqual({});
    expect(moveFaults("2026-05-13", { ...now, since: "2026-05-13" }).since).toContain("13 May 2026");
    expect(moveFaults("2026-05-15", { ...now, since: "2026-05-13" }).since).toContain("not come yet");
    expect(moveFaults("1931-01-01", { ...now, since: null })).toEqual({});
  });

  it("begins no earlier than the one before ended", () => {
    expect(sinceFaults("2026-03-01", { ...now, endOfBefore: "2026-03-01" })).toEqual({});
    expect(sinceFaults("2026-02-28", { ...now, endOfBefore: "2026-03-01" }).since).toContain("1 Mar 2026");
    expect(sinceFaults("2026-05-15", { ...now, endOfBefore: null }).since).toContain("not come yet");
  });
});

describe("the strings of a note", () => {
  it("wrap only wound strings, over a thinner core that is known", () => {
    expect(stringFaults({ strings: 3, wound: false, diameterMm: 1 })).toEqual({});
    expect(stringFaults({ strings: 1, wound: true, diameterMm: 1.2, outerDiameterMm: 4.6 })).toEqual({});
    expect(Object.keys(stringFaults({ strings: 1, wound: false, outerDiameterMm: 4.6 }))).toEqual([
      "outerDiameterMm",
    ]);
    expect(Object.keys(stringFaults({ strings: 1, wound: true, outerDiameterMm: 4.6 }))).toEqual([
      "diameterMm",
    ]);
    expect(Object.keys(stringFaults({ strings: 1, wound: true, diameterMm: 2, outerDiameterMm: 2 }))).toEqual(
      ["outerDiameterMm"],
    );
  });
});

it("has words for every kind and temperament", () => {
  expect(Object.keys(kindLabels)).toEqual([...kinds]);
  expect(Object.keys(temperamentLabels)).toEqual([...TEMPERAMENT_NAMES]);
});
