import "server-only";
import { type Tx, withShop } from "@/db/client";
import { customerById } from "@/db/queries/customers";
import { insertHolding, openHoldingOf } from "@/db/queries/instrument-holdings";
import {
  insertInstrument,
  instrumentById,
  listInstruments,
  updateInstrument,
} from "@/db/queries/instruments";
import { technicianIsOn } from "@/db/queries/readings";
import { siteById } from "@/db/queries/sites";
import type { Permission } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { ArchiveQuery } from "@/lib/doors/params";
import { AppError, type FieldErrors, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import { written, writtenPage } from "@/lib/pages/record-dates";
import { clockWithin, type ShopClock } from "@/lib/shop-clock/service";
import { askAboutOpenVisits } from "@/lib/visits/open/service";
import { rangeFaults } from "./rules";
import type {
  InstrumentChange,
  InstrumentListQuery,
  InstrumentRecord,
  InstrumentRow,
  NewInstrument,
} from "./schema";

export async function findInstruments(
  actor: Actor,
  query: InstrumentListQuery,
): Promise<ListPage<InstrumentRow>> {
  const reach = authorise(actor, "instruments.read");
  return writtenPage(await withShop(actor, (tx) => listInstruments(tx, actor.shopId, query, reach)));
}

export async function getInstrument(actor: Actor, id: string): Promise<InstrumentRecord> {
  authorise(actor, "instruments.read");
  return withShop(actor, (tx) => readInstrument(tx, actor, id));
}

export async function createInstrument(actor: Actor, input: NewInstrument): Promise<InstrumentRecord> {
  authorise(actor, "instruments.create");
  const { id = newId(), siteId, ownerId, payerId, bookingContactId, since, ...fields } = input;
  return withShop(actor, async (tx) => {
    const clock = await clockWithin(tx, actor.shopId);
    const referenceHz = fields.referenceHz ?? clock.referenceHz;
    refuse(
      rangeFaults({
        firstMidi: fields.firstMidi ?? 21,
        lastMidi: fields.lastMidi ?? 108,
        breakMidi: fields.breakMidi ?? null,
      }),
    );
    const place = await checkPlace(tx, actor, { siteId, ownerId, payerId, bookingContactId, since }, clock);
    if (place.since > clock.today) throw invalid({ since: "This day has not come yet." });
    if (await insertInstrument(tx, actor.shopId, id, { ...fields, referenceHz })) {
      await insertHolding(tx, actor.shopId, id, newId(), place);
    }
    const record = await findRecord(tx, actor, id);
    if (!record) throw new AppError("id-in-use", "This id is taken. Send the record with another one.");
    return record;
  });
}

export async function changeInstrument(
  actor: Actor,
  id: string,
  change: InstrumentChange,
): Promise<InstrumentRecord> {
  authorise(actor, change.archived === undefined ? "instruments.change" : "instruments.place");
  return withShop(actor, async (tx) => {
    const before = await instrumentToChange(tx, actor, id, "instruments.change");
    refuse(
      rangeFaults({
        firstMidi: change.firstMidi ?? before.firstMidi,
        lastMidi: change.lastMidi ?? before.lastMidi,
        breakMidi: change.breakMidi === undefined ? before.breakMidi : change.breakMidi,
      }),
    );
    await writeVersion(tx, actor, id, change);
    if (change.archived && !change.confirm) await askAboutOpenVisits(tx, actor, "instrument", id);
    return readInstrument(tx, actor, id);
  });
}

export function archiveInstrument(actor: Actor, id: string, asked: ArchiveQuery): Promise<InstrumentRecord> {
  return changeInstrument(actor, id, { ...asked, archived: true });
}

/** Within a transaction that is already open: the record, or a 404. */
export async function readInstrument(tx: Tx, actor: Actor, id: string): Promise<InstrumentRecord> {
  const record = await findRecord(tx, actor, id);
  if (!record) throw notFound("instrument");
  return record;
}

/** The record, checked to be one that this actor may change. */
export async function instrumentToChange(
  tx: Tx,
  actor: Actor,
  id: string,
  permission: Permission,
): Promise<InstrumentRecord> {
  const scope = authorise(actor, permission);
  const record = await readInstrument(tx, actor, id);
  if (scope === "own" && !record.canChange) {
    throw new AppError(
      "forbidden",
      "You can change instruments of visits you are on. This one you can read.",
    );
  }
  return record;
}

/** Counts the version up with whatever changes; a stale one is answered with the newer record. */
export async function writeVersion(
  tx: Tx,
  actor: Actor,
  id: string,
  change: InstrumentChange,
): Promise<void> {
  if (!(await updateInstrument(tx, actor.shopId, id, change))) {
    throw stale("instrument", await readInstrument(tx, actor, id));
  }
}

export type PlaceInput = {
  siteId: string;
  ownerId?: string;
  payerId?: string | null;
  bookingContactId?: string | null;
  since?: string;
};

/** The parts of a place, each checked to be of this shop. The owner is the site's customer unless said. */
export async function checkPlace(tx: Tx, actor: Actor, place: PlaceInput, clock: ShopClock) {
  const faults: FieldErrors = {};
  const site = await siteById(tx, actor.shopId, place.siteId);
  if (!site) faults.siteId = "This site does not exist, or is not yours to see.";
  const parties = {
    ownerId: place.ownerId ?? site?.customerId,
    payerId: place.payerId,
    bookingContactId: place.bookingContactId,
  };
  for (const [path, customerId] of Object.entries(parties)) {
    if (customerId && !(await customerById(tx, actor.shopId, customerId))) {
      faults[path] = "This customer does not exist, or is not yours to see.";
    }
  }
  refuse(faults);
  return {
    siteId: place.siteId,
    ownerId: parties.ownerId ?? place.siteId,
    payerId: place.payerId ?? null,
    bookingContactId: place.bookingContactId ?? null,
    since: place.since ?? clock.today,
  };
}

export function refuse(faults: FieldErrors): void {
  if (Object.keys(faults).length > 0) throw invalid(faults);
}

async function findRecord(tx: Tx, actor: Actor, id: string): Promise<InstrumentRecord | null> {
  const row = await instrumentById(tx, actor.shopId, id);
  if (!row) return null;
  const open = await openHoldingOf(tx, actor.shopId, id);
  const canChange =
    actor.role === "owner" ||
    actor.role === "office" ||
    (actor.role === "technician" &&
      (await technicianIsOn(tx, actor.shopId, actor.memberId, { instrumentId: id, jobId: null })));
  const { siteTimeZone: _, ...place } = open ?? { siteTimeZone: null, id: "" };
  return {
    ...written(row),
    temperament: typeof row.temperament === "string" ? row.temperament : [...row.temperament],
    place: open && "siteId" in place ? place : null,
    canChange,
  };
}
