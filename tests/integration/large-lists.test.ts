import { sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases, withShop } from "@/db/client";
import type { Actor } from "@/lib/auth/actor";
import { dueQuery } from "@/lib/diary/due/schema";
import { findDue } from "@/lib/diary/due/service";
import { getHistory } from "@/lib/instruments/history/service";
import { search } from "@/lib/search/service";
import { workDay } from "@/lib/visits/day/service";
import { type LargeDatabase, makeLargeDatabase } from "../support/large-database";
import { type List, lists, sheetsOf, walk } from "../support/large-lists";
import { faultsOf, indexUse, readPlans, type TableSize, tableSizes } from "../support/query-plans";

/**
 * One shop of twenty with 5 000 instruments each. What is held is what the server reads, not how long it takes:
 * times depend on the machine and are printed for information.
 */
let large: LargeDatabase;
let sizes: TableSize[];
let office: Actor;
/** The sign-in of a customer with 300 instruments at one site, and that of one with two. */
let conservatory: Actor;
let household: Actor;
/** An instrument of the conservatory with many reading sheets. */
let practised: string;

const figures: string[] = [];

beforeAll(async () => {
  large = await makeLargeDatabase("agraffe_large");
  office = await large.actor("office");
  conservatory = await large.actor("customer", 1);
  household = await large.actor("customer", 2);
  sizes = await tableSizes(large.owner, office.shopId);
  const [most] = await large.owner<{ id: string }[]>`select instrument_id as id from reading_sheet
    where shop_id = ${office.shopId} group by 1 order by count(*) desc limit 1`;
  practised = most?.id ?? "";
}, 400_000);

afterAll(async () => {
  await closeDatabases();
  await large?.drop();
  console.info(["list | index | buffers | median ms | 95th percentile ms | calls", ...figures].join("\n"));
});

const ofShop = (table: string) => sizes.find((size) => size.table === table)?.ofShop ?? 0;

const turns = 30;
const mostMilliseconds = 1_500;

/** Holds a call to the shop's rows, an index and a number of buffers, and notes how long it takes, in 30 turns if they are quick. */
async function hold<T>(name: string, call: () => Promise<T>, index: string, mostBuffers: number) {
  await call();
  const before = await indexUse(large.owner);
  const reading = await readPlans(call);
  const after = await indexUse(large.owner);
  const times: number[] = [];
  const until = performance.now() + mostMilliseconds;
  while (times.length < turns && (times.length < 5 || performance.now() < until)) {
    const begun = performance.now();
    await call();
    times.push(performance.now() - begun);
  }
  times.sort((a, b) => a - b);
  const at = (part: number) => (times[Math.ceil(part * times.length) - 1] ?? Number.NaN).toFixed(1);
  figures.push([name, index, reading.buffers, at(0.5), at(0.95), times.length].join(" | "));
  expect(faultsOf(reading, sizes), name).toEqual([]);
  expect((after.get(index) ?? 0) - (before.get(index) ?? 0), `${name} enters ${index}`).toBeGreaterThan(0);
  expect(reading.buffers, `${name}: buffers`).toBeLessThanOrEqual(mostBuffers);
  return reading.value;
}

describe("the check itself", () => {
  it("stands on tables large enough, in which the shop is one of many", () => {
    for (const table of [
      "customer",
      "site",
      "instrument",
      "instrument_holding",
      "visit",
      "job",
      "note_reading",
    ]) {
      const size = sizes.find((entry) => entry.table === table);
      expect(size?.rows, table).toBeGreaterThan(10_000);
      expect(size?.rows, table).toBe(20 * (size?.ofShop ?? 0));
    }
    expect(ofShop("instrument")).toBe(5_000);
  });

  it("notices a list that walks a table", async () => {
    const reading = await readPlans(() =>
      withShop(office, async (tx) => {
        await tx.execute(sql`select set_config(s, 'off', true)
          from unnest(array['enable_indexscan', 'enable_bitmapscan', 'enable_indexonlyscan']) s`);
        // Helpers share the rows among them, and a plan names each one's share.
        await tx.execute(sql`select set_config('max_parallel_workers_per_gather', '0', true)`);
        return tx.execute(sql`select id from visit order by starts_local limit 10`);
      }),
    );
    const faults = faultsOf(reading, sizes);
    expect(faults).toContain("visit is read from end to end");
    expect(faults).toContain("a plan walks visit from end to end");
    expect(faults).toContain("a plan reads 100000 rows of visit where the shop has 5000");
  });
});

