import postgres from "postgres";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { publicTables, unwalled } from "../support/catalogue";
import { closeFactories, owner } from "../support/factories";
import { type FurnishedShop, furnishShop } from "../support/furnished-shop";

/**
 * Raw SQL as the app role, past every service: what an injection or a forgotten condition would meet.
 * The tables come from the catalogue, so a new one is tried here without anybody listing it.
 */
let app: postgres.Sql;
let mine: FurnishedShop;
let theirs: FurnishedShop;
let tables: string[];

function inShop<T>(
  shopId: string,
  run: (sql: postgres.TransactionSql) => Promise<T>,
  customerId = "",
): Promise<T> {
  return app.begin(async (sql) => {
    await sql`select set_config('app.shop_id', ${shopId}, true), set_config('app.customer_id', ${customerId}, true)`;
    return run(sql);
  }) as Promise<T>;
}

async function errorOf(attempt: Promise<unknown>): Promise<string> {
  return attempt.then(
    () => "no error",
    (error: { code?: string }) => error.code ?? String(error),
  );
}

const shopColumn = (table: string) => (table === "shop" ? "id" : "shop_id");

beforeAll(async () => {
  const url = process.env.APP_DATABASE_URL;
  if (!url) throw new Error("APP_DATABASE_URL is not set");
  app = postgres(url, { max: 4, onnotice: () => {} });
  mine = await furnishShop();
  theirs = await furnishShop();
  tables = (await publicTables(owner())).map(({ name }) => name).filter((name) => name !== "request_count");
});

afterAll(async () => {
  await app.end();
  await closeFactories();
});

describe("every table of the catalogue is walled", () => {
  it("has row-level security, a shop and a rule to read by on every table", async () => {
    const found = await publicTables(owner());
    expect(found.length).toBeGreaterThan(15);
    expect(unwalled(found)).toEqual([]);
  });

  it("notices a table planted without a rule, and the app role cannot reach it", async () => {
    await owner()`create table planted (shop_id uuid, secret text)`;
    try {
      expect(unwalled(await publicTables(owner()))).toEqual(["planted: no row-level security"]);
      expect(await errorOf(inShop(mine.shopId, (sql) => sql`select * from planted`))).toBe("42501");
    } finally {
      await owner()`drop table planted`;
    }
  });

  it("has a row of both shops in every table, or the tests below would prove nothing", async () => {
    for (const table of tables) {
      for (const { shopId } of [mine, theirs]) {
        const [row] =
          await owner()`select count(*)::int as n from ${owner()(table)} where ${owner()(shopColumn(table))} = ${shopId}`;
        expect(row?.n, `${table} needs a row in tests/support/furnished-shop.ts`).toBeGreaterThan(0);
      }
    }
  });

  it("shows another shop's rows to nobody", async () => {
    for (const table of tables) {
      const [seen] = await inShop(
        mine.shopId,
        (
          sql,
        ) => sql`select count(*) filter (where ${sql(shopColumn(table))} <> ${mine.shopId})::int as foreign_rows,
          count(*)::int as own_rows from ${sql(table)}`,
      );
      expect(seen?.foreign_rows, table).toBe(0);
      expect(seen?.own_rows, table).toBeGreaterThan(0);
    }
  });

  it("shows nothing at all before a shop is set, and after the transaction that set one", async () => {
    const reserved = await app.reserve();
    try {
      for (const table of tables) {
        const [before] = await reserved`select count(*)::int as n from ${reserved(table)}`;
        expect(before?.n, table).toBe(0);
      }
      await reserved`begin`;
      await reserved`select set_config('app.shop_id', ${mine.shopId}, true)`;
      await reserved`commit`;
      const [after] = await reserved`select count(*)::int as n from customer`;
      expect(after?.n).toBe(0);
    } finally {
      reserved.release();
    }
  });

  it("changes and deletes no row of another shop", async () => {
    for (const table of tables) {
      const column = shopColumn(table);
      const touched = await inShop(mine.shopId, async (sql) => {
        const updated =
          await sql`update ${sql(table)} set ${sql(column)} = ${sql(column)} where ${sql(column)} = ${theirs.shopId} returning 1`;
        const deleted =
          await sql`delete from ${sql(table)} where ${sql(column)} = ${theirs.shopId} returning 1`;
        return updated.length + deleted.length;
      });
      expect(touched, table).toBe(0);
    }
  });

  it("lets no row be moved or copied into another shop", async () => {
    for (const table of tables) {
      const column = shopColumn(table);
      const moved = await errorOf(
        inShop(mine.shopId, async (sql) => {
          const rows = await sql`update ${sql(table)} set ${sql(column)} = ${theirs.shopId} returning 1`;
          if (rows.length > 0) throw new Error(`${table} moved`);
          throw Object.assign(new Error("nothing to update"), { code: "append-only" });
        }),
      );
      expect(["42501", "23503", "append-only"], `${table}: ${moved}`).toContain(moved);
    }
    const planted = await errorOf(
      inShop(
        mine.shopId,
        (sql) =>
          sql`insert into customer (shop_id, id, name) values (${theirs.shopId}, ${crypto.randomUUID()}, 'planted')`,
      ),
    );
    expect(planted).toBe("42501");
  });

  it("keeps foreign keys inside the shop: another shop's site cannot carry my visit", async () => {
    const crossed = await errorOf(
      inShop(
        mine.shopId,
        (
          sql,
        ) => sql`insert into visit (shop_id, id, site_id, customer_id, starts_local, ends_local, time_zone)
          values (${mine.shopId}, ${crypto.randomUUID()}, ${theirs.siteId}, ${mine.customerId}, '2027-01-04 09:00', '2027-01-04 10:00', 'Europe/Dublin')`,
      ),
    );
    expect(crossed).toBe("23503");
  });

  it("keeps the sign-ins out of reach of the shops' role, and the shops out of reach of the sign-ins' role", async () => {
    expect(await errorOf(app`select * from auth.person`)).toBe("42501");
    const url = process.env.AUTH_DATABASE_URL;
    if (!url) throw new Error("AUTH_DATABASE_URL is not set");
    const signIns = postgres(url, { max: 1, onnotice: () => {} });
    expect(await errorOf(signIns`select * from customer`)).toBe("42501");
    await signIns.end();
  });

  it("runs as roles that own nothing and bypass nothing", async () => {
    const [role] =
      await owner()`select bool_or(rolsuper or rolbypassrls or rolcreaterole or rolcreatedb) as strong
      from pg_roles where rolname in ('agraffe_app', 'agraffe_auth')`;
    expect(role?.strong).toBe(false);
    const [owned] =
      await owner()`select count(*)::int as n from pg_class c join pg_roles r on r.oid = c.relowner
      where r.rolname in ('agraffe_app', 'agraffe_auth')`;
    expect(owned?.n).toBe(0);
  });

  it("gives every definer function a fixed search path", async () => {
    const loose = await owner()`select p.proname from pg_proc p
      where p.pronamespace = 'public'::regnamespace and p.prosecdef
        and not exists (select 1 from unnest(p.proconfig) c where c like 'search_path=%')`;
    expect(loose).toEqual([]);
  });
});

