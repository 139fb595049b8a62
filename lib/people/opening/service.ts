import "server-only";
import { appDb, withShop } from "@/db/client";
import { membershipsOf } from "@/db/queries/memberships";
import { insertMember } from "@/db/queries/people";
import { insertShop } from "@/db/queries/shop";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { OpenShopInput } from "@/lib/people/schema";
import { currencyOf } from "@/lib/shop/places";

type Opener = { personId: string; name: string; email: string };

/**
 * Opens a shop with this person as its owner. The same id twice is one shop; an id that is somebody else's
 * shop opens nothing, or whoever knew the id would become its owner.
 */
export async function openShop(opener: Opener, input: OpenShopInput): Promise<{ shopId: string }> {
  const { shopId, shopName, country, timeZone, locale } = input;
  const opened = await withShop({ shopId }, async (tx) => {
    const made = await insertShop(tx, shopId, {
      name: shopName,
      country,
      timeZone,
      locale,
      currency: currencyOf(country),
    });
    if (!made) return false;
    await insertMember(tx, shopId, {
      id: newId(),
      personId: opener.personId,
      name: opener.name,
      email: opener.email,
      role: "owner",
      customerId: null,
      // A shop of one is the usual beginning, and its owner tunes.
      bookable: true,
    });
    return true;
  });
  if (!opened) {
    const memberships = await membershipsOf(appDb(), opener.personId);
    if (!memberships.some((membership) => membership.shopId === shopId && membership.role === "owner"))
      throw new AppError(
        "id-in-use",
        "This shop could not be opened. Load the page again and try once more.",
      );
  }
  return { shopId };
}
