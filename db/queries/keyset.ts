import { type SQL, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";
import { AppError } from "@/lib/errors";

/**
 * Pages by key, not by offset: a page begins after the last row of the one before, so rows added meanwhile
 * neither repeat nor vanish. The order is one expression (never null) and the id.
 */
export type Order = {
  by: SQL;
  direction: "asc" | "desc";
  id: SQL;
  /** The expression is of a table joined to the one of the id: no index covers both. */
  joined?: boolean;
};

export type Page = { cursor?: string | undefined; most: number };

/** Names in the order people expect, whatever their case and accents; the indexes are made for it. */
export function byName(column: PgColumn): SQL {
  return sql`${column} collate "und-x-icu"`;
}

type Key = { value: string; id: string };

type KeyType = "text" | "timestamptz" | "timestamp" | "integer";

const uuidPattern = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** Whether the database can read the value as this type: a made-up cursor is a 422, not a fault of ours. */
function reads(value: string, type: KeyType): boolean {
  if (type === "text") return !value.includes("\0");
  if (type === "integer") return /^-?\d{1,9}$/.test(value);
  const moment = /^\d{4}-\d{2}-\d{2} \d{2}:\d{2}:\d{2}(\.\d{1,6})?([+-]\d{2}(:\d{2}){0,2})?$/.exec(value);
  return moment !== null && (moment[2] !== undefined) === (type === "timestamptz");
}

function decode(cursor: string, type: KeyType): Key {
  try {
    const [value, id] = JSON.parse(Buffer.from(cursor, "base64url").toString("utf8"));
    if (typeof value === "string" && typeof id === "string" && uuidPattern.test(id) && reads(value, type)) {
      return { value, id };
    }
  } catch {
    // Falls through to the error: a cursor is only ever one of ours.
  }
  throw new AppError("invalid", "This page is gone. Start from the first one.", {
    fields: { cursor: "Not a cursor of this list." },
  });
}

/** The condition that begins a page, or nothing for the first one. `type` is the expression's SQL type. */
export function pageStart(order: Order, page: Page, type: KeyType): SQL | undefined {
  if (!page.cursor) return undefined;
  const { value, id } = decode(page.cursor, type);
  const comparison = sql.raw(order.direction === "asc" ? ">" : "<");
  const after = sql`(${order.by}, ${order.id}) ${comparison} (${value}::${sql.raw(type)}, ${id}::uuid)`;
  // Says no more than `after`, but alone it can go to the index of the table it is of.
  return order.joined ? sql`${order.by} ${comparison}= ${value}::${sql.raw(type)} and ${after}` : after;
}

export function orderBy(order: Order): SQL {
  const direction = sql.raw(order.direction);
  return sql`${order.by} ${direction}, ${order.id} ${direction}`;
}

/** Takes one row more than asked as the sign that there is another page. Rows carry `orderKey` as text. */
export function paged<Row extends { id: string; orderKey: string }>(
  rows: Row[],
  page: Page,
): { items: Omit<Row, "orderKey">[]; next: string | null } {
  const shown = rows.slice(0, page.most);
  const last = shown.at(-1);
  const next =
    rows.length > page.most && last
      ? Buffer.from(JSON.stringify([last.orderKey, last.id])).toString("base64url")
      : null;
  return { items: shown.map(({ orderKey: _, ...row }) => row), next };
}
