import { aliasedTable, and, eq, isNotNull, isNull, type SQL, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { customer, instrument, instrumentHolding, site } from "@/db/schema";
import type { InstrumentChange, InstrumentListQuery, NewInstrument } from "@/lib/instruments/schema";
import { isoInstant } from "./iso";
import { byName, type Order, orderBy, paged, pageStart } from "./keyset";
import { isOwn, matching, matchingOwn, type Reach } from "./search";
import { soundedPitch } from "./sounded-pitch";

const owner = aliasedTable(customer, "owner");

/** The open holding, with what of it the session may see: an owner need not see somebody else's hall. */
const openHolding = and(
  eq(instrumentHolding.shopId, instrument.shopId),
  eq(instrumentHolding.instrumentId, instrument.id),
  isNull(instrumentHolding.until),
);
const itsSite = and(eq(site.shopId, instrumentHolding.shopId), eq(site.id, instrumentHolding.siteId));
const itsOwner = and(eq(owner.shopId, instrumentHolding.shopId), eq(owner.id, instrumentHolding.ownerId));

const siteName = sql<string>`coalesce(${site.name}, '')`;
const ownerName = sql<string>`coalesce(${owner.name}, '')`;

type Sort = { by: SQL; type: "text" | "timestamptz"; joined?: boolean };

const sorts: Record<Reach, Record<InstrumentListQuery["sort"], Sort>> = {
  all: {
    name: { by: byName(instrument.name), type: "text" },
    place: { by: byName(site.name), type: "text", joined: true },
    owner: { by: byName(owner.name), type: "text", joined: true },
    updated: { by: sql`${instrument.updatedAt}`, type: "timestamptz" },
  },
  own: {
    name: { by: byName(instrument.name), type: "text" },
    place: { by: sql`${siteName} collate "und-x-icu"`, type: "text" },
    owner: { by: sql`${ownerName} collate "und-x-icu"`, type: "text" },
    updated: { by: sql`${instrument.updatedAt}`, type: "timestamptz" },
  },
};

/**
 * Every instrument stands somewhere and is somebody's, and staff see where and whose. Saying so makes inner
 * joins of the outer ones, which may then begin with the sites or the owners in their order.
 */
const placed = and(isNotNull(site.id), isNotNull(owner.id));

export async function listInstruments(db: Handle, shopId: string, query: InstrumentListQuery, reach: Reach) {
  const sort = sorts[reach][query.sort];
  const order: Order = { ...sort, direction: query.direction, id: sql`${instrument.id}` };
  const archived = query.archived === "only";
  const rows = await db
    .select({
      id: instrument.id,
      name: instrument.name,
      maker: instrument.maker,
      model: instrument.model,
      serial: instrument.serial,
      year: instrument.year,
      kind: instrument.kind,
      room: instrument.room,
      siteId: site.id,
      siteName,
      siteCity: sql<string>`coalesce(${site.city}, '')`,
      ownerId: owner.id,
      ownerName,
      lastSheetAt: sql<string | null>`(select ${isoInstant(sql`max(r.taken_at)`)} from reading_sheet r
        where r.shop_id = ${shopId} and r.instrument_id = instrument.id and r.archived_at is null)`,
      lastFoundCents: sql<number | null>`(select ${soundedPitch(shopId)} from reading_sheet r
        where r.shop_id = ${shopId} and r.instrument_id = instrument.id and r.archived_at is null
          and r.stage = 'as-found'
        order by r.taken_at desc limit 1)`,
      archivedAt: instrument.archivedAt,
      updatedAt: instrument.updatedAt,
      version: instrument.version,
      orderKey: sql<string>`(${sort.by})::text`,
    })
    .from(instrument)
    .leftJoin(instrumentHolding, openHolding)
    .leftJoin(site, itsSite)
    .leftJoin(owner, itsOwner)
    .where(
      and(
        eq(instrument.shopId, shopId),
        reach === "own" ? isOwn(instrumentHolding.ownerId) : placed,
        query.siteId ? eq(instrumentHolding.siteId, query.siteId) : undefined,
        query.ownerId ? eq(instrumentHolding.ownerId, query.ownerId) : undefined,
        query.kind ? eq(instrument.kind, query.kind) : undefined,
        archived ? isNotNull(instrument.archivedAt) : isNull(instrument.archivedAt),
        query.q ? searched(query.q, archived, reach) : undefined,
        pageStart(order, query, sort.type),
      ),
    )
    .orderBy(orderBy(order))
    .limit(query.most + 1);
  return paged(rows, query);
}

function searched(q: string, archived: boolean, reach: Reach): SQL {
  return reach === "all"
    ? matching("instrument", instrument.id, q, archived)
    : matchingOwn(sql`${instrument.searchText} || ' ' || coalesce(${site.searchText}, '')`, q);
}

export async function instrumentById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select({
      id: instrument.id,
      name: instrument.name,
      maker: instrument.maker,
      model: instrument.model,
      serial: instrument.serial,
      year: instrument.year,
      kind: instrument.kind,
      room: instrument.room,
      firstMidi: instrument.firstMidi,
      lastMidi: instrument.lastMidi,
      breakMidi: instrument.breakMidi,
      referenceHz: instrument.referenceHz,
      temperament: instrument.temperament,
      standingNote: instrument.standingNote,
      archivedAt: instrument.archivedAt,
      updatedAt: instrument.updatedAt,
      version: instrument.version,
    })
    .from(instrument)
    .where(and(eq(instrument.shopId, shopId), eq(instrument.id, id)));
  return row;
}

/** Creating twice with the same id is one record: the second time nothing is inserted. */
export async function insertInstrument(
  db: Handle,
  shopId: string,
  id: string,
  fields: Omit<NewInstrument, "id" | "siteId" | "ownerId" | "payerId" | "bookingContactId" | "since">,
): Promise<boolean> {
  const rows = await db
    .insert(instrument)
    .values({ ...fields, shopId, id })
    .onConflictDoNothing()
    .returning({ id: instrument.id });
  return rows.length === 1;
}

/** False when the version is stale or the record is not there. */
export async function updateInstrument(
  db: Handle,
  shopId: string,
  id: string,
  { version, archived, confirm: _, ...fields }: InstrumentChange,
): Promise<boolean> {
  const rows = await db
    .update(instrument)
    .set({
      ...fields,
      ...(archived === undefined ? {} : { archivedAt: archived ? sql`now()` : null }),
      version: version + 1,
      updatedAt: sql`now()`,
    })
    .where(and(eq(instrument.shopId, shopId), eq(instrument.id, id), eq(instrument.version, version)))
    .returning({ id: instrument.id });
  return rows.length === 1;
}
