import "server-only";
import { withShop } from "@/db/client";
import { describeHits, searchShop } from "@/db/queries/search";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { SearchAnswer, SearchQuery } from "./schema";

/** Finds customers, sites and instruments of the shop by parts of any name, address or number. */
export async function search(actor: Actor, { q, most }: SearchQuery): Promise<SearchAnswer> {
  authorise(actor, "search.read");
  return withShop(actor, async (tx) => {
    const { hits, nearly } = await searchShop(tx, q, ["customer", "site", "instrument"], most);
    return { items: await describeHits(tx, actor.shopId, hits), next: null, nearly };
  });
}