describe("a shop of 5 000 instruments among twenty, for staff", () => {
  type Sorted = [keyof typeof lists, Record<string, string>, string, number];

  it.each<Sorted>([
    ["customers", { sort: "name" }, "customer_by_name", 1_800],
    ["customers", { sort: "updated", direction: "desc" }, "customer_by_change", 1_800],
    ["sites", { sort: "name" }, "site_by_name", 3_500],
    ["sites", { sort: "city" }, "site_by_city", 3_500],
    ["sites", { sort: "customer" }, "customer_by_name", 3_500],
    ["sites", { sort: "updated" }, "site_by_change", 3_500],
    ["instruments", { sort: "name" }, "instrument_by_name", 1_800],
    ["instruments", { sort: "place" }, "site_by_name", 1_800],
    ["instruments", { sort: "place", direction: "desc" }, "site_by_name", 4_500],
    ["instruments", { sort: "owner" }, "customer_by_name", 1_800],
    ["instruments", { sort: "updated" }, "instrument_by_change", 1_800],
    ["visits", { direction: "desc" }, "visit_by_start", 2_400],
    ["visits", { direction: "asc" }, "visit_by_start", 2_400],
  ])("lists %s by %j, the first page and one deep inside", async (name, query, index, buffers) => {
    const words = `${name} by ${query.sort ?? "start"}${query.direction === "desc" ? ", descending" : ""}`;
    const first = await hold(words, () => lists[name](office, query), index, buffers);
    expect(first.items).toHaveLength(50);
    const { deep } = await walk(lists[name], office, query, 15);
    await hold(`${words}, deep`, () => lists[name](office, { ...query, cursor: deep }), index, buffers);
  });

  it.each<[keyof typeof lists, Record<string, string>, string]>([
    ["customers", { sort: "name" }, "customer"],
    ["sites", { sort: "customer" }, "site"],
    ["instruments", { sort: "place", direction: "desc" }, "instrument"],
    ["visits", { direction: "desc" }, "visit"],
  ])("meets every record once on the pages of %s by %j", async (name, query, table) => {
    const { ids } = await walk(lists[name], office, query);
    expect(new Set(ids).size).toBe(ids.length);
    const { owner } = large;
    const [kept] = await owner<{ rows: number }[]>`select count(*)::int as rows from ${owner(table)}
      where shop_id = ${office.shopId} ${table === "visit" ? owner`` : owner`and archived_at is null`}`;
    expect(ids).toHaveLength(kept?.rows ?? 0);
  });

  it.each([
    ["customers", { archived: "only" }, "customer_search", 3_500],
    ["sites", { archived: "only" }, "site_search", 3_500],
    ["instruments", { archived: "only" }, "instrument_by_name", 5_000],
    ["instruments", { kind: "grand" }, "instrument_by_name", 2_000],
    ["visits", { state: "offered" }, "visit_unfinished", 2_400],
    ["visits", { state: "cancelled" }, "visit_come_to_nothing", 2_400],
  ] as const)("lists %s of %j", async (name, query, index, buffers) => {
    await hold(
      [name, ...Object.entries(query).flat()].join(" "),
      () => lists[name](office, query),
      index,
      buffers,
    );
  });

  it("lists the visits of some days, of a site, a customer, an instrument and a technician", async () => {
    const technician = await large.actor("technician");
    const [here] = await large.owner<{ site: string; instrument: string; day: string }[]>`
      select v.site_id as site, j.instrument_id as instrument, v.starts_local::date::text as day
        from visit v join job j on j.shop_id = v.shop_id and j.visit_id = v.id
       where v.shop_id = ${office.shopId} order by v.id offset 2500 limit 1`;
    if (!here) throw new Error("The shop has no visit");
    const of = (words: string, query: Record<string, string>, index: string, buffers: number) =>
      hold(`visits of ${words}`, () => lists.visits(office, query), index, buffers);
    await of("a day", { from: here.day, to: here.day }, "visit_by_start", 2_400);
    await of("a site", { siteId: here.site }, "visit_of_site", 500);
    await of("a customer", { customerId: conservatory.customerId ?? "" }, "visit_of_customer", 3_000);
    await of("an instrument", { instrumentId: here.instrument }, "job_of_instrument", 500);
    await of("a technician", { technicianId: technician.memberId }, "visit_by_start", 3_000);
    await hold("a day's work", () => workDay(office, here.day), "visit_by_start", 3_000);
    await hold("a technician's day", () => workDay(technician, here.day), "visit_by_start", 3_000);
  });

  it("computes the due list of the whole shop", async () => {
    const list = await hold(
      "due list",
      () => findDue(office, dueQuery.parse({ state: "any" })),
      "service_plan_shop_id_instrument_id_pk",
      55_000,
    );
    const counted = Object.values(list.counts).reduce((sum, count) => sum + count, 0);
    expect(counted).toBe(5_000 - Math.floor(5_000 / 33));
  });

  it("lists the reading sheets of an instrument to the last page, and its history", async () => {
    const find: List = sheetsOf(practised);
    const { ids, deep } = await walk(find, office, {});
    expect(ids.length).toBeGreaterThanOrEqual(150);
    expect(new Set(ids).size).toBe(ids.length);
    await hold("reading sheets", () => find(office, {}), "reading_sheet_of_instrument", 1_200);
    await hold(
      "reading sheets, deep",
      () => find(office, { cursor: deep }),
      "reading_sheet_of_instrument",
      1_200,
    );
    await hold(
      "an instrument's history",
      () => getHistory(office, practised),
      "reading_sheet_of_instrument",
      2_500,
    );
  });

  it.each([
    ["customers", "odile", "customer_search", 3_500],
    ["sites", "lantern", "site_search", 6_000],
    ["instruments", "b-0123", "instrument_search", 500],
    ["instruments", "osterby saltmere", "instrument_search", 20_000],
    // A quarter of the shop's instruments match: all are weighed, none beyond.
    ["instruments", "osterby", "instrument_search", 60_000],
  ] as const)('finds %s by "%s" in the list', async (name, q, index, buffers) => {
    const words = `${name} with "${q}"`;
    const page = await hold(words, () => lists[name](office, { q }), index, buffers);
    expect(page.items.length, words).toBeGreaterThan(0);
  });

  it.each([
    ["a serial number's beginning", "b-0123", "instrument_search", 500],
    ["a name", "odile", "customer_search", 15_000],
    ["a word in a quarter of the instruments", "osterby", "instrument_search", 25_000],
    ["a letter nearly everything has", "e", "customer_shop_id_id_pk", 50_000],
    ["a misspelt name", "odlie gorse", "customer_search", 1_000],
  ] as const)("searches for %s", async (words, q, index, buffers) => {
    const answer = await hold(`search for ${words}`, () => search(office, { q, most: 20 }), index, buffers);
    expect(answer.items.length, words).toBeGreaterThan(0);
  });
});

