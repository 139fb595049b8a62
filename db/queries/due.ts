import { sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import type { InstrumentRow } from "@/lib/instruments/schema";

/** All that decides what is due, one row for each instrument in use that has a service plan. */
export type DueRow = {
  instrumentId: string;
  instrument: string;
  kind: InstrumentRow["kind"];
  room: string;
  siteId: string;
  site: string;
  city: string;
  customerId: string;
  customer: string;
  rhythm: "interval" | "months" | "events";
  every: number | null;
  unit: "week" | "month" | null;
  months: number[] | null;
  daysBefore: number | null;
  startsOn: string;
  rests: boolean;
  restsUntil: string | null;
  technicianId: string | null;
  technician: string | null;
  workMinutes: number;
  lastServed: string | null;
  bookedOn: string | null;
  bookedVisitId: string | null;
  declinedOn: string | null;
  events: string[] | null;
};

/**
 * One pass over the shop's jobs tells when each instrument was last served, is booked next and was last
 * declined. Read whole: the order of a due list is known only when every window has been computed.
 */
export async function dueRows(db: Handle, shopId: string, today: string): Promise<DueRow[]> {
  const rows = await db.execute<DueRow>(sql`
    with told as (
      select j.instrument_id,
        max(v.ends_local::date) filter (where v.state in ('done', 'closed')) as last_served,
        min(v.starts_local) filter (where v.state in ('offered', 'confirmed', 'on-the-way', 'in-progress')) as booked,
        (array_agg(v.id order by v.starts_local)
          filter (where v.state in ('offered', 'confirmed', 'on-the-way', 'in-progress')))[1] as booked_id,
        max(e.at) as declined
      from job j
      join visit v on v.shop_id = j.shop_id and v.id = j.visit_id
      left join visit_event e on v.state = 'declined' and e.to_state = 'declined'
        and e.shop_id = v.shop_id and e.visit_id = v.id
      where j.shop_id = ${shopId} and v.shop_id = ${shopId}
      group by j.instrument_id
    ), to_come as (
      select e.site_id, array_agg(e.day::text order by e.day) as days
      from site_event e
      where e.shop_id = ${shopId} and e.day >= ${today}
      group by e.site_id
    )
    select i.id as "instrumentId", i.name as instrument, i.kind, i.room,
      s.id as "siteId", s.name as site, s.city, c.id as "customerId", c.name as customer,
      p.rhythm, p.every, p.unit, p.months, p.days_before as "daysBefore",
      p.starts_on::text as "startsOn", p.rests, p.rests_until::text as "restsUntil",
      p.technician_id as "technicianId", m.name as technician, p.work_minutes as "workMinutes",
      greatest(t.last_served, p.served_before)::text as "lastServed",
      t.booked::date::text as "bookedOn", t.booked_id as "bookedVisitId",
      (t.declined at time zone s.time_zone)::date::text as "declinedOn",
      e.days as events
    from service_plan p
    join instrument i on i.shop_id = p.shop_id and i.id = p.instrument_id and i.archived_at is null
    join instrument_holding h on h.shop_id = i.shop_id and h.instrument_id = i.id and h.until is null
    join site s on s.shop_id = h.shop_id and s.id = h.site_id
    join customer c on c.shop_id = h.shop_id and c.id = h.owner_id
    left join member m on m.shop_id = p.shop_id and m.id = p.technician_id
    left join told t on t.instrument_id = i.id
    left join to_come e on e.site_id = s.id and p.rhythm = 'events'
    where p.shop_id = ${shopId}`);
  return [...rows];
}
