import { sql } from "drizzle-orm";
import type { Handle } from "@/db/client";

/** The newest customer and site in use, and whether any instrument is: what a book begins with. */
export async function firstRecords(db: Handle, shopId: string) {
  const [row] = await db.execute<{
    customerId: string | null;
    siteId: string | null;
    instruments: boolean;
  }>(sql`
    select (select c.id from customer c where c.shop_id = ${shopId} and c.archived_at is null
             order by c.updated_at desc limit 1) as "customerId",
           (select s.id from site s where s.shop_id = ${shopId} and s.archived_at is null
             order by s.updated_at desc limit 1) as "siteId",
           exists (select 1 from instrument i where i.shop_id = ${shopId} and i.archived_at is null) as instruments`);
  return row ?? { customerId: null, siteId: null, instruments: false };
}
