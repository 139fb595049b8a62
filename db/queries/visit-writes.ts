import { and, asc, eq, inArray, isNull, notInArray, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { job, member, visit, visitEvent, visitTechnician } from "@/db/schema";
import type { VisitState } from "@/lib/visits/rules";

export type VisitTime = {
  startsLocal: string;
  startsFold: number;
  endsLocal: string;
  endsFold: number;
  timeZone: string;
};

/**
 * The bookable ones among these, their rows locked in one order: two bookings of the same people then wait
 * for each other here, instead of deadlocking inside the exclusion constraint that decides.
 */
export async function lockTechnicians(db: Handle, shopId: string, ids: readonly string[]) {
  const rows = await db
    .select({ id: member.id })
    .from(member)
    .where(
      and(
        eq(member.shopId, shopId),
        inArray(member.id, [...ids]),
        eq(member.bookable, true),
        isNull(member.endedAt),
      ),
    )
    .orderBy(asc(member.id))
    .for("no key update");
  return rows.map(({ id }) => id);
}

/** Nothing comes back where this id is a visit already. */
export async function insertVisit(
  db: Handle,
  shopId: string,
  fields: VisitTime & {
    id: string;
    siteId: string;
    customerId: string;
    state: VisitState;
    notes: string | null;
  },
) {
  const [row] = await db
    .insert(visit)
    .values({ ...fields, shopId })
    .onConflictDoNothing()
    .returning({ id: visit.id });
  return row;
}

/** Nothing comes back when the version is stale or the record is not there. */
export async function updateVisit(
  db: Handle,
  shopId: string,
  id: string,
  version: number,
  fields: Partial<VisitTime> & { state?: VisitState; movedToId?: string; notes?: string | null },
) {
  const [row] = await db
    .update(visit)
    .set({ ...fields, version: version + 1, updatedAt: sql`now()` })
    .where(and(eq(visit.shopId, shopId), eq(visit.id, id), eq(visit.version, version)))
    .returning({ id: visit.id });
  return row;
}

export async function insertEvent(
  db: Handle,
  shopId: string,
  event: {
    id: string;
    visitId: string;
    fromState: VisitState | null;
    toState: VisitState;
    byMemberId: string;
    reason: string | null;
  },
) {
  await db.insert(visitEvent).values({ ...event, shopId });
}

export async function insertTechnicians(
  db: Handle,
  shopId: string,
  visitId: string,
  memberIds: readonly string[],
) {
  if (memberIds.length === 0) return;
  await db
    .insert(visitTechnician)
    .values(memberIds.map((memberId) => ({ shopId, visitId, memberId })))
    .onConflictDoNothing({
      target: [visitTechnician.shopId, visitTechnician.visitId, visitTechnician.memberId],
    });
}

export async function removeTechniciansExcept(
  db: Handle,
  shopId: string,
  visitId: string,
  memberIds: readonly string[],
) {
  await db
    .delete(visitTechnician)
    .where(
      and(
        eq(visitTechnician.shopId, shopId),
        eq(visitTechnician.visitId, visitId),
        notInArray(visitTechnician.memberId, [...memberIds]),
      ),
    );
}

export type JobFields = { id: string; instrumentId: string; work: string; position: number };

/** One job an instrument: an instrument that is there already keeps its job, with new words and place. */
export async function putJobs(db: Handle, shopId: string, visitId: string, jobs: readonly JobFields[]) {
  if (jobs.length === 0) return;
  await db
    .insert(job)
    .values(jobs.map((fields) => ({ ...fields, shopId, visitId })))
    .onConflictDoUpdate({
      target: [job.shopId, job.visitId, job.instrumentId],
      set: {
        work: sql`excluded.work`,
        position: sql`excluded.position`,
        updatedAt: sql`now()`,
        version: sql`job.version + 1`,
      },
      setWhere: sql`(job.work, job.position) is distinct from (excluded.work, excluded.position)`,
    });
}

/** Jobs on other instruments, with how many sheets hang on each. */
export async function jobsBeside(
  db: Handle,
  shopId: string,
  visitId: string,
  instrumentIds: readonly string[],
) {
  return db
    .select({
      id: job.id,
      instrumentId: job.instrumentId,
      sheets: sql<number>`(select count(*)::int from reading_sheet r
        where r.shop_id = ${shopId} and r.job_id = job.id)`,
    })
    .from(job)
    .where(
      and(
        eq(job.shopId, shopId),
        eq(job.visitId, visitId),
        instrumentIds.length > 0 ? notInArray(job.instrumentId, [...instrumentIds]) : undefined,
      ),
    );
}

export async function deleteJobs(db: Handle, shopId: string, ids: readonly string[]) {
  if (ids.length === 0) return;
  await db.delete(job).where(and(eq(job.shopId, shopId), inArray(job.id, [...ids])));
}
