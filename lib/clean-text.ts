import { z } from "zod";

/**
 * What no text that people read should hold: halves of a character pair, which nothing can store or show, and
 * the controls that turn the direction of what follows, with which one name can be made to look like another
 * and a line of a mail like something else. Composed (NFC), so that two spellings of the same é are found alike.
 */
export function cleanText(text: string): string {
  return text
    .replace(/\p{Cs}/gu, "")
    .replace(/[\u202A-\u202E\u2066-\u2069]/g, "")
    .normalize("NFC");
}

/** The beginning of every schema of a text that people type and others read. */
export function readableText() {
  return z.string().overwrite(cleanText).trim();
}

/** A text that has to be given, as a name. */
export function requiredText(most: number, whenEmpty: string) {
  return readableText().min(1, whenEmpty).max(most, `At most ${most} characters.`);
}
