import type { FieldErrors } from "@/lib/errors";
import {
  type Fold,
  minuteOfDay,
  offsetsAt,
  offsetText,
  parseOffsetTime,
  timeOfMinute,
  type WallTime,
  withOffset,
} from "@/lib/wall-time";

/** The time of a visit as the database keeps it. */
export type SiteTime = {
  startsLocal: string;
  startsFold: Fold;
  endsLocal: string;
  endsFold: Fold;
  timeZone: string;
};

type Point = { wall: string; fold: Fold; at: number } | { fault: string };

/** A time in RFC 3339 held against the clocks of the site. The offset decides where a wall time occurs twice. */
function pointAt(text: string, timeZone: string): Point {
  const given = parseOffsetTime(text);
  if (!given) return { fault: "Write a time like 2026-05-14T09:00:00+02:00." };
  const offsets = offsetsAt(given.wall, timeZone);
  if (offsets.length === 0) {
    return { fault: "The clocks of the site jump over this time. Choose one before or after." };
  }
  const fold = offsets.indexOf(given.offsetMinutes);
  if (fold < 0) {
    const right = offsets.map(offsetText).join(" or ");
    return {
      fault: `The offset of the site is ${right} at this time, not ${offsetText(given.offsetMinutes)}.`,
    };
  }
  return { wall: given.wall, fold: fold === 1 ? 1 : 0, at: Date.parse(text) };
}

/** Start and end as the site's wall time, or what is wrong with them by field. */
export function siteTime(
  { start, end }: { start: string; end: string },
  timeZone: string,
): { time: SiteTime } | { faults: FieldErrors } {
  const first = pointAt(start, timeZone);
  const last = pointAt(end, timeZone);
  if ("fault" in first || "fault" in last) {
    return {
      faults: {
        ...("fault" in first ? { start: first.fault } : {}),
        ...("fault" in last ? { end: last.fault } : {}),
      },
    };
  }
  const day = 24 * 60 * 60_000;
  if (last.at <= first.at) return { faults: { end: "A visit ends after it begins." } };
  if (last.wall <= first.wall) {
    return { faults: { end: "Where clocks go back, let the visit end later by the clock as well." } };
  }
  if (Date.parse(`${last.wall}Z`) - Date.parse(`${first.wall}Z`) > day) {
    return { faults: { end: "At most 24 hours: a longer job is several visits." } };
  }
  return {
    time: {
      startsLocal: first.wall,
      startsFold: first.fold,
      endsLocal: last.wall,
      endsFold: last.fold,
      timeZone,
    },
  };
}

type Kept = {
  startsLocal: string;
  startsFold: number;
  endsLocal: string;
  endsFold: number;
  timeZone: string;
};

/** The kept time as RFC 3339 with the site's offset. */
export function shownTime(kept: Kept): { start: string; end: string; timeZone: string } {
  const { timeZone } = kept;
  return {
    start: withOffset(kept.startsLocal, timeZone, kept.startsFold === 1 ? 1 : 0),
    end: withOffset(kept.endsLocal, timeZone, kept.endsFold === 1 ? 1 : 0),
    timeZone,
  };
}

/** The start a booking opens with: the wanted one, or on the day itself the next full hour if that is over. */
export function offeredStart(day: string, wanted: string, now: WallTime): string {
  if (!now.startsWith(day)) return wanted;
  const nextHour = 60 * Math.floor(minuteOfDay(now) / 60) + 60;
  return timeOfMinute(Math.max(minuteOfDay(`${day}T${wanted}`), Math.min(nextHour, 23 * 60)));
}
