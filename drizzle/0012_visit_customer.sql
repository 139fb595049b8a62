ALTER TABLE "instrument_string" ADD COLUMN "version" integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE "visit" ADD COLUMN "customer_id" uuid;--> statement-breakpoint
-- Until now a visit was its site's customer's, whoever that is today.
UPDATE visit v SET customer_id = s.customer_id FROM site s WHERE s.shop_id = v.shop_id AND s.id = v.site_id;--> statement-breakpoint
ALTER TABLE "visit" ALTER COLUMN "customer_id" SET NOT NULL;--> statement-breakpoint
ALTER TABLE "visit" ADD CONSTRAINT "visit_shop_id_customer_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "visit_of_customer" ON "visit" USING btree ("shop_id","customer_id","starts_local");--> statement-breakpoint

-- Whether the instrument was the asking customer's on a day. A definer function, since a customer's session does
-- not see the holdings of others. Before the first holding the first holder counts: an instrument is often written
-- down after its first visit.
CREATE FUNCTION own_on(instrument uuid, on_day date) RETURNS boolean
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT coalesce((
    SELECT h.owner_id = nullif(current_setting('app.customer_id', true), '')::uuid
           AND (h.until IS NULL OR h.until > on_day)
      FROM instrument_holding h
     WHERE h.shop_id = nullif(current_setting('app.shop_id', true), '')::uuid AND h.instrument_id = instrument
     ORDER BY h.since > on_day, CASE WHEN h.since <= on_day THEN h.since END DESC, h.since
     LIMIT 1), false)
$$;--> statement-breakpoint

-- What a customer may know of the readings of an instrument it owns: when, how humid, and how far from pitch the
-- whole stood; no note, no partial. A sheet of a visit goes with that visit's customer.
CREATE FUNCTION own_sheets(instrument uuid)
  RETURNS TABLE (id uuid, stage stage, taken_at timestamptz, job_id uuid, humidity_percent double precision,
    cents double precision)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT r.id, r.stage, r.taken_at, r.job_id, r.humidity_percent,
         -- As db/queries/sounded-pitch.ts.
         (SELECT coalesce(
                   percentile_cont(0.5) WITHIN GROUP (ORDER BY k.cents) FILTER (WHERE k.midi BETWEEN 45 AND 81),
                   percentile_cont(0.5) WITHIN GROUP (ORDER BY k.cents))
            FROM (SELECT n.midi, avg(1200 * ln(n.f1_hz / (r.reference_hz * power(2, (n.midi - 69) / 12.0))) / ln(2)) AS cents
                    FROM note_reading n WHERE n.shop_id = r.shop_id AND n.sheet_id = r.id GROUP BY n.midi) k)
    FROM reading_sheet r
    JOIN shop s ON s.id = r.shop_id
    JOIN instrument_holding h ON h.shop_id = r.shop_id AND h.instrument_id = r.instrument_id AND h.until IS NULL
    LEFT JOIN job j ON j.shop_id = r.shop_id AND j.id = r.job_id
    LEFT JOIN visit v ON v.shop_id = r.shop_id AND v.id = j.visit_id
   WHERE r.shop_id = nullif(current_setting('app.shop_id', true), '')::uuid
     AND r.instrument_id = instrument AND r.archived_at IS NULL
     AND h.owner_id = nullif(current_setting('app.customer_id', true), '')::uuid
     AND (v.id IS NULL OR v.customer_id = h.owner_id)
     AND own_on(instrument, coalesce(v.starts_local, r.taken_at AT TIME ZONE s.time_zone)::date)
   ORDER BY r.taken_at DESC LIMIT 200
$$;--> statement-breakpoint

CREATE OR REPLACE FUNCTION technicians_of(visits uuid[])
  RETURNS TABLE (visit_id uuid, member_id uuid, name text)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT t.visit_id, t.member_id, m.name
    FROM visit_technician t
    JOIN visit v ON v.shop_id = t.shop_id AND v.id = t.visit_id
    JOIN member m ON m.shop_id = t.shop_id AND m.id = t.member_id
   WHERE t.shop_id = nullif(current_setting('app.shop_id', true), '')::uuid
     AND t.visit_id = ANY (visits)
     AND (nullif(current_setting('app.customer_id', true), '') IS NULL
       OR v.customer_id = nullif(current_setting('app.customer_id', true), '')::uuid)
   ORDER BY m.name, m.id
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION own_on(uuid, date), own_sheets(uuid) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION own_on(uuid, date), own_sheets(uuid) TO agraffe_app;--> statement-breakpoint
ALTER POLICY "job_read" ON "job" TO agraffe_app USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and ((case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null) or exists (select 1 from visit v where v.shop_id = job.shop_id and v.id = job.visit_id
        and own_on(job.instrument_id, v.starts_local::date))));--> statement-breakpoint
ALTER POLICY "visit_read" ON "visit" TO agraffe_app USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and ((case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null) or customer_id = nullif(current_setting('app.customer_id', true), '')::uuid));
