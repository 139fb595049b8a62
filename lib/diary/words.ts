import { type Day, showDay } from "@/lib/dates";
import type { ServicePlanRecord } from "./service-plans/schema";

/** "2 Nov – 20 Nov 2026". Not the locale's own way of ranges: server and browser know different ones. */
export function showWindow({ from, until }: { from: Day; until: Day }, locale: string): string {
  if (from.slice(0, 4) !== until.slice(0, 4)) return `${showDay(from, locale)} – ${showDay(until, locale)}`;
  const short = new Intl.DateTimeFormat(locale, { day: "numeric", month: "short", timeZone: "UTC" });
  return `${short.format(new Date(`${from}T00:00:00Z`))} – ${showDay(until, locale)}`;
}

/** "every 6 months", "in April and October", "2 days before each event". */
export function rhythmWords({ rhythm }: Pick<ServicePlanRecord, "rhythm">, locale: string): string {
  if (rhythm.kind === "interval") {
    const one = rhythm.every === 1;
    return one ? `every ${rhythm.unit}` : `every ${rhythm.every} ${rhythm.unit}s`;
  }
  if (rhythm.kind === "events") {
    if (rhythm.daysBefore === 0) return "on the day of each event";
    return `within ${rhythm.daysBefore === 1 ? "a day" : `${rhythm.daysBefore} days`} before each event`;
  }
  return `in ${new Intl.ListFormat(locale, { type: "conjunction" }).format(rhythm.months.map((month) => monthName(month, locale)))}`;
}

export function monthName(month: number, locale: string, length: "long" | "short" = "long"): string {
  return new Intl.DateTimeFormat(locale, { month: length, timeZone: "UTC" }).format(
    Date.UTC(2026, month - 1),
  );
}

/** ISO weekdays, 1 Monday to 7 Sunday. */
export function weekdayName(weekday: number, locale: string, length: "long" | "short" = "long"): string {
  // 5 January 2026 is a Monday.
  return new Intl.DateTimeFormat(locale, { weekday: length, timeZone: "UTC" }).format(
    Date.UTC(2026, 0, 4 + weekday),
  );
}

export function restWords(
  { rests, restsUntil }: Pick<ServicePlanRecord, "rests" | "restsUntil">,
  locale: string,
) {
  if (!rests) return null;
  return restsUntil ? `rests until ${showDay(restsUntil, locale)}` : "rests until somebody wakes it";
}
