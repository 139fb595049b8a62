import postgres from "postgres";
import type { Role } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { newId } from "@/lib/ids";
import { preparation, rows } from "./large-rows";

export type LargeDatabase = {
  /** As the owner of the tables, past the walls. */
  owner: postgres.Sql;
  /** A member of the shop under test, by what they are. */
  actor: (role: Role, which?: number) => Promise<Actor>;
  drop: () => Promise<void>;
};

/** Neither the first written nor the last. */
const shopUnderTest = "Shop 7";

function addressOf(variable: string, database?: string): string {
  const address = process.env[variable];
  if (!address) throw new Error(`${variable} is not set`);
  if (!database) return address;
  const url = new URL(address);
  url.pathname = `/${database}`;
  return url.href;
}

/**
 * A database of its own, a copy of the migrated template, with many shops in it. The product's addresses in
 * the environment point to it until it is dropped; called before the product has opened a connection.
 */
export async function makeLargeDatabase(name: string): Promise<LargeDatabase> {
  const template = process.env.TEST_TEMPLATE_DATABASE;
  if (!template) {
    throw new Error(
      "TEST_TEMPLATE_DATABASE is not set: leave TEST_DATABASE_URL unset too, and the tests make both",
    );
  }
  const before = { app: addressOf("APP_DATABASE_URL"), auth: addressOf("AUTH_DATABASE_URL") };
  const maintenance = postgres(addressOf("TEST_DATABASE_URL"), { max: 1, onnotice: () => {} });
  await maintenance`drop database if exists ${maintenance(name)} with (force)`;
  await maintenance`create database ${maintenance(name)} template ${maintenance(template)}`;
  const owner = postgres(addressOf("TEST_DATABASE_URL", name), { max: 1, onnotice: () => {} });
  process.env.APP_DATABASE_URL = addressOf("APP_DATABASE_URL", name);
  process.env.AUTH_DATABASE_URL = addressOf("AUTH_DATABASE_URL", name);
  await fill(owner);
  return {
    owner,
    actor: (role, which = 1) => actorOf(owner, role, which),
    async drop() {
      await owner.end({ timeout: 5 });
      await maintenance`drop database ${maintenance(name)} with (force)`;
      await maintenance.end({ timeout: 5 });
      process.env.APP_DATABASE_URL = before.app;
      process.env.AUTH_DATABASE_URL = before.auth;
    },
  };
}

/** With keys and indexes set aside and made again afterwards, as they were: many times faster. */
async function fill(owner: postgres.Sql): Promise<void> {
  const keys = await owner<{ aside: string; back: string }[]>`
    select format('alter table %s drop constraint %I', conrelid::regclass, conname) as aside,
      format('alter table %s add constraint %I %s', conrelid::regclass, conname, pg_get_constraintdef(oid)) as back
      from pg_constraint
     where connamespace = 'public'::regnamespace and contype in ('p', 'x', 'f') and conrelid <> 'request_count'::regclass
     order by array_position('{f,x,p}'::text[], contype::text), conrelid`;
  const indexes = await owner<{ aside: string; back: string }[]>`
    select format('drop index %s', indexrelid::regclass) as aside, pg_get_indexdef(indexrelid) as back
      from pg_index i join pg_class c on c.oid = i.indrelid
     where c.relnamespace = 'public'::regnamespace
       and not exists (select 1 from pg_constraint k where k.conindid = i.indexrelid)`;
  const run = (statements: readonly string[]) => owner.unsafe(statements.join(";\n")).simple();
  await owner.unsafe("set maintenance_work_mem = '256MB'; set work_mem = '64MB'").simple();
  await run([...indexes, ...keys].map(({ aside }) => aside));
  await run(followers.map((table) => `alter table ${table} disable trigger user`));
  await owner.unsafe(preparation).simple();
  for (const statement of rows) await owner.unsafe(statement);
  for (const { back } of [...keys.toReversed(), ...indexes]) await owner.unsafe(back);
  await run(followers.map((table) => `alter table ${table} enable trigger user`));
  await owner`vacuum (analyze)`;
}

/** Tables whose triggers derive what the rows already carry. */
const followers = ["visit", "visit_technician"];

async function actorOf(owner: postgres.Sql, role: Role, which: number): Promise<Actor> {
  const [member] = await owner<Omit<Actor, "sessionId">[]>`
    select m.person_id as "personId", m.shop_id as "shopId", m.id as "memberId", m.role, m.customer_id as "customerId",
      m.name, s.name as "shopName"
      from member m join shop s on s.id = m.shop_id
     where s.name = ${shopUnderTest} and m.role = ${role} order by m.id offset ${which - 1} limit 1`;
  if (!member) throw new Error(`${shopUnderTest} has no ${role} number ${which}`);
  return { ...member, sessionId: newId() };
}
