import { inArray, sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { instrument } from "@/db/schema";
import type { InstrumentRow } from "@/lib/instruments/schema";

/** All that decides whether an instrument in use is due. */
export type DueFactsRow = {
  instrumentId: string;
  kind: InstrumentRow["kind"];
  rhythm: "interval" | "months" | "events";
  every: number | null;
  unit: "week" | "month" | null;
  months: number[] | null;
  daysBefore: number | null;
  startsOn: string;
  rests: boolean;
  restsUntil: string | null;
  technicianId: string | null;
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
export async function dueFacts(
  db: Handle,
  shopId: string,
  { today, timeZone }: { today: string; timeZone: string },
): Promise<DueFactsRow[]> {
  const rows = await db.execute<DueFactsRow>(sql`
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
      select h.instrument_id, array_agg(e.day::text order by e.day) as days
      from site_event e
      join instrument_holding h on h.shop_id = e.shop_id and h.site_id = e.site_id and h.until is null
      where e.shop_id = ${shopId} and e.day >= ${today}
      group by h.instrument_id
    )
    select p.instrument_id as "instrumentId", i.kind,
      p.rhythm, p.every, p.unit, p.months, p.days_before as "daysBefore",
      p.starts_on::text as "startsOn", p.rests, p.rests_until::text as "restsUntil",
      p.technician_id as "technicianId", p.work_minutes as "workMinutes",
      greatest(t.last_served, p.served_before)::text as "lastServed",
      t.booked::date::text as "bookedOn", t.booked_id as "bookedVisitId",
      (t.declined at time zone ${timeZone})::date::text as "declinedOn",
      e.days as events
    from service_plan p
    join instrument i on i.shop_id = p.shop_id and i.id = p.instrument_id and i.archived_at is null
    left join told t on t.instrument_id = p.instrument_id
    left join to_come e on e.instrument_id = p.instrument_id and p.rhythm = 'events'
    where p.shop_id = ${shopId}`);
  return [...rows];
}

/** What a due instrument is called, where it stands and whose it is. */
export type DueNamesRow = {
  instrumentId: string;
  instrument: string;
  room: string;
  siteId: string;
  site: string;
  city: string;
  customerId: string;
  customer: string;
  technician: string | null;
};

export async function dueNames(
  db: Handle,
  shopId: string,
  instrumentIds: readonly string[],
): Promise<DueNamesRow[]> {
  if (instrumentIds.length === 0) return [];
  const rows = await db.execute<DueNamesRow>(sql`
    select instrument.id as "instrumentId", instrument.name as instrument, instrument.room,
      s.id as "siteId", s.name as site, s.city, c.id as "customerId", c.name as customer,
      m.name as technician
    from instrument
    join instrument_holding h on h.shop_id = instrument.shop_id and h.instrument_id = instrument.id and h.until is null
    join site s on s.shop_id = h.shop_id and s.id = h.site_id
    join customer c on c.shop_id = h.shop_id and c.id = h.owner_id
    left join service_plan p on p.shop_id = instrument.shop_id and p.instrument_id = instrument.id
    left join member m on m.shop_id = p.shop_id and m.id = p.technician_id
    where instrument.shop_id = ${shopId} and ${inArray(instrument.id, [...instrumentIds])}`);
  return [...rows];
}
