import "server-only";
import { type Tx, withShop } from "@/db/client";
import { deleteSiteEvent, eventsOfSite, insertSiteEvent, siteEventById } from "@/db/queries/site-events";
import { siteById } from "@/db/queries/sites";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, invalid, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { clockWithin } from "@/lib/shop-clock/service";
import type { NewSiteEvent, SiteEventRecord } from "./schema";

/** The events of a site from today on: past ones make nothing due. */
export async function findSiteEvents(
  actor: Actor,
  siteId: string,
): Promise<{ items: SiteEventRecord[]; next: null }> {
  authorise(actor, "service-plans.read");
  return withShop(actor, async (tx) => {
    await requireSite(tx, actor, siteId);
    const { today } = await clockWithin(tx, actor.shopId);
    return { items: await eventsOfSite(tx, actor.shopId, siteId, today), next: null };
  });
}

export async function addSiteEvent(
  actor: Actor,
  siteId: string,
  { id = newId(), day, name }: NewSiteEvent,
): Promise<SiteEventRecord> {
  authorise(actor, "service-plans.change");
  return withShop(actor, async (tx) => {
    await requireSite(tx, actor, siteId);
    const { today } = await clockWithin(tx, actor.shopId);
    if (day < today) throw invalid({ day: "This day is over." });
    await insertSiteEvent(tx, actor.shopId, { id, siteId, day, name });
    const record = await siteEventById(tx, actor.shopId, id);
    if (record?.siteId !== siteId) {
      throw new AppError("id-in-use", "This id is taken. Send the event with another one.");
    }
    return record;
  });
}

export async function removeSiteEvent(actor: Actor, siteId: string, id: string): Promise<void> {
  authorise(actor, "service-plans.change");
  await withShop(actor, async (tx) => {
    await requireSite(tx, actor, siteId);
    if (!(await deleteSiteEvent(tx, actor.shopId, siteId, id))) throw notFound("event");
  });
}

async function requireSite(tx: Tx, actor: Actor, siteId: string): Promise<void> {
  if (!(await siteById(tx, actor.shopId, siteId))) throw notFound("site");
}
