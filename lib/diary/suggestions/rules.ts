import { differenceInCalendarDays, getISODay, parseISO } from "date-fns";
import type { Day } from "@/lib/dates";
import type { Position, TravelTimes } from "@/lib/diary/route/travel";

/** Minutes after midnight on the technician's clock. */
export type Stretch = { from: number; until: number };

/** One technician's day: hours of work, and what is taken of them in order of time. */
export type OpenDay = {
  memberId: string;
  day: Day;
  hours: readonly Stretch[];
  taken: readonly (Stretch & { position: Position | null })[];
  /** Where the technician sets out from and returns to. */
  base: Position | null;
};

export type Wanted = {
  /** Minutes of work. */
  length: number;
  position: Position | null;
  /** The days on one of which the visit should be. */
  due: { from: Day; until: Day } | null;
  technicianId: string | null;
  /** What the customer asks for: ISO weekdays, 1 Monday to 7 Sunday, and hours. */
  wish: { weekdays: readonly number[]; hours: Stretch | null };
};

export type Reason =
  | { kind: "on-the-way"; minutes: number }
  | { kind: "within-due" }
  | { kind: "before-due"; days: number }
  | { kind: "after-due"; days: number }
  | { kind: "preferred-technician" }
  | { kind: "as-wished" };

export type Suggestion = Stretch & { memberId: string; day: Day; addedTravel: number; reasons: Reason[] };

/** Visits begin on the quarter. */
const GRID = 15;
/** Minutes on the road taken for want of one of the two positions. */
const UNKNOWN_TRAVEL = 20;
/** What each fault of a time is worth, in minutes on the road: a choice, to be weighed by whoever books. */
const COST = { dayFromDue: 6, otherTechnician: 40, againstWish: 60 };
const MOST_A_DAY = 2;

/** The best times for a visit, best first, at most two on one day of one technician. */
export function suggestTimes(
  days: readonly OpenDay[],
  wanted: Wanted,
  travel: TravelTimes,
  most = 5,
): Suggestion[] {
  const ranked = days
    .flatMap((day) => timesOf(day, wanted, travel))
    .map((suggestion) => ({ suggestion, cost: costOf(suggestion, wanted) }))
    .sort(
      (one, other) =>
        one.cost - other.cost ||
        one.suggestion.day.localeCompare(other.suggestion.day) ||
        one.suggestion.from - other.suggestion.from ||
        one.suggestion.memberId.localeCompare(other.suggestion.memberId),
    );
  const shown: Suggestion[] = [];
  for (const { suggestion } of ranked) {
    const beside = shown.filter(
      ({ memberId, day }) => memberId === suggestion.memberId && day === suggestion.day,
    );
    if (beside.length < MOST_A_DAY) shown.push(suggestion);
    if (shown.length === most) break;
  }
  return shown;
}

/** In each gap the earliest and the latest time, and the one nearest to the customer's wish. */
function timesOf(day: OpenDay, wanted: Wanted, travel: TravelTimes): Suggestion[] {
  const minutes = (from: Position | null, to: Position | null) =>
    from && to ? travel(from, to) : UNKNOWN_TRAVEL;
  return gapsOf(day).flatMap(({ from, until, before, after }) => {
    const there = minutes(before, wanted.position);
    const away = minutes(wanted.position, after);
    // The day's first and last way are driven outside the hours of work: as far as from and to the base.
    const first = onGrid(from.day ? from.at : from.at + there, Math.ceil);
    const last = onGrid((until.day ? until.at : until.at - away) - wanted.length, Math.floor);
    if (last < first) return [];
    const addedTravel = there + away - (from.day && until.day ? 0 : minutes(before, after));
    const { hours } = wanted.wish;
    const near = hours ? Math.min(Math.max(onGrid(hours.from, Math.ceil), first), last) : first;
    return [...new Set([first, near, last])].map((begins) => {
      const time = { from: begins, until: begins + wanted.length, memberId: day.memberId, day: day.day };
      return { ...time, addedTravel, reasons: reasonsOf({ ...time, addedTravel }, wanted) };
    });
  });
}

type Edge = { at: number; day: boolean };
type Gap = { from: Edge; until: Edge; before: Position | null; after: Position | null };

function gapsOf({ hours, taken, base }: OpenDay): Gap[] {
  const gaps: Gap[] = [];
  for (const stretch of hours) {
    let from: Edge = { at: stretch.from, day: true };
    let before = base;
    for (const one of taken) {
      if (one.until <= stretch.from) {
        before = one.position;
        from = { at: stretch.from, day: false };
      } else if (one.from < stretch.until) {
        gaps.push({ from, until: { at: one.from, day: false }, before, after: one.position });
        from = { at: one.until, day: false };
        before = one.position;
      }
    }
    const next = taken.find((one) => one.from >= stretch.until);
    const until = { at: stretch.until, day: next === undefined };
    gaps.push({ from, until, before, after: next ? next.position : base });
  }
  return gaps;
}

const onGrid = (minute: number, round: (value: number) => number) => round(minute / GRID) * GRID;

function reasonsOf(time: Omit<Suggestion, "reasons">, wanted: Wanted): Reason[] {
  const reasons: Reason[] = [{ kind: "on-the-way", minutes: time.addedTravel }];
  if (wanted.due) {
    const early = differenceInCalendarDays(parseISO(wanted.due.from), parseISO(time.day));
    const late = differenceInCalendarDays(parseISO(time.day), parseISO(wanted.due.until));
    if (early > 0) reasons.push({ kind: "before-due", days: early });
    else if (late > 0) reasons.push({ kind: "after-due", days: late });
    else reasons.push({ kind: "within-due" });
  }
  if (wanted.technicianId === time.memberId) reasons.push({ kind: "preferred-technician" });
  if (hasWish(wanted) && isAsWished(time, wanted)) reasons.push({ kind: "as-wished" });
  return reasons;
}

const hasWish = ({ wish }: Wanted) => wish.weekdays.length > 0 || wish.hours !== null;

function isAsWished({ day, from, until }: Stretch & { day: Day }, { wish }: Wanted): boolean {
  const onWeekday = wish.weekdays.length === 0 || wish.weekdays.includes(getISODay(parseISO(day)));
  return onWeekday && (wish.hours === null || (from >= wish.hours.from && until <= wish.hours.until));
}

function costOf(suggestion: Suggestion, wanted: Wanted): number {
  const fromDue = suggestion.reasons.reduce(
    (days, reason) => (reason.kind === "before-due" || reason.kind === "after-due" ? reason.days : days),
    0,
  );
  return (
    suggestion.addedTravel +
    COST.dayFromDue * fromDue +
    (wanted.technicianId !== null && wanted.technicianId !== suggestion.memberId ? COST.otherTechnician : 0) +
    (hasWish(wanted) && !isAsWished(suggestion, wanted) ? COST.againstWish : 0)
  );
}
