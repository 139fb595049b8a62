import "server-only";
import { type Tx, withShop } from "@/db/client";
import { houseStyleNames, shopById, updateShop } from "@/db/queries/shop";
import { isBuiltInStyle } from "@/lib/acoustics/styles";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { invalid, notFound, stale } from "@/lib/errors";
import type { ShopChange, ShopRecord } from "./schema";

type Row = NonNullable<Awaited<ReturnType<typeof shopById>>>;

function record(row: Row): ShopRecord {
  return { ...row, updatedAt: row.updatedAt.toISOString() };
}

export async function getShop(actor: Actor): Promise<ShopRecord> {
  authorise(actor, "shop.read");
  const row = await withShop(actor, (tx) => shopById(tx, actor.shopId));
  if (!row) throw notFound("shop");
  return record(row);
}

/** The shop with what its settings page offers to choose from. */
export async function getShopSettings(actor: Actor) {
  authorise(actor, "styles.read");
  return withShop(actor, async (tx) => {
    const row = await shopById(tx, actor.shopId);
    if (!row) throw notFound("shop");
    return { shop: record(row), houseStyles: await houseStyleNames(tx, actor.shopId) };
  });
}

export async function changeShop(actor: Actor, { version, ...fields }: ShopChange): Promise<ShopRecord> {
  authorise(actor, "shop.change");
  return withShop(actor, async (tx) => {
    if (fields.defaultStyle !== undefined) await requireStyle(tx, actor.shopId, fields.defaultStyle);
    const row = await updateShop(tx, actor.shopId, version, fields);
    if (row) return record(row);
    const current = await shopById(tx, actor.shopId);
    throw current ? stale("shop", record(current)) : notFound("shop");
  });
}

async function requireStyle(tx: Tx, shopId: string, style: string): Promise<void> {
  if (isBuiltInStyle(style)) return;
  const houseStyles = await houseStyleNames(tx, shopId);
  if (!houseStyles.some(({ id }) => id === style))
    throw invalid({ defaultStyle: "This style is no longer there. Choose another." });
}
