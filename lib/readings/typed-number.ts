import { readingCents, readingHz } from "./rules";

/** How a reading is typed and shown. Hertz are what is stored; cents count from the partial's harmonic. */
export type ReadingUnit = "hz" | "cents";

export const MOST_CENTS = 2400;
export const MOST_HZ = 100_000;

const SPACES = "[ \u00a0\u2009\u202f]";
const PLAIN = /^[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)$/;
const SPACED = new RegExp(`^[+-]?\\d{1,3}(?:${SPACES}\\d{3})+(?:[.,]\\d*)?$`);
const COMMA_GROUPS = /^[+-]?\d{1,3}(?:,\d{3})+\.\d+$/;
const POINT_GROUPS = /^[+-]?\d{1,3}(?:\.\d{3})+,\d+$/;

/**
 * Reads a number as people write it: a decimal point or comma, a true minus, a leading plus, spaces between
 * thousands. Null for everything else, words and powers included.
 */
export function readTyped(text: string): number | null {
  const written = text.trim().replace(/^[\u2212\u2013]/, "-");
  if (PLAIN.test(written)) return Number(written.replace(",", "."));
  if (SPACED.test(written)) {
    return Number(written.replaceAll(new RegExp(SPACES, "g"), "").replace(",", "."));
  }
  if (COMMA_GROUPS.test(written)) return Number(written.replaceAll(",", ""));
  if (POINT_GROUPS.test(written)) return Number(written.replaceAll(".", "").replace(",", "."));
  return null;
}

/** Nothing was read there: an empty cell, or a lone dash or dot as spreadsheets have them. */
export function isBlank(text: string): boolean {
  return /^\s*[-\u2212\u2013\u2014\u00b7.]?\s*$/.test(text);
}

/** What is wrong with a typed reading, or null. */
export function typedFault(text: string, unit: ReadingUnit): string | null {
  const value = readTyped(text);
  if (value === null) return `Not a number. Write ${unit === "hz" ? "784.2" : "−12.1"}.`;
  if (unit === "hz") {
    if (value <= 0) return "A frequency is above zero.";
    return value > MOST_HZ ? "Above 100 kHz: check the unit." : null;
  }
  return Math.abs(value) > MOST_CENTS ? "Beyond two octaves: is this in Hz?" : null;
}

type Harmonic = { partial: number; midi: number; referenceHz: number };

/** The frequency that a typed reading means; null when it is none. */
export function typedHz(
  text: string,
  unit: ReadingUnit,
  { partial, midi, referenceHz }: Harmonic,
): number | null {
  const value = readTyped(text);
  if (value === null || typedFault(text, unit) !== null) return null;
  return readingHz(unit === "hz" ? { partial, hz: value } : { partial, cents: value }, midi, referenceHz);
}

function trimmed(value: number, least: number, most: number): string {
  const [whole = "", decimals = ""] = Math.abs(value).toFixed(most).split(".");
  const kept = decimals.replace(/0+$/, "").padEnd(least, "0");
  const text = kept === "" ? whole : `${whole}.${kept}`;
  return Number(text) !== 0 && value < 0 ? `−${text}` : text;
}

/** The number as a cell at rest shows it: six figures at most, so that columns stay narrow. */
export function shownReading(
  hz: number,
  unit: ReadingUnit,
  { partial, midi, referenceHz }: Harmonic,
): string {
  if (unit === "hz") return hz.toFixed(hz < 999.995 ? 2 : hz < 9_999.95 ? 1 : 0);
  const text = trimmed(readingCents(partial, hz, midi, referenceHz), 1, 1);
  return text.startsWith("−") || Number(text) === 0 ? text : `+${text}`;
}

/** The number as it is mended: with the hundredths that a cell at rest may leave out. */
export function editedReading(
  hz: number,
  unit: ReadingUnit,
  { partial, midi, referenceHz }: Harmonic,
): string {
  if (unit === "hz") return hz.toFixed(2);
  const text = trimmed(readingCents(partial, hz, midi, referenceHz), 1, 2);
  return text.startsWith("−") || Number(text) === 0 ? text : `+${text}`;
}
