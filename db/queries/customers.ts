import { and, eq, isNotNull, isNull, type SQL, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { customer } from "@/db/schema";
import type { CustomerChange, CustomerListQuery, NewCustomer } from "@/lib/customers/schema";
import { byName, type Order, orderBy, paged, pageStart } from "./keyset";
import { isOwn, matching, matchingOwn, type Reach } from "./search";

const columns = {
  id: customer.id,
  kind: customer.kind,
  name: customer.name,
  contactName: customer.contactName,
  email: customer.email,
  phone: customer.phone,
  notes: customer.notes,
  archivedAt: customer.archivedAt,
  updatedAt: customer.updatedAt,
  version: customer.version,
};

const sorts: Record<CustomerListQuery["sort"], { by: SQL; type: "text" | "timestamptz" }> = {
  name: { by: byName(customer.name), type: "text" },
  updated: { by: sql`${customer.updatedAt}`, type: "timestamptz" },
};

export async function listCustomers(db: Handle, shopId: string, query: CustomerListQuery, reach: Reach) {
  const sort = sorts[query.sort];
  const order: Order = { by: sort.by, direction: query.direction, id: sql`${customer.id}` };
  const { notes: _, ...listed } = columns;
  const rows = await db
    .select({
      ...listed,
      sites: sql<number>`(select count(*)::int from site s where s.shop_id = ${shopId}
        and s.customer_id = customer.id and s.archived_at is null)`,
      instruments: sql<number>`(select count(*)::int from instrument_holding h
        join instrument i on i.shop_id = ${shopId} and i.id = h.instrument_id and i.archived_at is null
        where h.shop_id = ${shopId} and h.owner_id = customer.id and h.until is null)`,
      orderKey: sql<string>`(${sort.by})::text`,
    })
    .from(customer)
    .where(
      and(
        eq(customer.shopId, shopId),
        reach === "own" ? isOwn(customer.id) : undefined,
        query.archived === "only" ? isNotNull(customer.archivedAt) : isNull(customer.archivedAt),
        query.q ? searched(query.q, query.archived === "only", reach) : undefined,
        pageStart(order, query, sort.type),
      ),
    )
    .orderBy(orderBy(order))
    .limit(query.most + 1);
  return paged(rows, query);
}

function searched(q: string, archived: boolean, reach: Reach): SQL {
  return reach === "all"
    ? matching("customer", customer.id, q, archived)
    : matchingOwn(sql`${customer.searchText}`, q);
}

export async function customerById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select(columns)
    .from(customer)
    .where(and(eq(customer.shopId, shopId), eq(customer.id, id)));
  return row;
}

/** Creating twice with the same id is one record: the second time nothing is inserted. */
export async function insertCustomer(db: Handle, shopId: string, id: string, fields: NewCustomer) {
  const [row] = await db
    .insert(customer)
    .values({ ...fields, shopId, id })
    .onConflictDoNothing()
    .returning(columns);
  return row;
}

/** Nothing comes back when the version is stale or the record is not there. */
export async function updateCustomer(
  db: Handle,
  shopId: string,
  id: string,
  { version, archived, confirm: _, ...fields }: CustomerChange,
) {
  const [row] = await db
    .update(customer)
    .set({
      ...fields,
      ...(archived === undefined ? {} : { archivedAt: archived ? sql`now()` : null }),
      version: version + 1,
      updatedAt: sql`now()`,
    })
    .where(and(eq(customer.shopId, shopId), eq(customer.id, id), eq(customer.version, version)))
    .returning(columns);
  return row;
}