describe("a customer's session, inside the shop", () => {
  const asCustomer = <T>(run: (sql: postgres.TransactionSql) => Promise<T>) =>
    inShop(mine.shopId, run, mine.customerId);

  it("sees its own records and none of the neighbour's", async () => {
    const seen = await asCustomer(async (sql) => ({
      customers: (await sql`select id from customer`).map(({ id }) => id),
      sites: (await sql`select id from site`).map(({ id }) => id),
      instruments: (await sql`select id from instrument`).map(({ id }) => id),
      visits: (await sql`select id from visit`).map(({ id }) => id),
    }));
    expect(seen).toEqual({
      customers: [mine.customerId],
      sites: [mine.siteId],
      instruments: [mine.instrumentId],
      visits: [mine.visitId],
    });
  });

  it("reads no workshop record: sheets, readings, plans, styles, strings, invitations", async () => {
    for (const table of [
      "reading_sheet",
      "note_reading",
      "stretch_plan",
      "house_style",
      "instrument_string",
      "invitation",
    ]) {
      const rows = await asCustomer((sql) => sql`select 1 from ${sql(table)}`);
      expect(rows.length, table).toBe(0);
    }
  });

  it("loses sight of an instrument that is sold", async () => {
    const shop = await furnishShop();
    await owner()`update instrument_holding set until = '2026-01-01' where shop_id = ${shop.shopId} and instrument_id = ${shop.instrumentId}`;
    const rows = await inShop(shop.shopId, (sql) => sql`select id from instrument`, shop.customerId);
    expect(rows.length).toBe(0);
  });

  it("writes nothing, anywhere", async () => {
    for (const table of tables) {
      const changed = await asCustomer(async (sql) => {
        const column = shopColumn(table);
        const updated = await sql`update ${sql(table)} set ${sql(column)} = ${sql(column)} returning 1`;
        const deleted = await sql`delete from ${sql(table)} returning 1`;
        return updated.length + deleted.length;
      });
      expect(changed, table).toBe(0);
    }
    const planted = await errorOf(
      asCustomer(
        (sql) =>
          sql`insert into customer (shop_id, id, name) values (${mine.shopId}, ${crypto.randomUUID()}, 'planted')`,
      ),
    );
    expect(planted).toBe("42501");
  });

  it("finds nothing through the search functions", async () => {
    const staff = await inShop(
      mine.shopId,
      (sql) => sql`select * from search_shop('lynn', array['customer'], 10)`,
    );
    expect(staff.length).toBeGreaterThan(0);
    const rows = await asCustomer((sql) => sql`select * from search_shop('lynn', array['customer'], 10)`);
    expect(rows.length).toBe(0);
  });
});
