import "server-only";
import { sql } from "drizzle-orm";
import { appDb } from "@/db/client";

export type Limit = { most: number; seconds: number };

export type Counted = { allowed: boolean; retryAfterSeconds: number };

/** Counts one request in a window shared by all web processes. */
export async function countRequest(key: string, limit: Limit): Promise<Counted> {
  const [row] = await appDb().execute<{ seen: number; resets_in: number }>(
    sql`select seen, resets_in from count_request(${key}, ${limit.seconds})`,
  );
  const seen = row?.seen ?? 0;
  return { allowed: seen <= limit.most, retryAfterSeconds: Math.max(1, row?.resets_in ?? limit.seconds) };
}

/** Begins a count anew, after the success that made the earlier tries harmless. */
export async function forgetRequests(key: string): Promise<void> {
  await appDb().execute(sql`select forget_requests(${key})`);
}
