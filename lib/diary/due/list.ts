import { AppError } from "@/lib/errors";
import type { DueItem, DueList, DueQuery } from "./schema";

const noWindow = "9999-12-31";

const keys: Record<DueQuery["sort"], (item: DueItem) => string> = {
  due: ({ window }) => window?.until ?? noWindow,
  name: ({ instrument }) => instrument,
  place: ({ city, site }) => `${city} ${site}`,
};

/** The part of the whole due list that a query asks for. Pages by key, so that one booked meanwhile shifts none. */
export function partOf(items: readonly DueItem[], query: DueQuery, locale: string): DueList {
  const inOrder = new Intl.Collator(locale, { sensitivity: "base", numeric: true });
  const keyOf = keys[query.sort];
  const sign = query.direction === "asc" ? 1 : -1;
  const compare = (one: { key: string; id: string }, other: { key: string; id: string }) =>
    sign * (inOrder.compare(one.key, other.key) || (one.id < other.id ? -1 : one.id > other.id ? 1 : 0));
  const after = query.cursor === undefined ? null : readCursor(query.cursor);
  const found = items
    .filter((item) => isAskedFor(item, query))
    .map((item) => ({ item, key: keyOf(item), id: item.instrumentId }))
    .sort(compare)
    .filter((each) => after === null || compare(each, after) > 0);
  const shown = found.slice(0, query.most);
  const last = shown.at(-1);
  return {
    items: shown.map(({ item }) => item),
    next: last && found.length > shown.length ? cursorOf(last) : null,
    counts: countsOf(items),
  };
}

function countsOf(items: readonly DueItem[]): DueList["counts"] {
  const counts = { due: 0, overdue: 0, booked: 0, declined: 0, resting: 0, later: 0 };
  for (const { state } of items) counts[state] += 1;
  return counts;
}

function isAskedFor(item: DueItem, { state, technicianId, kind, city, q }: DueQuery): boolean {
  const inState =
    state === "any" ||
    (state === "to-book" ? item.state === "due" || item.state === "overdue" : item.state === state);
  return (
    inState &&
    (technicianId === undefined || item.technicianId === technicianId) &&
    (kind === undefined || item.kind === kind) &&
    (city === undefined || plain(item.city) === plain(city)) &&
    (q === undefined || contains(item, q))
  );
}

const plain = (text: string) => text.normalize("NFD").replace(/\p{M}/gu, "").toLowerCase();

function contains({ instrument, room, site, city, customer }: DueItem, q: string): boolean {
  const text = plain([instrument, room, site, city, customer].join(" "));
  return plain(q)
    .split(/\s+/)
    .every((word) => text.includes(word));
}

function cursorOf({ key, id }: { key: string; id: string }): string {
  return Buffer.from(JSON.stringify([key, id])).toString("base64url");
}

function readCursor(cursor: string): { key: string; id: string } {
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
