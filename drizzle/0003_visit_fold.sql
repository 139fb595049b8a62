ALTER TABLE "visit" ADD COLUMN "starts_fold" smallint DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "visit" ADD COLUMN "ends_fold" smallint DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "visit" ADD CONSTRAINT "visit_fold" CHECK ("visit"."starts_fold" in (0, 1) and "visit"."ends_fold" in (0, 1));--> statement-breakpoint

-- The instant of a wall time. Where clocks go back and it occurs twice, fold 0 is the first and 1 the second.
CREATE FUNCTION instant_of(wall timestamp, zone text, fold smallint) RETURNS timestamptz
  LANGUAGE plpgsql STABLE SET search_path = pg_catalog, public AS $$
DECLARE
  -- AT TIME ZONE takes the second of two; clocks never go back by as much as six hours.
  later timestamptz := wall AT TIME ZONE zone;
  before timestamptz := later - interval '6 hours';
  earlier timestamptz := (wall - ((before AT TIME ZONE zone) - (before AT TIME ZONE 'UTC'))) AT TIME ZONE 'UTC';
BEGIN
  IF fold = 0 AND earlier < later AND earlier AT TIME ZONE zone = wall THEN
    RETURN earlier;
  END IF;
  RETURN later;
END $$;--> statement-breakpoint

-- A wall time that the clocks jump over is refused when it is written, not when a visit written earlier
-- changes state: zone rules may change in between.
CREATE OR REPLACE FUNCTION visit_derive_during() RETURNS trigger LANGUAGE plpgsql SET search_path = pg_catalog, public AS $$
DECLARE
  starts timestamptz := instant_of(NEW.starts_local, NEW.time_zone, NEW.starts_fold);
  ends timestamptz := instant_of(NEW.ends_local, NEW.time_zone, NEW.ends_fold);
BEGIN
  IF (TG_OP = 'INSERT' OR (NEW.starts_local, NEW.ends_local, NEW.time_zone)
        IS DISTINCT FROM (OLD.starts_local, OLD.ends_local, OLD.time_zone))
     AND (starts AT TIME ZONE NEW.time_zone, ends AT TIME ZONE NEW.time_zone)
        IS DISTINCT FROM (NEW.starts_local, NEW.ends_local) THEN
    RAISE EXCEPTION 'The clocks jump over this time' USING ERRCODE = 'check_violation',
      CONSTRAINT = 'visit_time_exists';
  END IF;
  IF ends <= starts THEN
    RAISE EXCEPTION 'The visit has no length in its time zone' USING ERRCODE = 'check_violation',
      CONSTRAINT = 'visit_has_length';
  END IF;
  NEW.during := tstzrange(starts, ends, '[)');
  RETURN NEW;
END $$;--> statement-breakpoint

-- Names of who comes, for a customer's session too, which may not read the team.
CREATE FUNCTION technicians_of(visits uuid[])
  RETURNS TABLE (visit_id uuid, member_id uuid, name text)
  LANGUAGE sql STABLE SECURITY DEFINER SET search_path = pg_catalog, public AS $$
  SELECT t.visit_id, t.member_id, m.name
    FROM visit_technician t
    JOIN visit v ON v.shop_id = t.shop_id AND v.id = t.visit_id
    JOIN site s ON s.shop_id = v.shop_id AND s.id = v.site_id
    JOIN member m ON m.shop_id = t.shop_id AND m.id = t.member_id
   WHERE t.shop_id = nullif(current_setting('app.shop_id', true), '')::uuid
     AND t.visit_id = ANY (visits)
     AND (nullif(current_setting('app.customer_id', true), '') IS NULL
       OR s.customer_id = nullif(current_setting('app.customer_id', true), '')::uuid)
   ORDER BY m.name, m.id
$$;--> statement-breakpoint
REVOKE ALL ON FUNCTION technicians_of(uuid[]) FROM PUBLIC;--> statement-breakpoint
GRANT EXECUTE ON FUNCTION technicians_of(uuid[]) TO agraffe_app;
