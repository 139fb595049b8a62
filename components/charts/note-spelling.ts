/** Note names for reading aloud and for printing. MIDI 60 is C4; keys below C0 do not occur on a piano. */

const LETTERS = ["C", "C♯", "D", "D♯", "E", "F", "F♯", "G", "G♯", "A", "A♯", "B"] as const;

/** Printed in place of this character: the shipped faces have no sharp, so it is always drawn. */
export const SHARP = "♯";

export function isBlackKey(midi: number): boolean {
  return noteLetter(midi).length === 2;
}

/** "C" or "C♯". */
function noteLetter(midi: number): string {
  return LETTERS[((midi % 12) + 12) % 12] ?? "C";
}

export function noteOctave(midi: number): number {
  return Math.floor(midi / 12) - 1;
}

/** "C♯4": only for text that is drawn with SharpText or on a canvas with drawSharpText. */
export function noteText(midi: number): string {
  return `${noteLetter(midi)}${noteOctave(midi)}`;
}

/** "C sharp 4", for accessible names, titles and copied text. */
export function spokenNote(midi: number): string {
  return `${noteLetter(midi).replace(SHARP, " sharp")} ${noteOctave(midi)}`;
}
