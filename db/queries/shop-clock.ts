import { eq } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { shop } from "@/db/schema";

/** How a shop writes and counts: what every page needs to show a day or offer a default. */
export async function shopHabits(db: Handle, shopId: string) {
  const [row] = await db
    .select({
      locale: shop.locale,
      timeZone: shop.timeZone,
      country: shop.country,
      referenceHz: shop.referenceHz,
      demo: shop.demo,
    })
    .from(shop)
    .where(eq(shop.id, shopId));
  return row;
}
