import { and, asc, eq, isNull, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { houseStyle, shop } from "@/db/schema";
import type { ShopFields } from "@/lib/shop/schema";

const columns = {
  id: shop.id,
  name: shop.name,
  timeZone: shop.timeZone,
  country: shop.country,
  currency: shop.currency,
  locale: shop.locale,
  referenceHz: shop.referenceHz,
  defaultStyle: shop.defaultStyle,
  demo: shop.demo,
  updatedAt: shop.updatedAt,
  version: shop.version,
};

export async function shopById(db: Handle, shopId: string) {
  const [row] = await db.select(columns).from(shop).where(eq(shop.id, shopId));
  return row;
}

/** False when a shop of this id exists already, whoever's it is. */
export async function insertShop(
  db: Handle,
  shopId: string,
  fields: Pick<ShopFields, "name" | "timeZone" | "country" | "currency" | "locale">,
): Promise<boolean> {
  const rows = await db
    .insert(shop)
    .values({ ...fields, id: shopId })
    .onConflictDoNothing()
    .returning({ id: shop.id });
  return rows.length > 0;
}

/** Nothing comes back when the version is stale. */
export async function updateShop(db: Handle, shopId: string, version: number, fields: Partial<ShopFields>) {
  const [row] = await db
    .update(shop)
    .set({ ...fields, version: version + 1, updatedAt: sql`now()` })
    .where(and(eq(shop.id, shopId), eq(shop.version, version)))
    .returning(columns);
  return row;
}

export async function houseStyleNames(db: Handle, shopId: string) {
  return db
    .select({ id: houseStyle.id, name: houseStyle.name })
    .from(houseStyle)
    .where(and(eq(houseStyle.shopId, shopId), isNull(houseStyle.archivedAt)))
    .orderBy(asc(sql`lower(${houseStyle.name})`));
}
