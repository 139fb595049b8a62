import { aliasedTable, and, desc, eq, isNull, sql } from "drizzle-orm";
import type { PgColumn } from "drizzle-orm/pg-core";
import type { Handle } from "@/db/client";
import { customer, instrumentHolding, site } from "@/db/schema";

const owner = aliasedTable(customer, "owner");
const payer = aliasedTable(customer, "payer");
const contact = aliasedTable(customer, "contact");

const columns = {
  id: instrumentHolding.id,
  siteId: instrumentHolding.siteId,
  siteName: sql<string>`coalesce(${site.name}, '')`,
  siteCity: sql<string>`coalesce(${site.city}, '')`,
  siteTimeZone: site.timeZone,
  ownerId: instrumentHolding.ownerId,
  ownerName: sql<string>`coalesce(${owner.name}, '')`,
  payerId: instrumentHolding.payerId,
  payerName: payer.name,
  bookingContactId: instrumentHolding.bookingContactId,
  bookingContactName: contact.name,
  since: instrumentHolding.since,
  until: instrumentHolding.until,
};

function select(db: Handle) {
  const party = (table: typeof owner, id: PgColumn) =>
    and(eq(table.shopId, instrumentHolding.shopId), eq(table.id, id));
  return db
    .select(columns)
    .from(instrumentHolding)
    .leftJoin(site, and(eq(site.shopId, instrumentHolding.shopId), eq(site.id, instrumentHolding.siteId)))
    .leftJoin(owner, party(owner, instrumentHolding.ownerId))
    .leftJoin(payer, party(payer, instrumentHolding.payerId))
    .leftJoin(contact, party(contact, instrumentHolding.bookingContactId));
}

export async function openHoldingOf(db: Handle, shopId: string, instrumentId: string) {
  const [row] = await select(db).where(
    and(
      eq(instrumentHolding.shopId, shopId),
      eq(instrumentHolding.instrumentId, instrumentId),
      isNull(instrumentHolding.until),
    ),
  );
  return row;
}

/** Newest first. */
export async function holdingsOf(db: Handle, shopId: string, instrumentId: string) {
  return select(db)
    .where(and(eq(instrumentHolding.shopId, shopId), eq(instrumentHolding.instrumentId, instrumentId)))
    .orderBy(desc(instrumentHolding.since), desc(instrumentHolding.id));
}

export type HoldingValues = {
  siteId: string;
  ownerId: string;
  payerId: string | null;
  bookingContactId: string | null;
  since: string;
};

export async function insertHolding(
  db: Handle,
  shopId: string,
  instrumentId: string,
  id: string,
  values: HoldingValues,
): Promise<void> {
  await db.insert(instrumentHolding).values({ ...values, shopId, instrumentId, id });
}

export async function closeHolding(db: Handle, shopId: string, id: string, until: string): Promise<void> {
  await db
    .update(instrumentHolding)
    .set({ until, updatedAt: sql`now()` })
    .where(and(eq(instrumentHolding.shopId, shopId), eq(instrumentHolding.id, id)));
}

export async function correctHolding(
  db: Handle,
  shopId: string,
  id: string,
  values: HoldingValues,
): Promise<void> {
  await db
    .update(instrumentHolding)
    .set({ ...values, updatedAt: sql`now()` })
    .where(and(eq(instrumentHolding.shopId, shopId), eq(instrumentHolding.id, id)));
}
