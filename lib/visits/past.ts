import { dayOf } from "@/lib/dates";

const day = 86_400_000;

/**
 * Says how long ago a time is, by the clock of the site, or null where it has not come yet. Books are sometimes
 * brought up to date, so a visit in the past is asked about and never refused.
 */
export function pastWords(
  start: string,
  { now, timeZone }: { now: string; timeZone: string },
): string | null {
  if (Date.parse(start) >= Date.parse(now)) return null;
  const days = (Date.parse(dayOf(now, timeZone)) - Date.parse(dayOf(start, timeZone))) / day;
  if (days === 0) return "This is earlier today.";
  return days === 1 ? "This was yesterday." : `This is ${days} days ago.`;
}
