import type { Role } from "@/lib/auth/access";

/** The life of a visit: what may follow what, who may say so, and where a reason is asked. */
export const visitStates = [
  "offered",
  "confirmed",
  "on-the-way",
  "in-progress",
  "done",
  "closed",
  "declined",
  "moved",
  "cancelled",
  "missed",
] as const;

export type VisitState = (typeof visitStates)[number];

const onward: Record<VisitState, readonly VisitState[]> = {
  offered: ["confirmed", "declined", "moved", "cancelled"],
  confirmed: ["on-the-way", "in-progress", "moved", "cancelled", "missed"],
  "on-the-way": ["in-progress", "moved", "cancelled", "missed"],
  "in-progress": ["done"],
  done: ["closed"],
  closed: [],
  declined: [],
  moved: [],
  cancelled: [],
  missed: [],
};

/** A state that can be taken back, always to the one it came from. A moved visit lives on in its successor. */
const takenBack: ReadonlySet<VisitState> = new Set([
  "confirmed",
  "on-the-way",
  "in-progress",
  "done",
  "closed",
  "declined",
  "cancelled",
  "missed",
]);

const withReason: ReadonlySet<VisitState> = new Set(["declined", "moved", "cancelled", "missed"]);

const over: ReadonlySet<VisitState> = new Set(["closed", "declined", "moved", "cancelled", "missed"]);

/** These four take no technician's time; the database's exclusion constraint holds the same list. */
const notLive: ReadonlySet<VisitState> = new Set(["declined", "moved", "cancelled", "missed"]);

export type Change = { from: VisitState | null; to: VisitState };

export type Move = { to: VisitState; asksReason: boolean; back: boolean };

/** The state before this one, by the visit's own history (oldest first); corrections do not count. */
export function cameFrom(state: VisitState, history: readonly Change[]): VisitState | null {
  const entry = history.findLast(
    ({ from, to }) => to === state && from !== null && onward[from].includes(to),
  );
  return entry?.from ?? null;
}

export function movesOf(role: Role, state: VisitState, before: VisitState | null): Move[] {
  if (role === "customer") return [];
  const moves: Move[] = onward[state].map((to) => ({ to, asksReason: withReason.has(to), back: false }));
  // A closed visit may already be on an invoice, so reopening it is the office's decision.
  const mayReopen = state !== "closed" || role !== "technician";
  if (before && takenBack.has(state) && mayReopen && onward[before].includes(state)) {
    moves.push({ to: before, asksReason: false, back: true });
  }
  return moves;
}

export function moveTo(
  role: Role,
  state: VisitState,
  to: VisitState,
  before: VisitState | null,
): Move | undefined {
  return movesOf(role, state, before).find((move) => move.to === to);
}

export function isOver(state: VisitState): boolean {
  return over.has(state);
}

export function isLive(state: VisitState): boolean {
  return !notLive.has(state);
}

/** Somebody is still to come, or there. */
export function isToCome(state: VisitState): boolean {
  return state !== "done" && !over.has(state);
}

export type Part = "time" | "work" | "notes";

/** What of a visit may still be corrected in a state. A new time after the journey began is another visit. */
export function mayCorrect(state: VisitState, part: Part): boolean {
  if (part === "notes") return true;
  if (part === "work") return !over.has(state);
  return state === "offered" || state === "confirmed";
}

export type Busy = { start: number; end: number };

/**
 * Starts, in minutes of the day, at which a visit of this length fits between busy times and within the
 * hours; nearest to the wanted one first. Clashes only as the database sees them: touching ends are free.
 */
export function nearestFree(
  busy: readonly Busy[],
  {
    length,
    wanted,
    opens,
    closes,
    most,
  }: {
    length: number;
    wanted: number;
    opens: number;
    closes: number;
    most: number;
  },
): number[] {
  const step = 15;
  const free: number[] = [];
  const candidates = new Set<number>(busy.flatMap(({ start, end }) => [end, start - length]));
  for (let start = opens; start + length <= closes; start += step) candidates.add(start);
  for (const start of candidates) {
    const end = start + length;
    if (start < opens || end > closes) continue;
    if (busy.some((taken) => start < taken.end && taken.start < end)) continue;
    free.push(start);
  }
  const distance = (start: number) => Math.abs(start - wanted);
  const chosen: number[] = [];
  for (const start of free.sort((one, other) => distance(one) - distance(other) || one - other)) {
    // Three times a quarter of an hour apart are one choice, not three.
    if (chosen.every((other) => Math.abs(other - start) >= 2 * step)) chosen.push(start);
    if (chosen.length === most) break;
  }
  return chosen;
}

export type FirstRecords = { customerId: string | null; siteId: string | null; instruments: boolean };

/** What a book still lacks before a visit can be booked in it: a step that works, one after the other. */
export function firstStep({
  customerId,
  siteId,
  instruments,
}: FirstRecords): "customer" | "site" | "instrument" | null {
  if (!customerId) return "customer";
  if (!siteId) return "site";
  return instruments ? null : "instrument";
}

type Timed = { state: VisitState; start: string; end: string };

/** The visit in hand: under way, else on the way to it, else the first that is not over yet. */
export function inHand<Visit extends Timed>(visits: readonly Visit[], now: string): Visit | undefined {
  const open = visits.filter(({ state }) => !over.has(state) && state !== "done");
  const at = Date.parse(now);
  return (
    open.find(({ state }) => state === "in-progress") ??
    open.find(({ state }) => state === "on-the-way") ??
    open.find(({ end }) => Date.parse(end) > at) ??
    visits.find(({ state }) => state === "done") ??
    open[0]
  );
}
