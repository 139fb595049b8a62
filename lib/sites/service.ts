import "server-only";
import { type Tx, withShop } from "@/db/client";
import { customerById } from "@/db/queries/customers";
import { insertSite, listSites, siteById, updateSite } from "@/db/queries/sites";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { ArchiveQuery } from "@/lib/doors/params";
import { AppError, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import { written, writtenPage } from "@/lib/pages/record-dates";
import { clockWithin } from "@/lib/shop-clock/service";
import { askAboutOpenVisits } from "@/lib/visits/open/service";
import { positionFaults } from "./rules";
import type { NewSite, SiteChange, SiteListQuery, SiteRecord, SiteRow } from "./schema";

type Row = NonNullable<Awaited<ReturnType<typeof siteById>>>;

/** A customer's own sign-in sees the address, but not what the shop notes about getting in. */
function record(actor: Actor, row: Row): SiteRecord {
  return { ...written(row), accessNotes: actor.role === "customer" ? null : row.accessNotes };
}

export async function findSites(actor: Actor, query: SiteListQuery): Promise<ListPage<SiteRow>> {
  const reach = authorise(actor, "sites.read");
  return writtenPage(await withShop(actor, (tx) => listSites(tx, actor.shopId, query, reach)));
}

export async function getSite(actor: Actor, id: string): Promise<SiteRecord> {
  authorise(actor, "sites.read");
  return withShop(actor, (tx) => read(tx, actor, id));
}

export async function createSite(actor: Actor, input: NewSite): Promise<SiteRecord> {
  authorise(actor, "sites.change");
  refuse(positionFaults(input));
  const id = input.id ?? newId();
  return withShop(actor, async (tx) => {
    await checkCustomer(tx, actor, input.customerId);
    const habits = await clockWithin(tx, actor.shopId);
    await insertSite(tx, actor.shopId, id, {
      ...input,
      country: input.country ?? habits.country,
      timeZone: input.timeZone ?? habits.timeZone,
    });
    const row = await siteById(tx, actor.shopId, id);
    if (!row) throw new AppError("id-in-use", "This id is taken. Send the record with another one.");
    return record(actor, row);
  });
}

export async function changeSite(actor: Actor, id: string, change: SiteChange): Promise<SiteRecord> {
  authorise(actor, "sites.change");
  return withShop(actor, async (tx) => {
    const before = await read(tx, actor, id);
    refuse(
      positionFaults({
        latitude: change.latitude === undefined ? before.latitude : change.latitude,
        longitude: change.longitude === undefined ? before.longitude : change.longitude,
      }),
    );
    if (change.customerId && change.customerId !== before.customerId) {
      await checkCustomer(tx, actor, change.customerId);
    }
    const done = await updateSite(tx, actor.shopId, id, change);
    const now = await read(tx, actor, id);
    if (!done) throw stale("site", now);
    if (change.archived && !change.confirm) await askAboutOpenVisits(tx, actor, "site", id);
    return now;
  });
}

export function archiveSite(actor: Actor, id: string, asked: ArchiveQuery): Promise<SiteRecord> {
  return changeSite(actor, id, { ...asked, archived: true });
}

async function read(tx: Tx, actor: Actor, id: string): Promise<SiteRecord> {
  const row = await siteById(tx, actor.shopId, id);
  if (!row) throw notFound("site");
  return record(actor, row);
}

async function checkCustomer(tx: Tx, actor: Actor, customerId: string): Promise<void> {
  if (!(await customerById(tx, actor.shopId, customerId))) {
    throw invalid({ customerId: "This customer does not exist, or is not yours to see." });
  }
}

function refuse(faults: Record<string, string>): void {
  if (Object.keys(faults).length > 0) throw invalid(faults);
}
