import "server-only";
import { sql } from "drizzle-orm";
import { appDb, authDb } from "@/db/client";
import { log } from "@/lib/log";

/** Ready means both logins reach their tables, so that the first request will not be the one to find out. */
export async function databaseReady(): Promise<boolean> {
  try {
    await Promise.all([
      appDb().execute(sql`select 1 from memberships_of(null)`),
      authDb().execute(sql`select 1 from auth.person limit 1`),
    ]);
    return true;
  } catch (error) {
    log().error({ err: error }, "not ready");
    return false;
  }
}
