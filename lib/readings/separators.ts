import { equalTemperedHz } from "@/lib/acoustics";
import { MOST_CENTS, MOST_HZ, type ReadingUnit, readTyped } from "./typed-number";

/**
 * Numbers of a paste that can be read two ways, because of what stands between thousands. A frequency settles it
 * where only one reading lies near its key; otherwise the person is asked, and nothing is taken by guess.
 */

export type Where = { unit: ReadingUnit; midi: number; partial: number; referenceHz: number };

type Mark = "." | ",";

/** One mark with three figures after it: "1.046" is 1046 in one country and a little over one in the next. */
const EITHER = /^[+-]?[1-9]\d{0,2}([.,])\d{3}$/;
const WITH_BLANKS = /^[+-]?([1-9]\d{0,2})(?:[ \u00a0\u2009\u202f]\d{3})+(?:[.,]\d*)?$/;

const plain = (text: string) => text.trim().replace(/^[\u2212\u2013]/, "-");
const digits = (text: string) => Math.abs(Number(text.replaceAll(/[^\d]/g, "")));
const mostOf = (unit: ReadingUnit) => (unit === "hz" ? MOST_HZ : MOST_CENTS);

/** Two octaves either way of the partial's harmonic; two readings of one text are ten octaves apart. */
function isNear(hz: number, { midi, partial, referenceHz }: Where): boolean {
  return Math.abs(Math.log2(hz / (partial * equalTemperedHz(midi, referenceHz)))) <= 2;
}

/** The marks that these numbers show to stand before decimals. */
export function decimalMarks(texts: readonly string[], unit: ReadingUnit): ReadonlySet<Mark> {
  const marks = new Set<Mark>();
  for (const text of texts.map(plain)) {
    const found = text.match(/[.,]/g);
    const last = found?.at(-1);
    if (readTyped(text) === null || (last !== "." && last !== ",")) continue;
    const open = EITHER.test(text) && digits(text) <= mostOf(unit);
    if (!open) marks.add(last);
  }
  return marks;
}

/** The question at a number that can be read two ways, or null. */
export function twoWaysFault(text: string, marks: ReadonlySet<Mark>, where: Where): string | null {
  const written = plain(text);
  const mark = EITHER.exec(written)?.[1];
  if (mark === "." || mark === ",") {
    if (digits(written) > mostOf(where.unit) || (marks.has(mark) && marks.size === 1)) return null;
    const value = readTyped(written) ?? 0;
    if (where.unit === "hz" && marks.size === 0 && isNear(value, where)) return null;
    const sign = /^[+-]/.exec(written)?.[0]?.replace("-", "−") ?? "";
    return `This could be ${sign}${digits(written)} or ${sign}${Math.abs(value)}. Write ${sign}${digits(written)} or ${written.replace("-", "−")}0.`;
  }
  if (!WITH_BLANKS.test(written)) return null;
  const value = readTyped(written) ?? 0;
  const sure = where.unit === "hz" ? isNear(value, where) : /\s0/.test(written);
  return sure ? null : "This could be one number or several. Leave no blanks within a number.";
}

/** Whether two numbers divided by a blank could be one with a blank between its thousands. */
export function couldBeOne(one: string, next: string, where: Where): boolean {
  if (!/^[+-]?[1-9]\d{0,2}$/.test(plain(one)) || !/^\d{3}(?:[.,]\d*)?$/.test(next)) return false;
  const joined = Math.abs(readTyped(`${plain(one)}${next}`) ?? Number.NaN);
  if (where.unit === "cents") return joined <= MOST_CENTS;
  return isNear(joined, where) && !isNear(readTyped(one) ?? 0, where);
}
