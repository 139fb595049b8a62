import { keyFromName } from "@/lib/acoustics/keys";

/** One row of a pasted scale as text, with the note it names; `midi` is null where it names none. */
export type PastedString = {
  line: number;
  note: string;
  midi: number | null;
  strings: string;
  wound: string;
  speakingLengthMm: string;
  diameterMm: string;
  outerDiameterMm: string;
};

const mostLines = 500;

/**
 * Reads rows copied from a spreadsheet: note, strings, wound or plain, speaking length, diameter, outer
 * diameter, parted by tabs (or semicolons). A first row that names the columns is passed over. Nothing is
 * dropped silently: a row that names no note comes back without one.
 */
export function readPastedStrings(text: string): PastedString[] {
  const lines = text
    .split(/\r\n|\r|\n/)
    .map((line, index) => ({ line: index + 1, text: line }))
    .filter((line) => line.text.trim() !== "")
    .slice(0, mostLines);
  return lines.flatMap(({ line, text: row }, index) => {
    const cells = row.split(row.includes("\t") ? "\t" : ";").map((cell) => cell.trim());
    const [
      note = "",
      strings = "",
      wound = "",
      speakingLengthMm = "",
      diameterMm = "",
      outerDiameterMm = "",
    ] = cells;
    const midi = noteOf(note);
    if (midi === null && index === 0 && !/\d/.test(row)) return [];
    return [{ line, note, midi, strings, wound, speakingLengthMm, diameterMm, outerDiameterMm }];
  });
}

/** "A0", "c#4", "Eb3", or the MIDI number. */
function noteOf(text: string): number | null {
  if (/^\d{1,3}$/.test(text)) return Number(text);
  return keyFromName(text);
}

/** "wound", "w", "yes", "1" and "plain", "p", "no", "0" or nothing; null for what is neither. */
export function readWound(text: string): boolean | null {
  const word = text.trim().toLowerCase();
  if (["wound", "wrapped", "w", "yes", "y", "true", "1"].includes(word)) return true;
  if (["plain", "p", "no", "n", "false", "0", ""].includes(word)) return false;
  return null;
}
