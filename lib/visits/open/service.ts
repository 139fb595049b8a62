import "server-only";
import type { Tx } from "@/db/client";
import { countVisits, visitsBetween } from "@/db/queries/visits";
import type { Actor } from "@/lib/auth/actor";
import { needsConfirming } from "@/lib/errors";
import type { VisitState } from "../rules";
import { rowsOf } from "../service";
import type { OpenVisits } from "./schema";

const notOver: readonly VisitState[] = ["offered", "confirmed", "on-the-way", "in-progress"];
const named = 5;

/** Asks once before a record is archived whose visits are not over yet. They stand, whatever is answered. */
export async function askAboutOpenVisits(
  tx: Tx,
  actor: Actor,
  what: "customer" | "site" | "instrument",
  id: string,
): Promise<void> {
  const filter = { states: notOver, [`${what}Id`]: id };
  const count = await countVisits(tx, actor.shopId, filter);
  if (count === 0) return;
  const rows = await rowsOf(tx, actor, await visitsBetween(tx, actor.shopId, { ...filter, most: named }));
  const visits = rows.map(({ id, start, end, state, siteName }) => ({ id, start, end, state, siteName }));
  throw needsConfirming(
    count === 1
      ? `A visit of this ${what} is not over yet. It stands when the ${what} is archived.`
      : `${count} visits of this ${what} are not over yet. They stand when the ${what} is archived.`,
    { current: { count, visits } satisfies OpenVisits },
  );
}
