import "server-only";
import { sql } from "drizzle-orm";
import { drizzle } from "drizzle-orm/postgres-js";
import postgres from "postgres";
import * as schema from "@/db/schema";
import { env } from "@/lib/env";

/**
 * Two logins, neither of which owns or bypasses anything: the app role sees the shops' tables through
 * row-level security, the auth role sees only the `auth` schema.
 */
function connect(url: string) {
  return drizzle(postgres(url, { max: env().DATABASE_POOL, onnotice: () => {} }), { schema });
}

export type Database = ReturnType<typeof connect>;
export type Tx = Parameters<Parameters<Database["transaction"]>[0]>[0];
/** What a query takes first. */
export type Handle = Database | Tx;

const pools = globalThis as unknown as { agraffeApp?: Database; agraffeAuth?: Database };

export function appDb(): Database {
  pools.agraffeApp ??= connect(env().APP_DATABASE_URL);
  return pools.agraffeApp;
}

export function authDb(): Database {
  pools.agraffeAuth ??= connect(env().AUTH_DATABASE_URL);
  return pools.agraffeAuth;
}

export type ShopScope = { shopId: string; customerId?: string | null };

/**
 * Runs inside one transaction that the database walls off to one shop, and to one customer where the
 * session is a customer's. The settings are local to the transaction, so a pooled connection forgets them.
 */
export function withShop<T>(scope: ShopScope, run: (tx: Tx) => Promise<T>): Promise<T> {
  return appDb().transaction(async (tx) => {
    await tx.execute(
      sql`select set_config('app.shop_id', ${scope.shopId}, true),
                 set_config('app.customer_id', ${scope.customerId ?? ""}, true)`,
    );
    return run(tx);
  });
}

export async function closeDatabases(): Promise<void> {
  const open = [pools.agraffeApp, pools.agraffeAuth].filter((db) => db !== undefined);
  pools.agraffeApp = undefined;
  pools.agraffeAuth = undefined;
  await Promise.all(open.map((db) => db.$client.end({ timeout: 5 })));
}
