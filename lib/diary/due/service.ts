import "server-only";
import { withShop } from "@/db/client";
import { type DueRow, dueRows } from "@/db/queries/due";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { Day } from "@/lib/dates";
import { clockWithin } from "@/lib/shop-clock/service";
import { rhythmOf } from "../service-plans/rhythm-columns";
import { partOf } from "./list";
import { dueState, dueWindow } from "./rules";
import type { DueItem, DueList, DueQuery } from "./schema";

/** How long before its window an instrument is shown as due: time enough to offer, to answer and to move. */
const LEAD_DAYS = 28;

export async function findDue(actor: Actor, query: DueQuery): Promise<DueList> {
  authorise(actor, "service-plans.read");
  const { rows, clock } = await withShop(actor, async (tx) => {
    const now = await clockWithin(tx, actor.shopId);
    return { clock: now, rows: await dueRows(tx, actor.shopId, now.today) };
  });
  return partOf(
    rows.map((row) => itemOf(row, clock.today)),
    query,
    clock.locale,
  );
}

function itemOf(row: DueRow, today: Day): DueItem {
  const window = dueWindow(
    rhythmOf(row),
    { lastServed: row.lastServed, startsOn: row.startsOn, events: row.events ?? [] },
    today,
  );
  const resting = row.rests && (row.restsUntil === null || row.restsUntil > today);
  const { bookedOn, declinedOn } = row;
  return {
    instrumentId: row.instrumentId,
    instrument: row.instrument,
    kind: row.kind,
    room: row.room,
    siteId: row.siteId,
    site: row.site,
    city: row.city,
    customerId: row.customerId,
    customer: row.customer,
    window,
    state: dueState({ window, resting, bookedOn, declinedOn, leadDays: LEAD_DAYS }, today),
    lastServed: row.lastServed,
    bookedOn,
    bookedVisitId: row.bookedVisitId,
    technicianId: row.technicianId,
    technician: row.technician,
    workMinutes: row.workMinutes,
  };
}
