CREATE TYPE "public"."interval_unit" AS ENUM('week', 'month');--> statement-breakpoint
CREATE TYPE "public"."rhythm_kind" AS ENUM('interval', 'months', 'events');--> statement-breakpoint
CREATE TABLE "service_plan" (
	"shop_id" uuid NOT NULL,
	"instrument_id" uuid NOT NULL,
	"rhythm" "rhythm_kind" NOT NULL,
	"every" smallint,
	"unit" interval_unit,
	"months" smallint[],
	"days_before" smallint,
	"starts_on" date NOT NULL,
	"served_before" date,
	"rests" boolean DEFAULT false NOT NULL,
	"rests_until" date,
	"technician_id" uuid,
	"weekdays" smallint[] DEFAULT '{}' NOT NULL,
	"hours_from" smallint,
	"hours_until" smallint,
	"work" text DEFAULT 'Tuning' NOT NULL,
	"work_minutes" smallint DEFAULT 90 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "service_plan_shop_id_instrument_id_pk" PRIMARY KEY("shop_id","instrument_id"),
	CONSTRAINT "service_plan_rhythm_whole" CHECK (coalesce(case "service_plan"."rhythm"
        when 'interval' then "service_plan"."every" between 1 and 120 and "service_plan"."unit" is not null
        when 'months' then cardinality("service_plan"."months") between 1 and 12 and "service_plan"."months" <@ '{1,2,3,4,5,6,7,8,9,10,11,12}'
        else "service_plan"."days_before" between 0 and 60
      end, false)),
	CONSTRAINT "service_plan_weekdays" CHECK ("service_plan"."weekdays" <@ '{1,2,3,4,5,6,7}'),
	CONSTRAINT "service_plan_hours" CHECK (("service_plan"."hours_from" is null) = ("service_plan"."hours_until" is null)
        and ("service_plan"."hours_from" is null or ("service_plan"."hours_from" >= 0 and "service_plan"."hours_from" < "service_plan"."hours_until" and "service_plan"."hours_until" <= 1440))),
	CONSTRAINT "service_plan_work_minutes" CHECK ("service_plan"."work_minutes" between 15 and 720),
	CONSTRAINT "service_plan_rest" CHECK ("service_plan"."rests" or "service_plan"."rests_until" is null)
);
--> statement-breakpoint
ALTER TABLE "service_plan" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "site_event" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"day" date NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "site_event_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "site_event_name_not_blank" CHECK (btrim("site_event"."name") <> '')
);
--> statement-breakpoint
ALTER TABLE "site_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "service_plan" ADD CONSTRAINT "service_plan_shop_id_instrument_id_instrument_shop_id_id_fk" FOREIGN KEY ("shop_id","instrument_id") REFERENCES "public"."instrument"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "service_plan" ADD CONSTRAINT "service_plan_shop_id_technician_id_member_shop_id_id_fk" FOREIGN KEY ("shop_id","technician_id") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site_event" ADD CONSTRAINT "site_event_shop_id_site_id_site_shop_id_id_fk" FOREIGN KEY ("shop_id","site_id") REFERENCES "public"."site"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "site_event_of_site" ON "site_event" USING btree ("shop_id","site_id","day");--> statement-breakpoint
CREATE POLICY "service_plan_read" ON "service_plan" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "service_plan_insert" ON "service_plan" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "service_plan_update" ON "service_plan" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "service_plan_delete" ON "service_plan" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "site_event_read" ON "site_event" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "site_event_insert" ON "site_event" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "site_event_update" ON "site_event" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);--> statement-breakpoint
CREATE POLICY "site_event_delete" ON "site_event" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null);