import { addDays, addMonths, type Day, daysInMonth } from "@/lib/dates";

/** When an instrument wants its next visit. */
export type Rhythm =
  | { kind: "interval"; every: number; unit: "week" | "month" }
  /** By season: the months of the year, 1 to 12, in each of which one visit falls. */
  | { kind: "months"; months: readonly number[] }
  /** Within so many days before each event of its hall. */
  | { kind: "events"; daysBefore: number };

/** The days, both included, on one of which the visit should be. */
export type DueWindow = { from: Day; until: Day };

export type ServiceHistory = {
  /** The day of the last visit that was done, or brought along from before the book was opened. */
  lastServed: Day | null;
  /** From when on the plan holds: what a plan without a history counts from. */
  startsOn: Day;
  /** Days of the hall's events, in any order. */
  events: readonly Day[];
};

export type DueState = "resting" | "booked" | "declined" | "overdue" | "due" | "later";

/** A season's visit may come this many days early and still counts for it: common practice, no source. */
const EARLY_FOR_SEASON = 21;
/** Share of the interval by which the visit may be early or late, and the least number of days for it. */
const TOLERANCE = 0.05;
const LEAST_TOLERANCE = 3;
const DAYS_A_MONTH = 365.2425 / 12;

/** The next time the instrument is due; null when there is none to come, as after a hall's last event. */
export function dueWindow(rhythm: Rhythm, history: ServiceHistory, today: Day): DueWindow | null {
  switch (rhythm.kind) {
    case "interval":
      return afterInterval(rhythm, history);
    case "months":
      return inNextSeason(rhythm.months, history);
    case "events":
      return beforeNextEvent(rhythm.daysBefore, history, today);
  }
}

function afterInterval(
  { every, unit }: Extract<Rhythm, { kind: "interval" }>,
  { lastServed, startsOn }: ServiceHistory,
): DueWindow {
  const target = lastServed ? later(lastServed, every, unit) : startsOn;
  const length = unit === "week" ? 7 * every : DAYS_A_MONTH * every;
  const tolerance = Math.max(LEAST_TOLERANCE, Math.round(TOLERANCE * length));
  return { from: addDays(target, -tolerance), until: addDays(target, tolerance) };
}

function later(day: Day, count: number, unit: "week" | "month"): Day {
  return unit === "week" ? addDays(day, 7 * count) : addMonths(day, count);
}

function inNextSeason(months: readonly number[], { lastServed, startsOn }: ServiceHistory): DueWindow | null {
  const inOrder = [...months].sort((one, other) => one - other);
  const firstYear = Number((lastServed ?? startsOn).slice(0, 4));
  for (let year = firstYear; year <= firstYear + 2; year += 1) {
    for (const month of inOrder) {
      const season = wholeMonth(year, month);
      const open = lastServed
        ? addDays(season.from, -EARLY_FOR_SEASON) > lastServed
        : season.until >= startsOn;
      if (open) return season;
    }
  }
  return null;
}

function wholeMonth(year: number, month: number): DueWindow {
  const name = `${year}-${String(month).padStart(2, "0")}`;
  return { from: `${name}-01`, until: `${name}-${daysInMonth(name)}` };
}

function beforeNextEvent(
  daysBefore: number,
  { lastServed, startsOn, events }: ServiceHistory,
  today: Day,
): DueWindow | null {
  const next = [...events]
    .sort()
    .find(
      (event) =>
        event >= today && event >= startsOn && !(lastServed && lastServed >= addDays(event, -daysBefore)),
    );
  return next ? { from: addDays(next, -daysBefore), until: next } : null;
}

export type DueFacts = {
  window: DueWindow | null;
  resting: boolean;
  /** The day of a coming visit to the instrument. */
  bookedOn: Day | null;
  /** The day the customer last declined an offer. */
  declinedOn: Day | null;
  /** From how many days before its window the shop wants to see an instrument. */
  leadDays: number;
};

export function dueState(
  { window, resting, bookedOn, declinedOn, leadDays }: DueFacts,
  today: Day,
): DueState {
  if (bookedOn !== null) return "booked";
  if (resting) return "resting";
  if (window === null) return "later";
  const seenFrom = addDays(window.from, -leadDays);
  if (declinedOn !== null && declinedOn >= seenFrom) return "declined";
  if (today > window.until) return "overdue";
  return today >= seenFrom ? "due" : "later";
}
