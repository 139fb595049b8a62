import "server-only";
import { withShop } from "@/db/client";
import {
  closeHolding,
  correctHolding,
  holdingsOf,
  insertHolding,
  openHoldingOf,
} from "@/db/queries/instrument-holdings";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { clockWithin } from "@/lib/shop-clock/service";
import { moveFaults, sinceFaults } from "../rules";
import type { HoldingChange, HoldingRecord, InstrumentRecord, NewHolding } from "../schema";
import { checkPlace, instrumentToChange, readInstrument, refuse, writeVersion } from "../service";

/** Where the instrument stood and whose it was, newest first. */
export async function findHoldings(
  actor: Actor,
  instrumentId: string,
): Promise<{ items: HoldingRecord[]; next: null }> {
  authorise(actor, "instruments.read");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    const rows = await holdingsOf(tx, actor.shopId, instrumentId);
    return { items: rows.map(({ siteTimeZone: _, ...holding }) => holding), next: null };
  });
}

/** Moved or sold: the present place ends on that day and the new one begins. */
export async function moveInstrument(
  actor: Actor,
  instrumentId: string,
  { id = newId(), version, ...input }: NewHolding,
): Promise<InstrumentRecord> {
  authorise(actor, "instruments.place");
  return withShop(actor, async (tx) => {
    const before = await instrumentToChange(tx, actor, instrumentId, "instruments.place");
    // The same move sent twice is one move.
    if (before.place?.id === id) return before;
    const clock = await clockWithin(tx, actor.shopId);
    const place = await checkPlace(tx, actor, input, clock);
    refuse(
      moveFaults(place.since, {
        since: before.place?.since ?? null,
        today: clock.today,
        locale: clock.locale,
      }),
    );
    // The version's row lock keeps two moves of one instrument apart.
    await writeVersion(tx, actor, instrumentId, { version });
    if (before.place) await closeHolding(tx, actor.shopId, before.place.id, place.since);
    await insertHolding(tx, actor.shopId, instrumentId, id, place);
    return readInstrument(tx, actor, instrumentId);
  });
}

/** Puts a slip in the present place right. Places that have ended stay as they were. */
export async function correctPlace(
  actor: Actor,
  instrumentId: string,
  { version, ...input }: HoldingChange,
): Promise<InstrumentRecord> {
  authorise(actor, "instruments.place");
  return withShop(actor, async (tx) => {
    const before = await instrumentToChange(tx, actor, instrumentId, "instruments.place");
    const open = await openHoldingOf(tx, actor.shopId, instrumentId);
    if (!open) throw notFound("place");
    const clock = await clockWithin(tx, actor.shopId);
    const place = await checkPlace(
      tx,
      actor,
      {
        siteId: input.siteId ?? open.siteId,
        ownerId: input.ownerId ?? open.ownerId,
        payerId: input.payerId === undefined ? open.payerId : input.payerId,
        bookingContactId:
          input.bookingContactId === undefined ? open.bookingContactId : input.bookingContactId,
        since: input.since ?? open.since,
      },
      clock,
    );
    const earlier = await holdingsOf(tx, actor.shopId, instrumentId);
    const endOfBefore = earlier.find((holding) => holding.id !== open.id)?.until ?? null;
    if (input.since) {
      refuse(sinceFaults(place.since, { endOfBefore, today: clock.today, locale: clock.locale }));
    }
    await writeVersion(tx, actor, before.id, { version });
    await correctHolding(tx, actor.shopId, open.id, place);
    return readInstrument(tx, actor, instrumentId);
  }).catch((error: unknown) => {
    throw isOverlap(error)
      ? new AppError("conflict", "At that time the instrument stood somewhere else.", {
          fields: { since: "At that time it stood somewhere else." },
        })
      : error;
  });
}

function isOverlap(error: unknown): boolean {
  const cause = error instanceof Error ? error.cause : undefined;
  return typeof cause === "object" && cause !== null && "code" in cause && cause.code === "23P01";
}
