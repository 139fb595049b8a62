import { and, eq, isNotNull, isNull, type SQL, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { customer, site } from "@/db/schema";
import type { NewSite, SiteChange, SiteListQuery } from "@/lib/sites/schema";
import { byName, type Order, orderBy, paged, pageStart } from "./keyset";
import { isOwn, matching, matchingOwn, type Reach } from "./search";

const columns = {
  id: site.id,
  customerId: site.customerId,
  customerName: sql<string>`coalesce(${customer.name}, '')`,
  name: site.name,
  street: site.street,
  postalCode: site.postalCode,
  city: site.city,
  country: site.country,
  timeZone: site.timeZone,
  latitude: site.latitude,
  longitude: site.longitude,
  accessNotes: site.accessNotes,
  archivedAt: site.archivedAt,
  updatedAt: site.updatedAt,
  version: site.version,
};

const sorts: Record<SiteListQuery["sort"], { by: SQL; type: "text" | "timestamptz" }> = {
  name: { by: byName(site.name), type: "text" },
  city: { by: byName(site.city), type: "text" },
  customer: { by: byName(customer.name), type: "text" },
  updated: { by: sql`${site.updatedAt}`, type: "timestamptz" },
};

const itsCustomer = and(eq(customer.shopId, site.shopId), eq(customer.id, site.customerId));

export async function listSites(db: Handle, shopId: string, query: SiteListQuery, reach: Reach) {
  const sort = sorts[query.sort];
  const order: Order = {
    by: sort.by,
    direction: query.direction,
    id: sql`${site.id}`,
    joined: query.sort === "customer",
  };
  const { accessNotes: _, ...listed } = columns;
  const rows = await db
    .select({
      ...listed,
      instruments: sql<number>`(select count(*)::int from instrument_holding h
        join instrument i on i.shop_id = ${shopId} and i.id = h.instrument_id and i.archived_at is null
        where h.shop_id = ${shopId} and h.site_id = site.id and h.until is null)`,
      orderKey: sql<string>`(${sort.by})::text`,
    })
    .from(site)
    .innerJoin(customer, itsCustomer)
    .where(
      and(
        eq(site.shopId, shopId),
        reach === "own" ? isOwn(site.customerId) : undefined,
        query.customerId ? eq(site.customerId, query.customerId) : undefined,
        query.archived === "only" ? isNotNull(site.archivedAt) : isNull(site.archivedAt),
        query.q ? searched(query.q, query.archived === "only", reach) : undefined,
        pageStart(order, query, sort.type),
      ),
    )
    .orderBy(orderBy(order))
    .limit(query.most + 1);
  return paged(rows, query);
}

function searched(q: string, archived: boolean, reach: Reach): SQL {
  return reach === "all" ? matching("site", site.id, q, archived) : matchingOwn(sql`${site.searchText}`, q);
}

export async function siteById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select(columns)
    .from(site)
    .innerJoin(customer, itsCustomer)
    .where(and(eq(site.shopId, shopId), eq(site.id, id)));
  return row;
}

/** Creating twice with the same id is one record: the second time nothing is inserted. */
export async function insertSite(
  db: Handle,
  shopId: string,
  id: string,
  fields: NewSite & { country: string; timeZone: string },
): Promise<void> {
  await db
    .insert(site)
    .values({ ...fields, shopId, id })
    .onConflictDoNothing();
}

/** False when the version is stale or the record is not there. */
export async function updateSite(
  db: Handle,
  shopId: string,
  id: string,
  { version, archived, confirm: _, ...fields }: SiteChange,
): Promise<boolean> {
  const rows = await db
    .update(site)
    .set({
      ...fields,
      ...(archived === undefined ? {} : { archivedAt: archived ? sql`now()` : null }),
      version: version + 1,
      updatedAt: sql`now()`,
    })
    .where(and(eq(site.shopId, shopId), eq(site.id, id), eq(site.version, version)))
    .returning({ id: site.id });
  return rows.length === 1;
}
