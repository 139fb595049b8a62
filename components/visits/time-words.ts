import { isDay, showTime, showWeekday, wallDay } from "@/lib/dates";

type Timed = { start: string; end: string };

/** "9:00–11:00". */
export function hoursOf({ start, end }: Timed, locale: string): string {
  return `${showTime(start, locale)}–${showTime(end, locale)}`;
}

/** "Thu 14 May 2026". */
export function dayWithYear(start: string, locale: string): string {
  return `${showWeekday(wallDay(start), locale, "short")} ${start.slice(0, 4)}`;
}

/** "Tue 1 Dec", with the year where it is not this one. */
export function dayInList(start: string, locale: string, today: string): string {
  if (start.slice(0, 4) !== today.slice(0, 4)) return dayWithYear(start, locale);
  return showWeekday(wallDay(start), locale, "short");
}

/** Beside a date field, whose figures the browser orders as it likes: the day in words. */
export function dayHelp(day: string, locale: string): string | undefined {
  return isDay(day) ? showWeekday(day, locale) : undefined;
}

/** "1 h 30 min". */
export function durationWords(minutes: number): string {
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
}

export function minutesBetween(from: string, to: string): number {
  return Math.round((Date.parse(to) - Date.parse(from)) / 60_000);
}

/** "Castellan 186 and 3 more", as far as the names go. */
export function instrumentWords(instruments: readonly string[], jobs: number): string {
  if (jobs === 0) return "No instrument named yet";
  const [first] = instruments;
  if (!first || jobs > instruments.length) return `${first ?? "Instruments"} and ${jobs - 1} more`;
  return instruments.length === 1 ? first : instruments.join(" · ");
}
