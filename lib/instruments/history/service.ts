import "server-only";
import { type Tx, withShop } from "@/db/client";
import {
  historySheets,
  type InstrumentVisit,
  ownHistorySheets,
  visitsOfInstrument,
} from "@/db/queries/instrument-history";
import { openHoldingOf } from "@/db/queries/instrument-holdings";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { clockWithin } from "@/lib/shop-clock/service";
import { readInstrument } from "../service";
import { type HistoryEntry, historyOf } from "./rules";

export async function getHistory(actor: Actor, instrumentId: string): Promise<HistoryEntry[]> {
  authorise(actor, "instruments.read");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    return historyWithin(tx, actor, instrumentId);
  });
}

/** Within a transaction that is already open, of an instrument that this actor has been shown. */
export async function historyWithin(tx: Tx, actor: Actor, instrumentId: string): Promise<HistoryEntry[]> {
  const open = await openHoldingOf(tx, actor.shopId, instrumentId);
  const timeZone = open?.siteTimeZone ?? (await clockWithin(tx, actor.shopId)).timeZone;
  return historyOf(
    actor.role === "customer"
      ? await ownHistorySheets(tx, instrumentId)
      : await historySheets(tx, actor.shopId, instrumentId),
    await visitsOfInstrument(tx, actor.shopId, instrumentId),
    timeZone,
  );
}

export async function findVisitsOf(actor: Actor, instrumentId: string): Promise<InstrumentVisit[]> {
  authorise(actor, "visits.read");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    return visitsOfInstrument(tx, actor.shopId, instrumentId);
  });
}
