import { cleanText } from "@/lib/clean-text";

/** A name goes into mails and headings: one line, of a length that fits. Empty when nothing is left of it. */
export function plainName(name: string): string {
  return cleanText(name)
    .replace(/[\p{Cc}\p{Cf}\s]+/gu, " ")
    .trim()
    .slice(0, 120);
}
