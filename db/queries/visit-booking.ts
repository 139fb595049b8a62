import { and, asc, eq, inArray, isNull, ne, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { instrument, instrumentHolding, member, site, visit, visitTechnician } from "@/db/schema";
import { time } from "./visits";

/** The live visit in the way of these technicians at this time, the earliest first. */
export async function overlapping(
  db: Handle,
  shopId: string,
  {
    technicianIds,
    start,
    end,
    exceptId,
  }: {
    technicianIds: readonly string[];
    start: string;
    end: string;
    exceptId: string;
  },
) {
  const [row] = await db
    .select({
      visitId: visit.id,
      siteName: site.name,
      ...time,
      technicianId: member.id,
      technicianName: member.name,
    })
    .from(visitTechnician)
    .innerJoin(visit, and(eq(visit.shopId, visitTechnician.shopId), eq(visit.id, visitTechnician.visitId)))
    .innerJoin(site, and(eq(site.shopId, visit.shopId), eq(site.id, visit.siteId)))
    .innerJoin(
      member,
      and(eq(member.shopId, visitTechnician.shopId), eq(member.id, visitTechnician.memberId)),
    )
    .where(
      and(
        eq(visitTechnician.shopId, shopId),
        eq(visitTechnician.live, true),
        inArray(visitTechnician.memberId, [...technicianIds]),
        ne(visitTechnician.visitId, exceptId),
        sql`${visitTechnician.during} && tstzrange(${start}, ${end}, '[)')`,
      ),
    )
    .orderBy(asc(visit.startsLocal), asc(visit.id))
    .limit(1);
  return row;
}

/** When these technicians are taken on one day of a zone, in minutes of its wall clock. */
export async function busyOn(
  db: Handle,
  shopId: string,
  {
    technicianIds,
    day,
    timeZone,
    exceptId,
  }: {
    technicianIds: readonly string[];
    day: string;
    timeZone: string;
    exceptId: string;
  },
) {
  const midnight = sql`${day}::date::timestamp`;
  const minutes = (edge: "lower" | "upper") =>
    sql<number>`(extract(epoch from (${sql.raw(edge)}(${visitTechnician.during}) at time zone ${timeZone}) - ${midnight}) / 60)::int`;
  return db
    .select({ start: minutes("lower"), end: minutes("upper") })
    .from(visitTechnician)
    .where(
      and(
        eq(visitTechnician.shopId, shopId),
        eq(visitTechnician.live, true),
        inArray(visitTechnician.memberId, [...technicianIds]),
        ne(visitTechnician.visitId, exceptId),
        sql`${visitTechnician.during} && tstzrange(${midnight} at time zone ${timeZone},
          (${midnight} + interval '1 day') at time zone ${timeZone}, '[)')`,
      ),
    );
}

export async function siteForVisit(db: Handle, shopId: string, siteId: string) {
  const [row] = await db
    .select({
      id: site.id,
      customerId: site.customerId,
      name: site.name,
      timeZone: site.timeZone,
      archivedAt: site.archivedAt,
    })
    .from(site)
    .where(and(eq(site.shopId, shopId), eq(site.id, siteId)));
  return row;
}

/** The instruments that stand at a site today. */
export async function instrumentsAt(db: Handle, shopId: string, siteId: string) {
  return db
    .select({
      id: instrument.id,
      maker: instrument.maker,
      model: instrument.model,
      serial: instrument.serial,
      room: instrument.room,
    })
    .from(instrumentHolding)
    .innerJoin(
      instrument,
      and(eq(instrument.shopId, instrumentHolding.shopId), eq(instrument.id, instrumentHolding.instrumentId)),
    )
    .where(
      and(
        eq(instrumentHolding.shopId, shopId),
        eq(instrumentHolding.siteId, siteId),
        isNull(instrumentHolding.until),
        isNull(instrument.archivedAt),
      ),
    )
    .orderBy(asc(instrument.room), asc(instrument.maker), asc(instrument.id));
}

export async function bookableMembers(db: Handle, shopId: string) {
  return db
    .select({ id: member.id, name: member.name })
    .from(member)
    .where(and(eq(member.shopId, shopId), eq(member.bookable, true), isNull(member.endedAt)))
    .orderBy(asc(member.name), asc(member.id));
}
