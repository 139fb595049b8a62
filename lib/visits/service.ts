import "server-only";
import { type Tx, withShop } from "@/db/client";
import { instrumentsAt, siteForVisit } from "@/db/queries/visit-booking";
import {
  deleteJobs,
  insertEvent,
  insertTechnicians,
  insertVisit,
  jobsBeside,
  putJobs,
  removeTechniciansExcept,
  updateVisit,
} from "@/db/queries/visit-writes";
import { eventsOf, jobsOf, listVisits, sheetsOfJobs, techniciansOf, visitById } from "@/db/queries/visits";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { isUniqueViolation } from "@/lib/database-errors";
import { AppError, type FieldErrors, invalid, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import { type Booking, guardOverlap, requireBookable } from "./overlap/service";
import { visitRecordOf, visitRowOf } from "./record";
import { mayCorrect } from "./rules";
import type { NewVisit, VisitChange, VisitListQuery, VisitRecord, VisitRow } from "./schema";
import { type SiteTime, siteTime } from "./times";

export async function findVisits(actor: Actor, query: VisitListQuery): Promise<ListPage<VisitRow>> {
  const reach = authorise(actor, "visits.read");
  return withShop(actor, async (tx) => {
    const page = await listVisits(tx, actor.shopId, query, reach);
    return { next: page.next, items: await rowsOf(tx, actor, page.items) };
  });
}

export async function getVisit(actor: Actor, id: string): Promise<VisitRecord> {
  authorise(actor, "visits.read");
  return withShop(actor, (tx) => readVisit(tx, actor, id));
}

export async function createVisit(actor: Actor, input: NewVisit): Promise<VisitRecord> {
  const scope = authorise(actor, "visits.change");
  if (scope === "own" && !input.technicianIds.includes(actor.memberId)) throw notAmongThem();
  const id = input.id ?? newId();
  const asked: { booking?: Booking } = {};
  return withIdInUse(() =>
    guardOverlap(actor, asked, async (tx) => {
      if (input.id && (await visitById(tx, actor.shopId, id))) return readVisit(tx, actor, id);
      const { timeZone, customerId } = await bookableSite(tx, actor, input.siteId);
      const time = timeOrFaults(input, timeZone);
      asked.booking = { visitId: id, technicianIds: input.technicianIds, time };
      await requireBookable(tx, actor, input.technicianIds);
      await requireInstruments(tx, actor, input.siteId, input.jobs);
      const inserted = await insertVisit(tx, actor.shopId, {
        id,
        siteId: input.siteId,
        customerId,
        state: input.state,
        notes: input.notes ?? null,
        ...time,
      });
      if (!inserted) return readVisit(tx, actor, id);
      await insertTechnicians(tx, actor.shopId, id, input.technicianIds);
      await putJobs(tx, actor.shopId, id, jobsFrom(input.jobs));
      await insertEvent(tx, actor.shopId, {
        id: newId(),
        visitId: id,
        fromState: null,
        toState: input.state,
        byMemberId: actor.memberId,
        reason: null,
      });
      return readVisit(tx, actor, id);
    }),
  );
}

/** Corrects a visit without moving it in its life: who comes, the work, notes; the time while it is not begun. */
export async function changeVisit(actor: Actor, id: string, change: VisitChange): Promise<VisitRecord> {
  const scope = authorise(actor, "visits.change");
  const asked: { booking?: Booking } = {};
  return withIdInUse(() =>
    guardOverlap(actor, asked, async (tx) => {
      const before = await changeableVisit(tx, actor, id, change.version);
      const technicianIds = change.technicianIds ?? before.technicians.map((technician) => technician.id);
      if (scope === "own" && !technicianIds.includes(actor.memberId)) throw notAmongThem();
      refuseCorrection(before, change);

      const retimed = change.start !== undefined || change.end !== undefined;
      const time = timeOrFaults(
        { start: change.start ?? before.start, end: change.end ?? before.end },
        before.timeZone,
      );
      asked.booking = { visitId: id, technicianIds, time };
      // Who is on the visit already stays, even where they take no new bookings.
      await requireBookable(
        tx,
        actor,
        technicianIds,
        before.technicians.map((technician) => technician.id),
      );
      if (change.technicianIds) {
        await removeTechniciansExcept(tx, actor.shopId, id, technicianIds);
      }
      const written = await updateVisit(tx, actor.shopId, id, change.version, {
        ...(retimed ? time : {}),
        ...(change.notes === undefined ? {} : { notes: change.notes }),
      });
      if (!written) throw stale("visit", await readVisit(tx, actor, id));
      if (change.technicianIds) await insertTechnicians(tx, actor.shopId, id, technicianIds);
      if (change.jobs) await replaceJobs(tx, actor, before, change.jobs);
      return readVisit(tx, actor, id);
    }),
  );
}

/** The record with all that hangs on it, inside a transaction that is already open. */
export async function readVisit(tx: Tx, actor: Actor, id: string): Promise<VisitRecord> {
  const row = await visitById(tx, actor.shopId, id);
  if (!row) throw notFound("visit");
  const technicians = (await techniciansOf(tx, [id])).get(id) ?? [];
  const jobs = await jobsOf(tx, actor.shopId, [id]);
  const sheets = await sheetsOfJobs(
    tx,
    actor.shopId,
    jobs.map((job) => job.id),
  );
  const events = await eventsOf(tx, actor.shopId, id);
  return visitRecordOf(actor, row, { technicians, jobs, sheets, events });
}

/** The visit about to be changed, or why this person may not, or that it is another version by now. */
export async function changeableVisit(
  tx: Tx,
  actor: Actor,
  id: string,
  version: number,
): Promise<VisitRecord> {
  const before = await readVisit(tx, actor, id);
  if (!before.canChange) {
    throw new AppError("forbidden", "This is another technician's visit. The office can change it.");
  }
  if (before.version !== version) throw stale("visit", before);
  return before;
}

export async function rowsOf(
  tx: Tx,
  actor: Actor,
  rows: readonly Parameters<typeof visitRowOf>[0][],
): Promise<VisitRow[]> {
  const ids = rows.map(({ id }) => id);
  const technicians = await techniciansOf(tx, ids);
  const jobs = await jobsOf(tx, actor.shopId, ids);
  return rows.map((row) =>
    visitRowOf(
      row,
      technicians.get(row.id) ?? [],
      jobs.filter(({ visitId }) => visitId === row.id),
    ),
  );
}

export function timeOrFaults(times: { start: string; end: string }, timeZone: string): SiteTime {
  const read = siteTime(times, timeZone);
  if ("faults" in read) throw invalid(read.faults);
  return read.time;
}

export async function bookableSite(tx: Tx, actor: Actor, siteId: string) {
  const site = await siteForVisit(tx, actor.shopId, siteId);
  if (!site) throw invalid({ siteId: "This site does not exist, or is not yours to see." });
  if (site.archivedAt) throw invalid({ siteId: "This site is archived. Restore it to book a visit there." });
  return site;
}

export function notAmongThem(): AppError {
  return new AppError(
    "forbidden",
    "You can book and change your own visits. Put yourself among those who come, or ask the office.",
  );
}

/** A job's id made by the client may be another job's already. */
async function withIdInUse<T>(write: () => Promise<T>): Promise<T> {
  try {
    return await write();
  } catch (error) {
    if (!isUniqueViolation(error, "job_shop_id_id_pk")) throw error;
    throw new AppError("id-in-use", "The id of a job is taken. Send it with another one.");
  }
}

type Jobs = NewVisit["jobs"];

function jobsFrom(jobs: Jobs) {
  return jobs.map(({ id, instrumentId, work }, position) => ({
    id: id ?? newId(),
    instrumentId,
    work: work ?? "Tuning",
    position,
  }));
}

async function requireInstruments(
  tx: Tx,
  actor: Actor,
  siteId: string,
  jobs: Jobs,
  known: readonly string[] = [],
): Promise<void> {
  if (jobs.length === 0) return;
  const there = new Set([
    ...known,
    ...(await instrumentsAt(tx, actor.shopId, siteId)).map((instrument) => instrument.id),
  ]);
  const faults: FieldErrors = {};
  for (const [index, { instrumentId }] of jobs.entries()) {
    if (!there.has(instrumentId)) {
      faults[`jobs.${index}.instrumentId`] = "This instrument does not stand at this site.";
    }
  }
  if (Object.keys(faults).length > 0) throw invalid(faults);
}

async function replaceJobs(tx: Tx, actor: Actor, before: VisitRecord, jobs: Jobs): Promise<void> {
  const known = before.jobs.map((job) => job.instrumentId);
  await requireInstruments(tx, actor, before.site.id, jobs, known);
  const named = jobs.map(({ instrumentId }) => instrumentId);
  const dropped = await jobsBeside(tx, actor.shopId, before.id, named);
  const kept = dropped.find(({ sheets }) => sheets > 0);
  if (kept) {
    const name = before.jobs.find((job) => job.id === kept.id)?.instrument ?? "This instrument";
    throw new AppError("conflict", `${name} has reading sheets on this visit, so its job stays.`);
  }
  await deleteJobs(
    tx,
    actor.shopId,
    dropped.map((job) => job.id),
  );
  const works = new Map(before.jobs.map((job) => [job.instrumentId, job.work]));
  await putJobs(
    tx,
    actor.shopId,
    before.id,
    jobsFrom(jobs.map((job) => ({ ...job, work: job.work ?? works.get(job.instrumentId) }))),
  );
}

function refuseCorrection(before: VisitRecord, change: VisitChange): void {
  if ((change.start !== undefined || change.end !== undefined) && !mayCorrect(before.state, "time")) {
    throw new AppError("move-not-allowed", "The time of this visit stands. Move the visit to another one.", {
      current: before,
    });
  }
  if ((change.jobs || change.technicianIds) && !mayCorrect(before.state, "work")) {
    throw new AppError("move-not-allowed", "This visit is over: who came and what was done stand.", {
      current: before,
    });
  }
}
