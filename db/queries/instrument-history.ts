import { sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import type { VisitState } from "@/lib/visits/rules";
import { isoInstant } from "./iso";
import { soundedPitch } from "./sounded-pitch";

/** Sheets enough for any history people read; older ones are in the reading sheets' own list. */
const mostSheets = 200;

export type HistorySheet = {
  id: string;
  stage: "as-found" | "after-raise" | "as-left";
  takenAt: string;
  jobId: string | null;
  humidityPercent: number | null;
  cents: number | null;
};

export async function historySheets(
  db: Handle,
  shopId: string,
  instrumentId: string,
): Promise<HistorySheet[]> {
  const rows = await db.execute<HistorySheet>(sql`
    select r.id, r.stage, ${isoInstant(sql`r.taken_at`)} as "takenAt", r.job_id as "jobId",
           r.humidity_percent as "humidityPercent", ${soundedPitch(shopId)} as cents
      from reading_sheet r
     where r.shop_id = ${shopId} and r.instrument_id = ${instrumentId} and r.archived_at is null
     order by r.taken_at desc limit ${mostSheets}`);
  return [...rows];
}

/** The same for a customer's session, which reads no sheet: what own_sheets lets it know of its own. */
export async function ownHistorySheets(db: Handle, instrumentId: string): Promise<HistorySheet[]> {
  const rows = await db.execute<HistorySheet>(sql`
    select id, stage, ${isoInstant(sql`taken_at`)} as "takenAt", job_id as "jobId",
           humidity_percent as "humidityPercent", cents
      from own_sheets(${instrumentId})`);
  return [...rows];
}

export type InstrumentVisit = {
  jobId: string;
  visitId: string;
  startsLocal: string;
  state: VisitState;
  work: string;
  remarks: string | null;
  siteName: string;
  technicians: string[];
};

/** Every visit the instrument was part of, newest first. */
export async function visitsOfInstrument(
  db: Handle,
  shopId: string,
  instrumentId: string,
): Promise<InstrumentVisit[]> {
  const rows = await db.execute<InstrumentVisit>(sql`
    select j.id as "jobId", v.id as "visitId", v.starts_local::text as "startsLocal", v.state, j.work, j.remarks,
           coalesce(s.name, '') as "siteName",
           array(select t.name from technicians_of(array[v.id]) t order by t.name) as technicians
      from job j
      join visit v on v.shop_id = ${shopId} and v.id = j.visit_id
      left join site s on s.shop_id = ${shopId} and s.id = v.site_id
     where j.shop_id = ${shopId} and j.instrument_id = ${instrumentId}
     order by v.starts_local desc, v.id limit 500`);
  return [...rows];
}
