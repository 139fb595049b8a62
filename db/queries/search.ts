import { type SQL, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";
import type { Handle } from "@/db/client";

export type Kind = "customer" | "site" | "instrument";

/** Most ids a list's search may match: beyond that the words are too common to be a search. */
const mostMatches = 2000;

/** A list's search condition. Goes through search_shop, which may use the trigram index under the walls. */
export function matching(kind: Kind, id: PgColumn, query: string): SQL {
  return sql`${id} in (select found.id from search_shop(${query}, array[${kind}]::text[], ${mostMatches}) as found)`;
}

export type Hit = { kind: Kind; id: string; score: number };

/** Every word must occur; where nothing does, misspelt words may. */
export async function searchShop(
  db: Handle,
  query: string,
  kinds: readonly Kind[],
  most: number,
): Promise<Hit[]> {
  const wanted = sql`array[${sql.join(
    kinds.map((kind) => sql`${kind}`),
    sql`, `,
  )}]::text[]`;
  const exact = await db.execute<Hit>(
    sql`select kind, id, score from search_shop(${query}, ${wanted}, ${most})`,
  );
  if (exact.length > 0) return [...exact];
  return [
    ...(await db.execute<Hit>(
      sql`select kind, id, score from search_shop_nearly(${query}, ${wanted}, ${most})`,
    )),
  ];
}
