import { AppError } from "@/lib/errors";
import type { DueItem, DueList, DueQuery } from "./schema";

/** What is known of an instrument before its names are read: enough to count, and to order by when it is due. */
export type DueFact = Omit<
  DueItem,
  "instrument" | "room" | "siteId" | "site" | "city" | "customerId" | "customer" | "technician"
>;

const noWindow = "9999-12-31";

/** Whether the question is about names, so that those of every instrument are needed to answer it. */
export function asksForNames({ sort, q, city }: DueQuery): boolean {
  return sort !== "due" || Boolean(q) || Boolean(city);
}

export function countsOf(facts: readonly DueFact[]): DueList["counts"] {
  const counts = { due: 0, overdue: 0, booked: 0, declined: 0, resting: 0, later: 0 };
  for (const { state } of facts) counts[state] += 1;
  return counts;
}

export function isAskedFor(fact: DueFact, { state, technicianId, kind }: DueQuery): boolean {
  const inState =
    state === "any" ||
    (state === "to-book" ? fact.state === "due" || fact.state === "overdue" : fact.state === state);
  return (
    inState &&
    (technicianId === undefined || fact.technicianId === technicianId) &&
    (kind === undefined || fact.kind === kind)
  );
}

export function isNamed({ instrument, room, site, city, customer }: DueItem, asked: DueQuery): boolean {
  if (asked.city && plain(city) !== plain(asked.city)) return false;
  const text = plain([instrument, room, site, city, customer].join(" "));
  return plain(asked.q ?? "")
    .split(/\s+/)
    .every((word) => text.includes(word));
}

export const byDue = ({ window }: DueFact) => (window ? `${window.from} ${window.until}` : noWindow);
export const byNames: Record<DueQuery["sort"], (item: DueItem) => string> = {
  due: byDue,
  name: ({ instrument }) => instrument,
  place: ({ city, site }) => `${city} ${site}`,
};

/** For days and ids; names are ordered as the shop's language does. */
export const byCode = (one: string, other: string) => (one < other ? -1 : one > other ? 1 : 0);

/** A page by key, so that one booked meanwhile shifts none. */
export function pageOf<Item extends { instrumentId: string }>(
  items: readonly Item[],
  keyOf: (item: Item) => string,
  { direction, cursor, most }: DueQuery,
  inOrder: (one: string, other: string) => number,
): { items: Item[]; next: string | null } {
  const sign = direction === "asc" ? 1 : -1;
  const compare = (one: Key, other: Key) => sign * (inOrder(one.key, other.key) || byCode(one.id, other.id));
  const after = cursor === undefined ? null : readCursor(cursor);
  const found = items
    .map((item) => ({ item, key: keyOf(item), id: item.instrumentId }))
    .filter((each) => after === null || compare(each, after) > 0)
    .sort(compare);
  const shown = found.slice(0, most);
  const last = shown.at(-1);
  return {
    items: shown.map(({ item }) => item),
    next: last && found.length > shown.length ? cursorOf(last) : null,
  };
}

const plain = (text: string) => text.normalize("NFD").replace(/\p{M}/gu, "").toLowerCase();

type Key = { key: string; id: string };

function cursorOf({ key, id }: Key): string {
  return Buffer.from(JSON.stringify([key, id])).toString("base64url");
}

function readCursor(cursor: string): Key {
  try {
    const [key, id] = JSON.parse(Buffer.from(cursor, "base64url").toString("utf8"));
    if (typeof key === "string" && typeof id === "string") return { key, id };
  } catch {
    // Falls through to the error: a cursor is only ever one of ours.
  }
  throw new AppError("invalid", "This page is gone. Start from the first one.", {
    fields: { cursor: "Not a cursor of this list." },
  });
}