describe("a customer's session in such a shop", () => {
  it.each([
    ["customers", {}, "customer_shop_id_id_pk", 60],
    ["sites", { sort: "city" }, "site_of_customer", 80],
    ["instruments", { sort: "place" }, "instrument_holding_owner", 120],
    ["instruments", { q: "house" }, "instrument_holding_owner", 120],
    ["visits", {}, "visit_of_customer", 200],
  ] as const)("of two instruments, reads %s %j and little else", async (name, query, index, buffers) => {
    const words = [name, ...Object.values(query), "a household's own"].join(", ");
    const page = await hold(words, () => lists[name](household, query), index, buffers);
    expect(page.items.length).toBeGreaterThan(0);
    expect(page.items.length).toBeLessThan(10);
  });

  it.each([
    ["customers", {}, "customer_shop_id_id_pk", 5_000],
    ["sites", {}, "site_of_customer", 5_000],
    ["instruments", {}, "instrument_holding_owner", 7_000],
    ["instruments", { sort: "place" }, "instrument_holding_owner", 7_000],
    ["visits", {}, "visit_of_customer", 4_000],
  ] as const)("of 300 instruments, reads %s %j of its own", async (name, query, index, buffers) => {
    await hold(
      [name, ...Object.values(query), "a conservatory's own"].join(", "),
      () => lists[name](conservatory, query),
      index,
      buffers,
    );
  });
});
