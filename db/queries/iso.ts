import { type SQL, sql } from "drizzle-orm";

/** An instant of raw SQL as ISO 8601 in UTC; the driver leaves those to the session's own writing. */
export function isoInstant(instant: SQL): SQL<string> {
  return sql<string>`to_char((${instant}) at time zone 'utc', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;
}
