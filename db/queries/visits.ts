import { and, asc, eq, inArray, isNull, type SQL, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import {
  customer,
  instrument,
  job,
  member,
  noteReading,
  readingSheet,
  site,
  visit,
  visitEvent,
} from "@/db/schema";
import type { VisitState } from "@/lib/visits/rules";
import type { VisitListQuery } from "@/lib/visits/schema";
import { type Order, orderBy, paged, pageStart } from "./keyset";
import { isOwn, type Reach } from "./search";

/** "2026-05-14T09:00": the wall time without what a timestamp's text has too much. */
function wall(column: typeof visit.startsLocal | typeof visit.endsLocal) {
  return sql<string>`to_char(${column}, 'YYYY-MM-DD"T"HH24:MI')`;
}

/** When a visit is, as the database keeps it. */
export const time = {
  startsLocal: wall(visit.startsLocal),
  endsLocal: wall(visit.endsLocal),
  startsFold: visit.startsFold,
  endsFold: visit.endsFold,
  timeZone: visit.timeZone,
};

/** What of the site the session may see: the one it was booked by sees a site no longer, once it is another's. */
const place = {
  siteName: sql<string>`coalesce(${site.name}, '')`,
  street: sql<string>`coalesce(${site.street}, '')`,
  city: sql<string>`coalesce(${site.city}, '')`,
  accessNotes: site.accessNotes,
};

const summary = {
  id: visit.id,
  state: visit.state,
  ...time,
  siteId: visit.siteId,
  ...place,
  customerName: sql<string>`coalesce(${customer.name}, '')`,
  version: visit.version,
};

type Filter = Partial<Pick<VisitListQuery, "technicianId" | "siteId" | "customerId" | "instrumentId">> & {
  states?: readonly VisitState[] | undefined;
  from?: string | undefined;
  /** The first day no longer in it. */
  before?: string | undefined;
};

function chosen(shopId: string, filter: Filter): SQL | undefined {
  return and(
    eq(visit.shopId, shopId),
    filter.states ? inArray(visit.state, [...filter.states]) : undefined,
    // As timestamps: a comparison of a timestamp with a date is not leakproof, so no index would be asked.
    filter.from ? sql`${visit.startsLocal} >= ${filter.from}::date::timestamp` : undefined,
    filter.before ? sql`${visit.startsLocal} < ${filter.before}::date::timestamp` : undefined,
    filter.siteId ? eq(visit.siteId, filter.siteId) : undefined,
    filter.customerId ? eq(visit.customerId, filter.customerId) : undefined,
    filter.technicianId
      ? sql`exists (select 1 from visit_technician t where t.shop_id = ${shopId}
          and t.visit_id = visit.id and t.member_id = ${filter.technicianId})`
      : undefined,
    filter.instrumentId
      ? sql`exists (select 1 from job j where j.shop_id = ${shopId}
          and j.visit_id = visit.id and j.instrument_id = ${filter.instrumentId})`
      : undefined,
  );
}

/**
 * The visits by their index and no more than asked; then the places of those alone. Joined, the planner would
 * begin with all customers of the shop and read every visit, misjudging what the walls leave.
 */
async function summaries(
  db: Handle,
  shopId: string,
  { where, direction, most }: { where: SQL | undefined; direction: Order["direction"]; most: number },
) {
  const visits = await db
    .select({
      id: visit.id,
      state: visit.state,
      ...time,
      siteId: visit.siteId,
      customerId: visit.customerId,
      version: visit.version,
      orderKey: sql<string>`(visit.starts_local)::text`,
    })
    .from(visit)
    .where(where)
    .orderBy(orderBy(byStart(direction)))
    .limit(most);
  if (visits.length === 0) return [];
  const each = (ids: readonly string[]) => [...new Set(ids)];
  const sites = await db
    .select({ id: site.id, ...place })
    .from(site)
    .where(and(eq(site.shopId, shopId), inArray(site.id, each(visits.map(({ siteId }) => siteId)))));
  const customers = await db
    .select({ id: customer.id, name: customer.name })
    .from(customer)
    .where(
      and(
        eq(customer.shopId, shopId),
        inArray(customer.id, each(visits.map(({ customerId }) => customerId))),
      ),
    );
  const placeById = new Map(sites.map(({ id, ...at }) => [id, at]));
  const nameById = new Map(customers.map(({ id, name }) => [id, name]));
  return visits.map(({ customerId, ...row }) => ({
    ...row,
    ...(placeById.get(row.siteId) ?? unseenPlace),
    customerName: nameById.get(customerId) ?? "",
  }));
}

const unseenPlace = { siteName: "", street: "", city: "", accessNotes: null };

function byStart(direction: Order["direction"]): Order {
  return { by: sql`visit.starts_local`, direction, id: sql`visit.id` };
}

export async function listVisits(db: Handle, shopId: string, query: VisitListQuery, reach: Reach) {
  const rows = await summaries(db, shopId, {
    where: and(
      reach === "own" ? isOwn(visit.customerId) : undefined,
      chosen(shopId, {
        ...query,
        states: query.state ? [query.state] : undefined,
        before: query.to ? nextDay(query.to) : undefined,
      }),
      pageStart(byStart(query.direction), query, "timestamp"),
    ),
    direction: query.direction,
    most: query.most + 1,
  });
  return paged(rows, query);
}

function nextDay(day: string): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10);
}

