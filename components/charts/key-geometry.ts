import { isBlackKey } from "./note-spelling";

/**
 * Where keys lie along a keyboard of a given width. A white key is a seventh of an octave, a black key and
 * every data point lie on twelfths, so a point always stands over its own key.
 */

export type KeyRange = {
  firstMidi: number;
  lastMidi: number;
  /** First key of the treble bridge; null where the bridges are not told apart. */
  breakMidi?: number | null;
};

export type KeyShape = { midi: number; black: boolean; x: number; width: number };

export type KeyLayout = {
  range: KeyRange;
  width: number;
  /** Width of a twelfth of an octave: the distance between neighbouring points. */
  pitch: number;
  whiteWidth: number;
  /** White keys first, black keys after them, so that drawing in order puts black on top. */
  keys: readonly KeyShape[];
  /** Middle of the gap between the bridges, or null. */
  breakX: number | null;
  /** x of the points of one key. */
  x: (midi: number) => number;
};

const WHITE_INDEX = [0, 0, 1, 1, 2, 3, 3, 4, 4, 5, 5, 6] as const;
const BLACK_SHARE = 0.84;
const TWELFTH = 7 / 12;
const HALF_BLACK = (BLACK_SHARE * TWELFTH) / 2;

/** Left edge in white-key widths, counted from MIDI 0. */
function leftEdge(midi: number): number {
  return isBlackKey(midi)
    ? pointPosition(midi) - HALF_BLACK
    : Math.floor(midi / 12) * 7 + (WHITE_INDEX[midi % 12] ?? 0);
}

function keyWidth(midi: number): number {
  return isBlackKey(midi) ? 2 * HALF_BLACK : 1;
}

function pointPosition(midi: number): number {
  return (midi + 0.5) * TWELFTH;
}

export function hasBreak(range: KeyRange): boolean {
  const { breakMidi, firstMidi, lastMidi } = range;
  return breakMidi != null && breakMidi > firstMidi && breakMidi <= lastMidi;
}

/** Gap between the bridges, in pixels, for a plot of this width. */
export function breakGap(width: number): number {
  return width < 560 ? 6 : 12;
}

export function layOutKeys(range: KeyRange, width: number, gap = breakGap(width)): KeyLayout {
  const { firstMidi, lastMidi } = range;
  const broken = hasBreak(range);
  const breakMidi = broken ? (range.breakMidi ?? firstMidi) : firstMidi;
  const start = leftEdge(firstMidi);
  // A black key at either end overhangs its white neighbour's place, hence the greater of the last two.
  const end = Math.max(
    leftEdge(lastMidi) + keyWidth(lastMidi),
    lastMidi > firstMidi ? leftEdge(lastMidi - 1) + keyWidth(lastMidi - 1) : 0,
  );
  const unit = Math.max(0, width - (broken ? gap : 0)) / (end - start);
  const shift = (midi: number) => (broken && midi >= breakMidi ? gap : 0);
  const x = (midi: number) => (pointPosition(midi) - start) * unit + shift(midi);
  const keys: KeyShape[] = [];
  for (let midi = firstMidi; midi <= lastMidi; midi++) {
    keys.push({
      midi,
      black: isBlackKey(midi),
      x: (leftEdge(midi) - start) * unit + shift(midi),
      width: keyWidth(midi) * unit,
    });
  }
  keys.sort((a, b) => Number(a.black) - Number(b.black) || a.midi - b.midi);
  return {
    range,
    width,
    pitch: TWELFTH * unit,
    whiteWidth: unit,
    keys,
    breakX: broken ? (x(breakMidi - 1) + x(breakMidi)) / 2 : null,
    x,
  };
}

export function clampKey(range: KeyRange, midi: number): number {
  return Math.min(range.lastMidi, Math.max(range.firstMidi, Math.round(midi)));
}

/** The key whose points are nearest, for plots; pixels outside the keyboard give its end keys. */
export function nearestKey(layout: KeyLayout, px: number): number {
  let best = layout.range.firstMidi;
  for (const { midi } of layout.keys) {
    if (Math.abs(layout.x(midi) - px) < Math.abs(layout.x(best) - px)) best = midi;
  }
  return best;
}

/** The key under a pixel of the ribbon: black keys only where they reach down, else the white one. */
export function keyUnder(layout: KeyLayout, px: number, overBlackKeys: boolean): number {
  const hit = (key: KeyShape) => px >= key.x && px < key.x + key.width;
  if (overBlackKeys) {
    const black = layout.keys.find((key) => key.black && hit(key));
    if (black) return black.midi;
  }
  let best: KeyShape | undefined;
  let bestDistance = Number.POSITIVE_INFINITY;
  for (const key of layout.keys) {
    if (key.black) continue;
    const distance = Math.max(key.x - px, px - (key.x + key.width), 0);
    if (distance < bestDistance) {
      best = key;
      bestDistance = distance;
    }
  }
  return best?.midi ?? layout.range.firstMidi;
}
