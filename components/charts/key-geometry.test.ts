import { describe, expect, it } from "vitest";
import { breakGap, clampKey, keyUnder, layOutKeys, nearestKey } from "./key-geometry";
import { isBlackKey } from "./note-spelling";

const grand = { firstMidi: 21, lastMidi: 108, breakMidi: 41 };

/** Compasses built by piano makers: 85, 88, 92 and 97 keys (common practice, no source). */
const compasses = [
  { firstMidi: 21, lastMidi: 105 },
  { firstMidi: 21, lastMidi: 108 },
  { firstMidi: 17, lastMidi: 108 },
  { firstMidi: 12, lastMidi: 108 },
];

describe("where keys lie", () => {
  it("fills the width exactly for every compass, with and without a break", () => {
    for (const compass of compasses) {
      for (const breakMidi of [null, 38, 39, 40, 44, 50]) {
        for (const width of [332, 358, 788, 800, 1096]) {
          const layout = layOutKeys({ ...compass, breakMidi }, width);
          expect(Math.min(...layout.keys.map((key) => key.x))).toBeCloseTo(0, 9);
          expect(Math.max(...layout.keys.map((key) => key.x + key.width))).toBeCloseTo(width, 9);
        }
      }
    }
  });

  it("puts white keys edge to edge, but for the gap at the break", () => {
    const layout = layOutKeys(grand, 800);
    const whites = layout.keys.filter((key) => !key.black);
    expect(whites).toHaveLength(52);
    for (let index = 1; index < whites.length; index++) {
      const before = whites[index - 1];
      const key = whites[index];
      if (!before || !key) throw new Error("no such key");
      expect(key.x - before.x - before.width).toBeCloseTo(before.midi === 40 ? 12 : 0, 9);
    }
  });

  it("keeps every point over its own key", () => {
    for (const compass of compasses) {
      const layout = layOutKeys({ ...compass, breakMidi: 41 }, 800);
      for (const key of layout.keys) {
        const point = layout.x(key.midi);
        expect(point).toBeGreaterThan(key.x);
        expect(point).toBeLessThan(key.x + key.width);
      }
    }
  });

  it("spaces points evenly: twelve to an octave of seven white keys", () => {
    const layout = layOutKeys({ firstMidi: 21, lastMidi: 108 }, 800);
    for (let midi = 22; midi <= 108; midi++) {
      expect(layout.x(midi) - layout.x(midi - 1)).toBeCloseTo(layout.pitch, 9);
    }
    expect(layout.pitch * 12).toBeCloseTo(layout.whiteWidth * 7, 9);
  });

  it("never lets a black key reach across the gap at the break", () => {
    for (let breakMidi = 22; breakMidi <= 108; breakMidi++) {
      for (const width of [358, 800]) {
        const layout = layOutKeys({ firstMidi: 21, lastMidi: 108, breakMidi }, width);
        const below = layout.keys.filter((key) => key.midi < breakMidi);
        const above = layout.keys.filter((key) => key.midi >= breakMidi);
        expect(Math.max(...below.map((key) => key.x + key.width))).toBeLessThanOrEqual(
          Math.min(...above.map((key) => key.x)) + 1e-9,
        );
        expect(layout.breakX).toBeGreaterThan(layout.x(breakMidi - 1));
        expect(layout.breakX).toBeLessThan(layout.x(breakMidi));
      }
    }
  });

  it("ignores a break outside the compass", () => {
    expect(layOutKeys({ firstMidi: 21, lastMidi: 108, breakMidi: 109 }, 800).breakX).toBeNull();
    expect(layOutKeys({ firstMidi: 21, lastMidi: 108, breakMidi: 12 }, 800).breakX).toBeNull();
  });

  it("starts and ends on black keys without losing part of one", () => {
    const layout = layOutKeys({ firstMidi: 22, lastMidi: 106 }, 500);
    for (const key of layout.keys) {
      expect(key.x).toBeGreaterThanOrEqual(-1e-9);
      expect(key.x + key.width).toBeLessThanOrEqual(500 + 1e-9);
    }
  });

  it("halves the gap on a phone", () => {
    expect(breakGap(358)).toBe(6);
    expect(breakGap(800)).toBe(12);
  });
});

describe("from pixel to key", () => {
  it("finds every key again from its own point", () => {
    for (const compass of compasses) {
      const layout = layOutKeys({ ...compass, breakMidi: 41 }, 358);
      for (let midi = compass.firstMidi; midi <= compass.lastMidi; midi++) {
        expect(nearestKey(layout, layout.x(midi))).toBe(midi);
        expect(keyUnder(layout, layout.x(midi), isBlackKey(midi))).toBe(midi);
      }
    }
  });

  it("gives the end keys outside the keyboard, so that a drag past the edge holds on", () => {
    const layout = layOutKeys(grand, 800);
    expect(nearestKey(layout, -50)).toBe(21);
    expect(nearestKey(layout, 5000)).toBe(108);
    expect(keyUnder(layout, -50, true)).toBe(21);
    expect(keyUnder(layout, 5000, false)).toBe(108);
  });

  it("takes the white key below the reach of the black ones", () => {
    const layout = layOutKeys(grand, 800);
    const cSharp = layout.keys.find((key) => key.midi === 61);
    if (!cSharp) throw new Error("no C sharp");
    expect(keyUnder(layout, cSharp.x + 1, true)).toBe(61);
    expect(keyUnder(layout, cSharp.x + 1, false)).toBe(60);
  });

  it("answers inside the gap with the key on that side of it", () => {
    const layout = layOutKeys(grand, 800);
    const middle = layout.keys.find((key) => key.midi === 41)?.x ?? 0;
    expect(keyUnder(layout, middle - 11, false)).toBe(40);
    expect(keyUnder(layout, middle - 1, false)).toBe(41);
  });

  it("holds a key inside the compass", () => {
    expect(clampKey(grand, 3)).toBe(21);
    expect(clampKey(grand, 200)).toBe(108);
    expect(clampKey(grand, 60.4)).toBe(60);
  });
});
