import { and, asc, eq, gte } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { siteEvent } from "@/db/schema";

const columns = { id: siteEvent.id, siteId: siteEvent.siteId, day: siteEvent.day, name: siteEvent.name };

export async function eventsOfSite(db: Handle, shopId: string, siteId: string, from: string) {
  return db
    .select(columns)
    .from(siteEvent)
    .where(and(eq(siteEvent.shopId, shopId), eq(siteEvent.siteId, siteId), gte(siteEvent.day, from)))
    .orderBy(asc(siteEvent.day), asc(siteEvent.id));
}

export async function siteEventById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select(columns)
    .from(siteEvent)
    .where(and(eq(siteEvent.shopId, shopId), eq(siteEvent.id, id)));
  return row;
}

/** Creating twice with the same id is one record: the second time nothing is inserted. */
export async function insertSiteEvent(
  db: Handle,
  shopId: string,
  fields: { id: string; siteId: string; day: string; name: string },
): Promise<void> {
  await db
    .insert(siteEvent)
    .values({ ...fields, shopId })
    .onConflictDoNothing();
}

export async function deleteSiteEvent(
  db: Handle,
  shopId: string,
  siteId: string,
  id: string,
): Promise<boolean> {
  const rows = await db
    .delete(siteEvent)
    .where(and(eq(siteEvent.shopId, shopId), eq(siteEvent.siteId, siteId), eq(siteEvent.id, id)))
    .returning({ id: siteEvent.id });
  return rows.length === 1;
}
