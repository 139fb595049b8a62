import "server-only";
import type { Tx } from "@/db/client";
import {
  insertEvent,
  insertTechnicians,
  insertVisit,
  lockTechnicians,
  putJobs,
  updateVisit,
} from "@/db/queries/visit-writes";
import { jobsOf } from "@/db/queries/visits";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, invalid, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { addMinutes, withOffset } from "@/lib/wall-time";
import { askAboutPast } from "../booking/service";
import { type Booking, guardOverlap, requireBookable } from "../overlap/service";
import type { Move } from "../rules";
import type { VisitMovePlan, VisitRecord, VisitTransition } from "../schema";
import { bookableSite, changeableVisit, getVisit, notAmongThem, readVisit, timeOrFaults } from "../service";
import { siteTime } from "../times";
import { stateWords } from "../words";

/** One step in the life of a visit, recorded with who and why. "moved" makes the successor in the same breath. */
export async function transitionVisit(actor: Actor, id: string, step: VisitTransition): Promise<VisitRecord> {
  const scope = authorise(actor, "visits.change");
  const asked: { booking?: Booking } = {};
  return guardOverlap(actor, asked, async (tx) => {
    const before = await changeableVisit(tx, actor, id, step.version);
    const move = allowedMove(before, step.to);
    if (move.asksReason && !step.reason) throw invalid({ reason: `Say why the visit is ${step.to}.` });
    if (scope === "own" && step.technicianIds && !step.technicianIds.includes(actor.memberId)) {
      throw notAmongThem();
    }
    const movedToId = step.to === "moved" ? await insertSuccessor(tx, actor, before, step, asked) : undefined;
    if (move.back) asked.booking = await bookingOf(tx, actor, before);
    const written = await updateVisit(tx, actor.shopId, id, step.version, {
      state: step.to,
      ...(movedToId ? { movedToId } : {}),
    });
    if (!written) throw stale("visit", await readVisit(tx, actor, id));
    await insertEvent(tx, actor.shopId, {
      id: newId(),
      visitId: id,
      fromState: before.state,
      toState: step.to,
      byMemberId: actor.memberId,
      reason: step.reason ?? null,
    });
    // Only now is the technicians' old time free for the successor.
    if (movedToId && asked.booking) {
      await insertTechnicians(tx, actor.shopId, movedToId, asked.booking.technicianIds);
    }
    return readVisit(tx, actor, id);
  });
}

/** Moves a visit to another wall time at its site, keeping its length. */
export async function moveVisit(
  actor: Actor,
  id: string,
  { confirm, ...plan }: VisitMovePlan,
): Promise<VisitRecord> {
  const before = await getVisit(actor, id);
  const length = (Date.parse(before.end) - Date.parse(before.start)) / 60_000;
  const wall = `${plan.date}T${plan.time}`;
  const start = withOffset(wall, before.timeZone, 0);
  const end = withOffset(addMinutes(wall, length), before.timeZone, 0);
  const read = siteTime({ start, end }, before.timeZone);
  if ("faults" in read)
    throw invalid({ time: read.faults.start ?? read.faults.end ?? "Choose another time." });
  askAboutPast(start, before.timeZone, confirm);
  return transitionVisit(actor, id, { ...plan, to: "moved", start, end });
}

/** Withdraws a visit, where its life still allows that. */
export function cancelVisit(
  actor: Actor,
  id: string,
  { version, reason }: { version: number; reason?: string | null | undefined },
): Promise<VisitRecord> {
  return transitionVisit(actor, id, {
    to: "cancelled",
    version,
    reason: reason ?? "No reason given",
    confirmed: false,
  });
}

function allowedMove(visit: VisitRecord, to: VisitTransition["to"]): Move {
  const move = visit.moves.find((one) => one.to === to);
  if (move) return move;
  const next = visit.moves.map((one) => stateWords[one.to]).join(", ");
  throw new AppError(
    "move-not-allowed",
    `A visit that is ${stateWords[visit.state]} cannot become ${stateWords[to]}. ${
      next ? `It can become: ${next}.` : "Nothing follows."
    }`,
    { current: visit },
  );
}

/** A visit brought back takes its technicians' time again, which may be somebody else's by now. */
async function bookingOf(tx: Tx, actor: Actor, visit: VisitRecord): Promise<Booking> {
  const technicianIds = visit.technicians.map(({ id }) => id);
  await lockTechnicians(tx, actor.shopId, technicianIds);
  return { visitId: visit.id, technicianIds, time: timeOrFaults(visit, visit.timeZone) };
}

async function insertSuccessor(
  tx: Tx,
  actor: Actor,
  before: VisitRecord,
  step: VisitTransition,
  asked: { booking?: Booking },
): Promise<string> {
  const { start, end } = step;
  if (!start || !end) {
    throw invalid({
      ...(start ? {} : { start: "Say when the visit is moved to." }),
      ...(end ? {} : { end: "Say when the moved visit ends." }),
    });
  }
  const id = step.successorId ?? newId();
  const { timeZone } = await bookableSite(tx, actor, before.site.id);
  const time = timeOrFaults({ start, end }, timeZone);
  const technicianIds = step.technicianIds ?? before.technicians.map((technician) => technician.id);
  asked.booking = { visitId: id, technicianIds, time };
  await requireBookable(
    tx,
    actor,
    technicianIds,
    before.technicians.map((technician) => technician.id),
  );
  const state = step.confirmed ? "confirmed" : "offered";
  const inserted = await insertVisit(tx, actor.shopId, {
    id,
    siteId: before.site.id,
    customerId: before.customer.id,
    state,
    notes: before.notes,
    ...time,
  });
  if (!inserted) throw new AppError("id-in-use", "The successor's id is taken. Send it with another one.");
  const jobs = await jobsOf(tx, actor.shopId, [before.id]);
  await putJobs(
    tx,
    actor.shopId,
    id,
    jobs.map(({ instrumentId, work }, position) => ({ id: newId(), instrumentId, work, position })),
  );
  await insertEvent(tx, actor.shopId, {
    id: newId(),
    visitId: id,
    fromState: null,
    toState: state,
    byMemberId: actor.memberId,
    reason: null,
  });
  return id;
}
