import type { z } from "zod";
import type { Actor } from "@/lib/auth/actor";
import { customerListQuery } from "@/lib/customers/schema";
import { findCustomers } from "@/lib/customers/service";
import { parseInput } from "@/lib/doors/fields";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { sheetListQuery } from "@/lib/readings/schema";
import { findSheets } from "@/lib/readings/service";
import { siteListQuery } from "@/lib/sites/schema";
import { findSites } from "@/lib/sites/service";
import { visitListQuery } from "@/lib/visits/schema";
import { findVisits } from "@/lib/visits/service";

export type Page = { items: { id: string }[]; next: string | null };
export type List = (actor: Actor, query: Record<string, string>) => Promise<Page>;

function list<Schema extends z.ZodType>(
  schema: Schema,
  find: (actor: Actor, query: z.output<Schema>) => Promise<Page>,
): List {
  return (actor, query) => find(actor, parseInput(schema, query));
}

/** The lists as their doors call them: a query as an address has it, parsed as there. */
export const lists = {
  customers: list(customerListQuery, findCustomers),
  sites: list(siteListQuery, findSites),
  instruments: list(instrumentListQuery, findInstruments),
  visits: list(visitListQuery, findVisits),
};

export const sheetsOf = (instrumentId: string): List =>
  list(sheetListQuery, (actor, query) => findSheets(actor, instrumentId, query));

/** Page after page, to the end or as many as said; `deep` is the cursor of the page at three fifths of the way. */
export async function walk(find: List, actor: Actor, query: Record<string, string>, most = 1_000) {
  const ids: string[] = [];
  const cursors: string[] = [];
  for (let cursor: string | null = ""; cursor !== null && cursors.length < most; ) {
    const page: Page = await find(actor, { ...query, ...(cursor ? { cursor } : {}), most: "100" });
    ids.push(...page.items.map(({ id }) => id));
    cursor = page.next;
    if (cursor) cursors.push(cursor);
  }
  return { ids, deep: cursors[Math.floor(cursors.length * 0.6)] ?? "" };
}
