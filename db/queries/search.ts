import { type SQL, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";
import type { Handle } from "@/db/client";
import { currentCustomer } from "@/db/schema/walls";

export type Kind = "customer" | "site" | "instrument";

/** "own" is a customer's session. */
export type Reach = "all" | "own";

/**
 * Said in a list of a customer's session beside the wall that says it anyway: the wall is an "or" for staff, which
 * no index answers, and without this every record of the shop would be looked at.
 */
export function isOwn(customerId: PgColumn): SQL {
  return sql`${customerId} = ${currentCustomer}`;
}

/**
 * A list's search condition. Staff go through search_matches, which may use the trigram index under the walls;
 * it answers no customer's session, which searches the few rows it may see by the search text itself.
 */
export function matching(kind: Kind, id: PgColumn, query: string, archived: boolean): SQL {
  return sql`${id} in (select found.id from search_matches(${query}, array[${kind}]::text[], ${archived}) as found)`;
}

export function matchingOwn(words: SQL, query: string): SQL {
  return sql`(select matches_all(${words}, p.typed, p.plain) from search_patterns(${query}) p where p.typed is not null)`;
}

export type Hit = { kind: Kind; id: string; score: number };

/** Every word must occur; where nothing does, misspelt words may. */
export async function searchShop(
  db: Handle,
  query: string,
  kinds: readonly Kind[],
  most: number,
): Promise<{ hits: Hit[]; nearly: boolean }> {
  const wanted = sql`array[${sql.join(
    kinds.map((kind) => sql`${kind}`),
    sql`, `,
  )}]::text[]`;
  const exact = await db.execute<Hit>(
    sql`select kind, id, score from search_shop(${query}, ${wanted}, ${most})`,
  );
  if (exact.length > 0) return { hits: [...exact], nearly: false };
  const near = await db.execute<Hit>(
    sql`select kind, id, score from search_shop_nearly(${query}, ${wanted}, ${most})`,
  );
  return { hits: [...near], nearly: near.length > 0 };
}

export type FoundRecord = { kind: Kind; id: string; title: string; subtitle: string };

/** What is shown of each hit. Read under the walls, so a hit that may not be seen is not. */
export async function describeHits(db: Handle, shopId: string, hits: readonly Hit[]): Promise<FoundRecord[]> {
  const ids = (kind: Kind) =>
    sql`${`{${hits.flatMap((hit) => (hit.kind === kind ? [hit.id] : [])).join(",")}}`}::uuid[]`;
  const rows = await db.execute<FoundRecord>(sql`
    select 'customer' as kind, c.id, c.name as title,
           concat_ws(', ', nullif(c.contact_name, ''), c.phone, c.email) as subtitle
      from customer c where c.shop_id = ${shopId} and c.id = any(${ids("customer")})
    union all
    select 'site', s.id, s.name, concat_ws(', ', nullif(s.street, ''),
           nullif(btrim(s.postal_code || ' ' || s.city), ''), c.name)
      from site s left join customer c on c.shop_id = ${shopId} and c.id = s.customer_id
     where s.shop_id = ${shopId} and s.id = any(${ids("site")})
    union all
    select 'instrument', i.id, i.name, concat_ws(', ', case when i.serial <> '' then 'no. ' || i.serial end,
           nullif(i.room, ''), s.name, nullif(s.city, ''), c.name)
      from instrument i
      left join instrument_holding h on h.shop_id = ${shopId} and h.instrument_id = i.id and h.until is null
      left join site s on s.shop_id = ${shopId} and s.id = h.site_id
      left join customer c on c.shop_id = ${shopId} and c.id = h.owner_id
     where i.shop_id = ${shopId} and i.id = any(${ids("instrument")})`);
  const byId = new Map(rows.map((row) => [row.id, row]));
  return hits.flatMap((hit) => byId.get(hit.id) ?? []);
}
