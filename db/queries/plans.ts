import { and, desc, eq, isNull, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { job, member, readingSheet, shop, stretchPlan } from "@/db/schema";

const headColumns = {
  id: stretchPlan.id,
  sheetId: stretchPlan.sheetId,
  instrumentId: readingSheet.instrumentId,
  jobId: stretchPlan.jobId,
  styleName: stretchPlan.styleName,
  temperament: stretchPlan.temperament,
  referenceHz: stretchPlan.referenceHz,
  computationVersion: stretchPlan.computationVersion,
  madeByName: member.name,
  createdAt: stretchPlan.createdAt,
  supersededAt: stretchPlan.supersededAt,
};

const arrayColumns = {
  firstMidi: stretchPlan.firstMidi,
  stretchCents: stretchPlan.stretchCents,
  bandCents: stretchPlan.bandCents,
  targetHz: stretchPlan.targetHz,
  listenPartial: stretchPlan.listenPartial,
  listenHz: stretchPlan.listenHz,
  b: stretchPlan.b,
  lnBSigma: stretchPlan.lnBSigma,
};

const ofSheet = and(eq(readingSheet.shopId, stretchPlan.shopId), eq(readingSheet.id, stretchPlan.sheetId));
const byMember = and(eq(member.shopId, stretchPlan.shopId), eq(member.id, stretchPlan.madeBy));

export async function planById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select({ ...headColumns, ...arrayColumns })
    .from(stretchPlan)
    .innerJoin(readingSheet, ofSheet)
    .leftJoin(member, byMember)
    .where(and(eq(stretchPlan.shopId, shopId), eq(stretchPlan.id, id)));
  return row;
}

/** Newest first; a sheet has few. */
export function plansOfSheet(db: Handle, shopId: string, sheetId: string) {
  return db
    .select(headColumns)
    .from(stretchPlan)
    .innerJoin(readingSheet, ofSheet)
    .leftJoin(member, byMember)
    .where(and(eq(stretchPlan.shopId, shopId), eq(stretchPlan.sheetId, sheetId)))
    .orderBy(desc(stretchPlan.createdAt))
    .limit(100);
}

export type PlanValues = Omit<typeof stretchPlan.$inferInsert, "shopId">;

export async function insertPlan(db: Handle, shopId: string, values: PlanValues): Promise<boolean> {
  const rows = await db
    .insert(stretchPlan)
    .values({ ...values, shopId })
    .onConflictDoNothing({ target: [stretchPlan.shopId, stretchPlan.id] })
    .returning({ id: stretchPlan.id });
  return rows.length === 1;
}

/** Locks the job, so that of two plans saved at once for it one steps back. */
export async function supersedePlansOfJob(db: Handle, shopId: string, jobId: string): Promise<void> {
  await db
    .select({ id: job.id })
    .from(job)
    .where(and(eq(job.shopId, shopId), eq(job.id, jobId)))
    .for("update");
  await db
    .update(stretchPlan)
    .set({ supersededAt: sql`now()`, updatedAt: sql`now()` })
    .where(
      and(eq(stretchPlan.shopId, shopId), eq(stretchPlan.jobId, jobId), isNull(stretchPlan.supersededAt)),
    );
}

export async function defaultStyleOf(db: Handle, shopId: string): Promise<string> {
  const [row] = await db.select({ style: shop.defaultStyle }).from(shop).where(eq(shop.id, shopId));
  return row?.style ?? "even";
}
