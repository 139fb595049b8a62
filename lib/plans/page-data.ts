import "server-only";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import type { SheetRow } from "@/lib/readings/schema";
import { findSheets, getSheet } from "@/lib/readings/service";
import { sheetNames } from "@/lib/readings/stage-words";
import { shopClock } from "@/lib/shop-clock/service";

/** What the pages about one instrument's sheets share: the sheets to choose from and the one in hand. */
export async function sheetInHand(actor: Actor, instrumentId: string, wanted: string | undefined) {
  const clock = await shopClock(actor);
  const { items } = await findSheets(actor, instrumentId, { most: 100, archived: "hide" });
  const read = items.filter((sheet) => sheet.notesRead > 0);
  const chosen = items.find((sheet) => sheet.id === wanted) ?? fullest(read) ?? items[0] ?? null;
  const name = sheetNames(items, clock.locale, clock.timeZone);
  const canRead =
    chosen !== null && may(actor.role, "sheets.change") && (await getSheet(actor, chosen.id)).canChange;
  return {
    clock,
    chosen,
    read,
    name,
    canRead,
    options: items.map((sheet) => ({ id: sheet.id, label: name(sheet) })),
  };
}

const fortnight = 14 * 86_400_000;

/** The sheet that says most among the newest: three notes read as left do not replace sixteen read as found. */
function fullest(read: readonly SheetRow[]): SheetRow | undefined {
  const newest = read[0];
  if (!newest) return undefined;
  const since = Date.parse(newest.takenAt) - fortnight;
  return read
    .filter((sheet) => Date.parse(sheet.takenAt) >= since)
    .reduce((best, sheet) => (sheet.notesRead > best.notesRead ? sheet : best), newest);
}
