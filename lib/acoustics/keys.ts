/**
 * Keys, their names and their equal-tempered frequencies.
 * Keys are MIDI note numbers: A0 = 21, middle C = C4 = 60, A4 = 69, C8 = 108. Cents are 1200·log2 of a ratio.
 */

export const LOWEST_PIANO_KEY = 21;
export const HIGHEST_PIANO_KEY = 108;
export const STANDARD_PITCH_HZ = 440;

const NAMES = ["C", "C#", "D", "D#", "E", "F", "F#", "G", "G#", "A", "A#", "B"] as const;
const LETTERS: Record<string, number> = { C: 0, D: 2, E: 4, F: 5, G: 7, A: 9, B: 11 };
const NAME_PATTERN = /^([A-Ga-g])([#♯b♭]?)(-?\d{1,2})$/;

/** Octave number in scientific pitch notation: middle C begins octave 4. */
export function octaveOf(midi: number): number {
  return Math.floor(midi / 12) - 1;
}

/** Pitch class, 0 for C to 11 for B. */
export function pitchClassOf(midi: number): number {
  return ((midi % 12) + 12) % 12;
}

/** Name in scientific pitch notation with sharps, "A0" … "C8"; `#` stands for the sharp. */
export function keyName(midi: number): string {
  return `${NAMES[pitchClassOf(midi)] ?? ""}${octaveOf(midi)}`;
}

/** MIDI number of a name such as "A0", "f#3" or "Eb4", or null when it is not one. */
export function keyFromName(name: string): number | null {
  const match = NAME_PATTERN.exec(name.trim());
  if (!match) return null;
  const [, letter = "", accidental = "", octave = ""] = match;
  const base = LETTERS[letter.toUpperCase()];
  if (base === undefined) return null;
  const shift = accidental === "" ? 0 : accidental === "#" || accidental === "♯" ? 1 : -1;
  return 12 * (Number(octave) + 1) + base + shift;
}

/** Equal-tempered frequency of a key, Hz; A4 = `referenceHz` (ISO 16:1975 fixes 440 Hz). */
export function equalTemperedHz(midi: number, referenceHz: number = STANDARD_PITCH_HZ): number {
  return referenceHz * 2 ** ((midi - 69) / 12);
}

/** Cents from `fromHz` up to `toHz`. */
export function centsBetween(fromHz: number, toHz: number): number {
  return 1200 * Math.log2(toHz / fromHz);
}

/** `hz` raised by `cents`. */
export function raiseByCents(hz: number, cents: number): number {
  return hz * 2 ** (cents / 1200);
}

/** The key whose equal-tempered frequency is nearest to `hz`. */
export function nearestKey(hz: number, referenceHz: number = STANDARD_PITCH_HZ): number {
  return Math.round(69 + 12 * Math.log2(hz / referenceHz));
}
