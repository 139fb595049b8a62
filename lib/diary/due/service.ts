import "server-only";
import { type Tx, withShop } from "@/db/client";
import { type DueFactsRow, dueFacts, dueNames } from "@/db/queries/due";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { Day } from "@/lib/dates";
import { clockWithin } from "@/lib/shop-clock/service";
import { rhythmOf } from "../service-plans/rhythm-columns";
import {
  asksForNames,
  byCode,
  byDue,
  byNames,
  countsOf,
  type DueFact,
  isAskedFor,
  isNamed,
  pageOf,
} from "./list";
import { dueState, dueWindow } from "./rules";
import type { DueItem, DueList, DueQuery } from "./schema";

/** How long before its window an instrument is shown as due: time enough to offer, to answer and to move. */
const LEAD_DAYS = 28;

export async function findDue(actor: Actor, query: DueQuery): Promise<DueList> {
  authorise(actor, "service-plans.read");
  return withShop(actor, async (tx) => {
    const clock = await clockWithin(tx, actor.shopId);
    const facts = (await dueFacts(tx, actor.shopId, clock)).map((row) => factOf(row, clock.today));
    const asked = facts.filter((fact) => isAskedFor(fact, query));
    const counts = countsOf(facts);
    if (asksForNames(query)) {
      const named = (await withNames(tx, actor, asked)).filter((item) => isNamed(item, query));
      const { compare } = new Intl.Collator(clock.locale, { sensitivity: "base", numeric: true });
      return { ...pageOf(named, byNames[query.sort], query, compare), counts };
    }
    const page = pageOf(asked, byDue, query, byCode);
    return { items: await withNames(tx, actor, page.items), next: page.next, counts };
  });
}

/** In the order of the facts. An instrument that stands nowhere has no names and is left out. */
async function withNames(tx: Tx, actor: Actor, facts: readonly DueFact[]): Promise<DueItem[]> {
  const rows = await dueNames(
    tx,
    actor.shopId,
    facts.map(({ instrumentId }) => instrumentId),
  );
  const names = new Map(rows.map((row) => [row.instrumentId, row]));
  return facts.flatMap((fact) => {
    const row = names.get(fact.instrumentId);
    return row ? [{ ...fact, ...row }] : [];
  });
}

function factOf(row: DueFactsRow, today: Day): DueFact {
  const { lastServed, startsOn, bookedOn, declinedOn } = row;
  const window = dueWindow(rhythmOf(row), { lastServed, startsOn, events: row.events ?? [] }, today);
  const resting = row.rests && (row.restsUntil === null || row.restsUntil > today);
  return {
    instrumentId: row.instrumentId,
    kind: row.kind,
    window,
    state: dueState({ window, resting, bookedOn, declinedOn, leadDays: LEAD_DAYS }, today),
    lastServed,
    bookedOn,
    bookedVisitId: row.bookedVisitId,
    technicianId: row.technicianId,
    workMinutes: row.workMinutes,
  };
}