/** Visits that begin on these days, in order of time. */
export async function visitsBetween(
  db: Handle,
  shopId: string,
  filter: Filter & { most: number; latestFirst?: boolean },
) {
  return summaries(db, shopId, {
    where: chosen(shopId, filter),
    direction: filter.latestFirst ? "desc" : "asc",
    most: filter.most,
  });
}

export async function countVisits(db: Handle, shopId: string, filter: Filter): Promise<number> {
  const [row] = await db
    .select({ count: sql<number>`count(*)::int` })
    .from(visit)
    .where(chosen(shopId, filter));
  return row?.count ?? 0;
}

/** The first of these days that has visits, and how many. */
export async function firstDayWithVisits(db: Handle, shopId: string, filter: Filter) {
  const [row] = await db
    .select({
      day: sql<string>`to_char(visit.starts_local, 'YYYY-MM-DD')`,
      visits: sql<number>`count(*)::int`,
    })
    .from(visit)
    .where(chosen(shopId, filter))
    .groupBy(sql`1`)
    .orderBy(sql`1`)
    .limit(1);
  return row ?? null;
}

export async function visitById(db: Handle, shopId: string, id: string) {
  const [row] = await db
    .select({
      ...summary,
      postalCode: sql<string>`coalesce(${site.postalCode}, '')`,
      customerId: visit.customerId,
      customerPhone: customer.phone,
      notes: visit.notes,
      movedToId: visit.movedToId,
      movedFromId: sql<string | null>`(select p.id from visit p where p.shop_id = ${shopId}
        and p.site_id = visit.site_id and p.moved_to_id = visit.id limit 1)`,
      updatedAt: visit.updatedAt,
    })
    .from(visit)
    .leftJoin(site, and(eq(site.shopId, visit.shopId), eq(site.id, visit.siteId)))
    .leftJoin(customer, and(eq(customer.shopId, visit.shopId), eq(customer.id, visit.customerId)))
    .where(and(eq(visit.shopId, shopId), eq(visit.id, id)));
  return row;
}

/** By visit. Through a definer function, so that a customer's session learns who comes, and no more. */
export async function techniciansOf(db: Handle, visitIds: readonly string[]) {
  const byVisit = new Map<string, { id: string; name: string }[]>();
  if (visitIds.length === 0) return byVisit;
  const rows = await db.execute<{ visitId: string; id: string; name: string }>(sql`
    select visit_id as "visitId", member_id as id, name from technicians_of(array[${sql.join(
      visitIds.map((id) => sql`${id}`),
      sql`, `,
    )}]::uuid[])`);
  for (const { visitId, ...technician } of rows) {
    byVisit.set(visitId, [...(byVisit.get(visitId) ?? []), technician]);
  }
  return byVisit;
}

/** Jobs of several visits, in their order. A customer's session gets those on its own instruments. */
export async function jobsOf(db: Handle, shopId: string, visitIds: readonly string[]) {
  if (visitIds.length === 0) return [];
  return db
    .select({
      id: job.id,
      visitId: job.visitId,
      instrumentId: job.instrumentId,
      maker: instrument.maker,
      model: instrument.model,
      room: instrument.room,
      work: job.work,
      remarks: job.remarks,
      version: job.version,
    })
    .from(job)
    .innerJoin(instrument, and(eq(instrument.shopId, job.shopId), eq(instrument.id, job.instrumentId)))
    .where(and(eq(job.shopId, shopId), inArray(job.visitId, [...visitIds])))
    .orderBy(asc(job.position), asc(job.id));
}

export async function sheetsOfJobs(db: Handle, shopId: string, jobIds: readonly string[]) {
  if (jobIds.length === 0) return [];
  return db
    .select({
      id: readingSheet.id,
      jobId: readingSheet.jobId,
      stage: readingSheet.stage,
      takenAt: readingSheet.takenAt,
      notes: sql<number>`count(distinct ${noteReading.midi})::int`,
    })
    .from(readingSheet)
    .leftJoin(
      noteReading,
      and(eq(noteReading.shopId, readingSheet.shopId), eq(noteReading.sheetId, readingSheet.id)),
    )
    .where(
      and(
        eq(readingSheet.shopId, shopId),
        inArray(readingSheet.jobId, [...jobIds]),
        isNull(readingSheet.archivedAt),
      ),
    )
    .groupBy(readingSheet.shopId, readingSheet.id)
    .orderBy(asc(readingSheet.takenAt), asc(readingSheet.id));
}

export async function eventsOf(db: Handle, shopId: string, visitId: string) {
  return db
    .select({
      from: visitEvent.fromState,
      to: visitEvent.toState,
      at: visitEvent.at,
      by: member.name,
      reason: visitEvent.reason,
    })
    .from(visitEvent)
    .leftJoin(member, and(eq(member.shopId, visitEvent.shopId), eq(member.id, visitEvent.byMemberId)))
    .where(and(eq(visitEvent.shopId, shopId), eq(visitEvent.visitId, visitId)))
    .orderBy(asc(visitEvent.at), asc(visitEvent.id));
}
