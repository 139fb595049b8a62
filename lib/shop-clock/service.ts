import "server-only";
import { type Handle, withShop } from "@/db/client";
import { shopHabits } from "@/db/queries/shop-clock";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { type Day, dayOf } from "@/lib/dates";
import { notFound } from "@/lib/errors";

export type ShopClock = {
  locale: string;
  timeZone: string;
  country: string;
  referenceHz: number;
  demo: boolean;
  /** The calendar day it is at the shop. */
  today: Day;
};

export async function shopClock(actor: Actor): Promise<ShopClock> {
  authorise(actor, "shop.read");
  return withShop(actor, (tx) => clockWithin(tx, actor.shopId));
}

/** The same inside a transaction that is already open. */
export async function clockWithin(tx: Handle, shopId: string): Promise<ShopClock> {
  const habits = await shopHabits(tx, shopId);
  if (!habits) throw notFound("shop");
  return { ...habits, today: dayOf(new Date(), habits.timeZone) };
}
