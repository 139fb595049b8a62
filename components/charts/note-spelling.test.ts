import { describe, expect, it } from "vitest";
import { isBlackKey, noteText, spokenNote } from "./note-spelling";

describe("note names", () => {
  // MIDI 69 is A4 and 60 is middle C, C4: the MIDI specification's numbering with scientific pitch names, from memory.
  it("names the ends of the usual keyboards", () => {
    expect([12, 17, 21, 40, 60, 69, 105, 108].map(noteText)).toEqual([
      "C0",
      "F0",
      "A0",
      "E2",
      "C4",
      "A4",
      "A7",
      "C8",
    ]);
  });

  it("says sharps in words, so that no reader is left with a drawn sign", () => {
    expect(spokenNote(61)).toBe("C sharp 4");
    expect(spokenNote(82)).toBe("A sharp 5");
    expect(spokenNote(88)).toBe("E 6");
  });

  it("finds 36 black keys among 88", () => {
    const keys = Array.from({ length: 88 }, (_, index) => 21 + index);
    expect(keys.filter(isBlackKey)).toHaveLength(36);
  });
});
