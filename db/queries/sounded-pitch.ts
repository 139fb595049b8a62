import { type SQL, sql } from "drizzle-orm";

/**
 * How far the instrument of sheet `r` stood from its reference, cents: the median over the keys A2 to A5
 * where there are any, else over all, of the mean of each key's takes. As pitchOffset of lib/readings.
 */
export function soundedPitch(shopId: string): SQL<number | null> {
  return sql<number | null>`(
    select coalesce(
             percentile_cont(0.5) within group (order by k.cents) filter (where k.midi between 45 and 81),
             percentile_cont(0.5) within group (order by k.cents))
      from (
        select n.midi, avg(1200 * ln(n.f1_hz / (r.reference_hz * power(2, (n.midi - 69) / 12.0))) / ln(2)) as cents
          from note_reading n where n.shop_id = ${shopId} and n.sheet_id = r.id group by n.midi
      ) k)`;
}
