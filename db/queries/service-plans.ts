import { and, eq, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { member, servicePlan } from "@/db/schema";

const columns = {
  instrumentId: servicePlan.instrumentId,
  rhythm: servicePlan.rhythm,
  every: servicePlan.every,
  unit: servicePlan.unit,
  months: servicePlan.months,
  daysBefore: servicePlan.daysBefore,
  startsOn: servicePlan.startsOn,
  servedBefore: servicePlan.servedBefore,
  rests: servicePlan.rests,
  restsUntil: servicePlan.restsUntil,
  technicianId: servicePlan.technicianId,
  weekdays: servicePlan.weekdays,
  hoursFrom: servicePlan.hoursFrom,
  hoursUntil: servicePlan.hoursUntil,
  work: servicePlan.work,
  workMinutes: servicePlan.workMinutes,
  version: servicePlan.version,
};

export type ServicePlanColumns = Omit<typeof servicePlan.$inferInsert, "shopId" | "createdAt" | "updatedAt">;

export async function servicePlanOf(db: Handle, shopId: string, instrumentId: string) {
  const [row] = await db
    .select({ ...columns, technicianName: member.name })
    .from(servicePlan)
    .leftJoin(member, and(eq(member.shopId, servicePlan.shopId), eq(member.id, servicePlan.technicianId)))
    .where(and(eq(servicePlan.shopId, shopId), eq(servicePlan.instrumentId, instrumentId)));
  return row;
}

/** False when there is one already: the first of two who plan at once wins. */
export async function insertServicePlan(
  db: Handle,
  shopId: string,
  fields: ServicePlanColumns,
): Promise<boolean> {
  const rows = await db
    .insert(servicePlan)
    .values({ ...fields, shopId, version: 1 })
    .onConflictDoNothing()
    .returning({ id: servicePlan.instrumentId });
  return rows.length === 1;
}

/** False when the version is stale or there is none. */
export async function updateServicePlan(
  db: Handle,
  shopId: string,
  { instrumentId, version, ...fields }: ServicePlanColumns & { version: number },
): Promise<boolean> {
  const rows = await db
    .update(servicePlan)
    .set({ ...fields, version: version + 1, updatedAt: sql`now()` })
    .where(
      and(
        eq(servicePlan.shopId, shopId),
        eq(servicePlan.instrumentId, instrumentId),
        eq(servicePlan.version, version),
      ),
    )
    .returning({ id: servicePlan.instrumentId });
  return rows.length === 1;
}

export async function deleteServicePlan(
  db: Handle,
  shopId: string,
  instrumentId: string,
  version: number,
): Promise<boolean> {
  const rows = await db
    .delete(servicePlan)
    .where(
      and(
        eq(servicePlan.shopId, shopId),
        eq(servicePlan.instrumentId, instrumentId),
        eq(servicePlan.version, version),
      ),
    )
    .returning({ id: servicePlan.instrumentId });
  return rows.length === 1;
}
