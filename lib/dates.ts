import { TZDate } from "@date-fns/tz";
import { format, formatISO, isValid, parseISO } from "date-fns";

/**
 * Calendar days are written YYYY-MM-DD and carry no zone; instants are ISO with an offset. People are shown
 * months by name, in the shop's language, so that no day can be read as another.
 */
export type Day = string;

/** Years from 1900 to 2199: another is a slip of the finger. */
const dayPattern = /^(?:19|2[01])\d{2}-\d{2}-\d{2}$/;

export function isDay(text: string): boolean {
  return dayPattern.test(text) && isValid(parseISO(text)) && formatISO(parseISO(text)).startsWith(text);
}

/** The calendar day of an instant in a time zone: 23:30 in London is already tomorrow in Berlin. */
export function dayOf(instant: Date | string, timeZone: string): Day {
  return format(new TZDate(new Date(instant).getTime(), timeZone), "yyyy-MM-dd");
}

export function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat("en", { timeZone: name });
    return /^[A-Z][A-Za-z0-9_+-]*(\/[A-Za-z0-9_+-]+)*$/.test(name);
  } catch {
    return false;
  }
}

/** "14 May 2026", or as the locale orders it; the month is always a word. */
export function showDay(day: Day, locale: string): string {
  return dayFormat(locale, "UTC").format(new Date(`${day}T00:00:00Z`));
}

/** The day of an instant, as seen in a time zone. */
export function showDayOf(instant: Date | string, locale: string, timeZone: string): string {
  return dayFormat(locale, timeZone).format(new Date(instant));
}

/** "14 May 2026, 09:40". */
export function showInstant(instant: Date | string, locale: string, timeZone: string): string {
  return new Intl.DateTimeFormat(locale, {
    day: "numeric",
    month: "short",
    year: "numeric",
    hour: "2-digit",
    minute: "2-digit",
    timeZone,
  }).format(new Date(instant));
}

/** Wall time as the database keeps it ("2026-05-14 09:40:00"), shown without shifting it through any zone. */
export function showWallTime(local: string, locale: string): string {
  return showInstant(`${local.replace(" ", "T").slice(0, 19)}Z`, locale, "UTC");
}

export function wallDay(local: string): Day {
  return local.slice(0, 10);
}

export function addDays(day: Day, days: number): Day {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}

/** A month after the 31st is the last day of a shorter month. */
export function addMonths(day: Day, months: number): Day {
  const [year = 0, month = 1, date = 1] = day.split("-").map(Number);
  const first = new Date(Date.UTC(year, month - 1 + months, 1)).toISOString().slice(0, 8);
  return `${first}${String(Math.min(date, daysInMonth(first))).padStart(2, "0")}`;
}

/** Of the month a day or "2026-02" begins with. */
export function daysInMonth(day: Day): number {
  return new Date(Date.UTC(Number(day.slice(0, 4)), Number(day.slice(5, 7)), 0)).getUTCDate();
}

/** "Thursday 14 May": a day near enough that its year is plain. */
export function showWeekday(day: Day, locale: string, length: "long" | "short" = "long"): string {
  return new Intl.DateTimeFormat(locale, {
    weekday: length,
    day: "numeric",
    month: length,
    timeZone: "UTC",
  }).format(new Date(`${day}T00:00:00Z`));
}

/** The clock's time of an RFC 3339 text as it was written, whatever its offset. */
export function showTime(written: string, locale: string): string {
  return new Intl.DateTimeFormat(locale, { hour: "numeric", minute: "2-digit", timeZone: "UTC" }).format(
    new Date(`${written.slice(0, 16)}Z`),
  );
}

function dayFormat(locale: string, timeZone: string): Intl.DateTimeFormat {
  return new Intl.DateTimeFormat(locale, { day: "numeric", month: "short", year: "numeric", timeZone });
}
