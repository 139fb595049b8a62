CREATE SCHEMA "auth";
--> statement-breakpoint
CREATE TYPE "public"."customer_kind" AS ENUM('person', 'organisation');--> statement-breakpoint
CREATE TYPE "public"."instrument_kind" AS ENUM('grand', 'upright', 'square', 'other');--> statement-breakpoint
CREATE TYPE "public"."stage" AS ENUM('as-found', 'after-raise', 'as-left');--> statement-breakpoint
CREATE TYPE "public"."role" AS ENUM('owner', 'office', 'technician', 'customer');--> statement-breakpoint
CREATE TYPE "public"."visit_state" AS ENUM('offered', 'confirmed', 'on-the-way', 'in-progress', 'done', 'closed', 'declined', 'moved', 'cancelled', 'missed');--> statement-breakpoint
CREATE TABLE "auth"."account" (
	"id" uuid PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"account_id" text NOT NULL,
	"provider_id" text NOT NULL,
	"access_token" text,
	"refresh_token" text,
	"id_token" text,
	"access_token_expires_at" timestamp with time zone,
	"refresh_token_expires_at" timestamp with time zone,
	"scope" text,
	"password" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "auth"."person" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"email_verified" boolean DEFAULT false NOT NULL,
	"image" text,
	"two_factor_enabled" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "person_email_unique" UNIQUE("email")
);
--> statement-breakpoint
CREATE TABLE "auth"."rate_limit" (
	"id" uuid PRIMARY KEY NOT NULL,
	"key" text NOT NULL,
	"count" integer NOT NULL,
	"last_request" bigint NOT NULL,
	CONSTRAINT "rate_limit_key_unique" UNIQUE("key")
);
--> statement-breakpoint
CREATE TABLE "auth"."session" (
	"id" uuid PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"token" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"ip_address" text,
	"user_agent" text,
	"shop_id" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "session_token_unique" UNIQUE("token")
);
--> statement-breakpoint
CREATE TABLE "auth"."two_factor" (
	"id" uuid PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"secret" text NOT NULL,
	"backup_codes" text NOT NULL,
	"verified" boolean DEFAULT true,
	"failed_verification_count" integer DEFAULT 0,
	"locked_until" timestamp with time zone
);
--> statement-breakpoint
CREATE TABLE "auth"."verification" (
	"id" uuid PRIMARY KEY NOT NULL,
	"identifier" text NOT NULL,
	"value" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "customer" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"kind" "customer_kind" DEFAULT 'person' NOT NULL,
	"name" text NOT NULL,
	"contact_name" text,
	"email" text,
	"phone" text,
	"notes" text,
	"search_text" text GENERATED ALWAYS AS (lower(name || ' ' || coalesce(contact_name, '') || ' ' || coalesce(email, '') || ' ' || coalesce(phone, '') || ' ' || regexp_replace(coalesce(phone, ''), '[^0-9]', '', 'g'))) STORED NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "customer_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "customer_name_not_blank" CHECK (btrim("customer"."name") <> '')
);
--> statement-breakpoint
ALTER TABLE "customer" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "site" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"customer_id" uuid NOT NULL,
	"name" text NOT NULL,
	"street" text DEFAULT '' NOT NULL,
	"postal_code" text DEFAULT '' NOT NULL,
	"city" text DEFAULT '' NOT NULL,
	"country" char(2) NOT NULL,
	"time_zone" text NOT NULL,
	"latitude" double precision,
	"longitude" double precision,
	"access_notes" text,
	"search_text" text GENERATED ALWAYS AS (lower(name || ' ' || street || ' ' || postal_code || ' ' || city)) STORED NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "site_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "site_name_not_blank" CHECK (btrim("site"."name") <> ''),
	CONSTRAINT "site_position_whole" CHECK (("site"."latitude" is null) = ("site"."longitude" is null)
        and ("site"."latitude" is null or ("site"."latitude" between -90 and 90 and "site"."longitude" between -180 and 180)))
);
--> statement-breakpoint
ALTER TABLE "site" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "instrument" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"maker" text NOT NULL,
	"model" text DEFAULT '' NOT NULL,
	"serial" text DEFAULT '' NOT NULL,
	"year" smallint,
	"kind" "instrument_kind" NOT NULL,
	"room" text DEFAULT '' NOT NULL,
	"first_midi" smallint DEFAULT 21 NOT NULL,
	"last_midi" smallint DEFAULT 108 NOT NULL,
	"break_midi" smallint,
	"reference_hz" double precision DEFAULT 440 NOT NULL,
	"temperament" jsonb DEFAULT '"equal"'::jsonb NOT NULL,
	"standing_note" text,
	"search_text" text GENERATED ALWAYS AS (lower(maker || ' ' || model || ' ' || serial || ' ' || regexp_replace(serial, '[^0-9A-Za-z]', '', 'g') || ' ' || room)) STORED NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "instrument_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "instrument_maker_not_blank" CHECK (btrim("instrument"."maker") <> ''),
	CONSTRAINT "instrument_year_plausible" CHECK ("instrument"."year" between 1700 and 2100),
	CONSTRAINT "instrument_key_range" CHECK ("instrument"."first_midi" between 9 and 60 and "instrument"."last_midi" between 72 and 120),
	CONSTRAINT "instrument_break_inside" CHECK ("instrument"."break_midi" > "instrument"."first_midi" and "instrument"."break_midi" <= "instrument"."last_midi"),
	CONSTRAINT "instrument_reference_plausible" CHECK ("instrument"."reference_hz" between 380 and 480)
);
--> statement-breakpoint
ALTER TABLE "instrument" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "instrument_holding" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"instrument_id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"owner_id" uuid NOT NULL,
	"payer_id" uuid,
	"booking_contact_id" uuid,
	"since" date NOT NULL,
	"until" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "instrument_holding_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "instrument_holding_order" CHECK ("instrument_holding"."until" is null or "instrument_holding"."until" >= "instrument_holding"."since")
);
--> statement-breakpoint
ALTER TABLE "instrument_holding" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "instrument_string" (
	"shop_id" uuid NOT NULL,
	"instrument_id" uuid NOT NULL,
	"midi" smallint NOT NULL,
	"strings" smallint NOT NULL,
	"wound" boolean NOT NULL,
	"speaking_length_mm" double precision,
	"diameter_mm" double precision,
	"outer_diameter_mm" double precision,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "instrument_string_shop_id_instrument_id_midi_pk" PRIMARY KEY("shop_id","instrument_id","midi"),
	CONSTRAINT "instrument_string_count" CHECK ("instrument_string"."strings" between 1 and 5),
	CONSTRAINT "instrument_string_length" CHECK ("instrument_string"."speaking_length_mm" > 0 and "instrument_string"."speaking_length_mm" < 3000),
	CONSTRAINT "instrument_string_diameter" CHECK ("instrument_string"."diameter_mm" > 0.2 and "instrument_string"."diameter_mm" < 3),
	CONSTRAINT "instrument_string_wrap" CHECK ("instrument_string"."outer_diameter_mm" is null or ("instrument_string"."wound" and "instrument_string"."outer_diameter_mm" > "instrument_string"."diameter_mm"))
);
--> statement-breakpoint
ALTER TABLE "instrument_string" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "stretch_plan" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"sheet_id" uuid NOT NULL,
	"job_id" uuid,
	"style_name" text NOT NULL,
	"style" jsonb NOT NULL,
	"temperament" jsonb NOT NULL,
	"reference_hz" double precision NOT NULL,
	"first_midi" smallint NOT NULL,
	"stretch_cents" double precision[] NOT NULL,
	"band_cents" double precision[] NOT NULL,
	"target_hz" double precision[] NOT NULL,
	"listen_partial" smallint[] NOT NULL,
	"listen_hz" double precision[] NOT NULL,
	"b" double precision[] NOT NULL,
	"ln_b_sigma" double precision[] NOT NULL,
	"computation_version" integer NOT NULL,
	"superseded_at" timestamp with time zone,
	"made_by" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "stretch_plan_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "stretch_plan_in_step" CHECK (cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."band_cents")
        and cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."target_hz")
        and cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."listen_partial")
        and cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."listen_hz")
        and cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."b")
        and cardinality("stretch_plan"."stretch_cents") = cardinality("stretch_plan"."ln_b_sigma")
        and cardinality("stretch_plan"."stretch_cents") between 1 and 120)
);
--> statement-breakpoint
ALTER TABLE "stretch_plan" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "note_reading" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"sheet_id" uuid NOT NULL,
	"midi" smallint NOT NULL,
	"string" smallint DEFAULT 0 NOT NULL,
	"take" smallint DEFAULT 1 NOT NULL,
	"partials" smallint[] NOT NULL,
	"hz" double precision[] NOT NULL,
	"sigma_cents" double precision[] NOT NULL,
	"kept" smallint[] DEFAULT '{}' NOT NULL,
	"dropped" smallint[] DEFAULT '{}' NOT NULL,
	"f1_hz" double precision NOT NULL,
	"b" double precision,
	"b_sigma" double precision,
	"fit" jsonb NOT NULL,
	"fit_version" integer NOT NULL,
	"taken_by" uuid,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "note_reading_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "note_reading_midi" CHECK ("note_reading"."midi" between 9 and 120),
	CONSTRAINT "note_reading_string" CHECK ("note_reading"."string" between 0 and 5 and "note_reading"."take" between 1 and 99),
	CONSTRAINT "note_reading_in_step" CHECK (cardinality("note_reading"."partials") between 1 and 64
        and cardinality("note_reading"."partials") = cardinality("note_reading"."hz")
        and cardinality("note_reading"."partials") = cardinality("note_reading"."sigma_cents")),
	CONSTRAINT "note_reading_positive" CHECK (0 < all ("note_reading"."hz") and 'Infinity' > all ("note_reading"."hz") and 0 < all ("note_reading"."partials") and "note_reading"."f1_hz" > 0)
);
--> statement-breakpoint
ALTER TABLE "note_reading" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reading_sheet" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"instrument_id" uuid NOT NULL,
	"job_id" uuid,
	"stage" "stage" NOT NULL,
	"taken_at" timestamp with time zone NOT NULL,
	"taken_by" uuid,
	"reference_hz" double precision NOT NULL,
	"humidity_percent" double precision,
	"temperature_c" double precision,
	"remarks" text,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "reading_sheet_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "reading_sheet_reference_plausible" CHECK ("reading_sheet"."reference_hz" between 380 and 480),
	CONSTRAINT "reading_sheet_humidity" CHECK ("reading_sheet"."humidity_percent" between 0 and 100),
	CONSTRAINT "reading_sheet_temperature" CHECK ("reading_sheet"."temperature_c" between -30 and 60)
);
--> statement-breakpoint
ALTER TABLE "reading_sheet" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "house_style" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"name" text NOT NULL,
	"intervals" jsonb NOT NULL,
	"smoothness" double precision NOT NULL,
	"tolerance_cents" double precision DEFAULT 1 NOT NULL,
	"archived_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "house_style_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "house_style_smoothness" CHECK ("house_style"."smoothness" >= 0),
	CONSTRAINT "house_style_tolerance" CHECK ("house_style"."tolerance_cents" > 0)
);
--> statement-breakpoint
ALTER TABLE "house_style" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "invitation" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"email" text NOT NULL,
	"role" "role" NOT NULL,
	"customer_id" uuid,
	"token_hash" text NOT NULL,
	"invited_by" uuid NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"accepted_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "invitation_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "invitation_token_hash_unique" UNIQUE("token_hash"),
	CONSTRAINT "invitation_customer_named" CHECK (("invitation"."role" = 'customer') = ("invitation"."customer_id" is not null))
);
--> statement-breakpoint
ALTER TABLE "invitation" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "member" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" "role" NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"customer_id" uuid,
	"bookable" boolean DEFAULT false NOT NULL,
	"ended_at" timestamp with time zone,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "member_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "member_customer_named" CHECK (("member"."role" = 'customer') = ("member"."customer_id" is not null)),
	CONSTRAINT "member_customer_not_bookable" CHECK (not ("member"."role" = 'customer' and "member"."bookable"))
);
--> statement-breakpoint
ALTER TABLE "member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "request_count" (
	"key" text PRIMARY KEY NOT NULL,
	"window_ends" timestamp with time zone NOT NULL,
	"count" integer NOT NULL
);
--> statement-breakpoint
CREATE TABLE "shop" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"time_zone" text NOT NULL,
	"country" char(2) NOT NULL,
	"currency" char(3) NOT NULL,
	"locale" text DEFAULT 'en-GB' NOT NULL,
	"reference_hz" double precision DEFAULT 440 NOT NULL,
	"default_style" text DEFAULT 'even' NOT NULL,
	"demo" boolean DEFAULT false NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "shop_name_not_blank" CHECK (btrim("shop"."name") <> ''),
	CONSTRAINT "shop_reference_plausible" CHECK ("shop"."reference_hz" between 380 and 480)
);
--> statement-breakpoint
ALTER TABLE "shop" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "job" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"visit_id" uuid NOT NULL,
	"instrument_id" uuid NOT NULL,
	"work" text DEFAULT 'Tuning' NOT NULL,
	"position" smallint DEFAULT 0 NOT NULL,
	"remarks" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "job_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "job" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "visit" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"site_id" uuid NOT NULL,
	"state" "visit_state" DEFAULT 'offered' NOT NULL,
	"starts_local" timestamp NOT NULL,
	"ends_local" timestamp NOT NULL,
	"time_zone" text NOT NULL,
	"during" "tstzrange" DEFAULT 'empty' NOT NULL,
	"moved_to_id" uuid,
	"answers_visit_id" uuid,
	"notes" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	CONSTRAINT "visit_shop_id_id_pk" PRIMARY KEY("shop_id","id"),
	CONSTRAINT "visit_ends_after_start" CHECK ("visit"."ends_local" > "visit"."starts_local"),
	CONSTRAINT "visit_within_a_day" CHECK ("visit"."ends_local" <= "visit"."starts_local" + interval '24 hours')
);
--> statement-breakpoint
ALTER TABLE "visit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "visit_event" (
	"shop_id" uuid NOT NULL,
	"id" uuid NOT NULL,
	"visit_id" uuid NOT NULL,
	"from_state" "visit_state",
	"to_state" "visit_state" NOT NULL,
	"by_member_id" uuid,
	"reason" text,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "visit_event_shop_id_id_pk" PRIMARY KEY("shop_id","id")
);
--> statement-breakpoint
ALTER TABLE "visit_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "visit_technician" (
	"shop_id" uuid NOT NULL,
	"visit_id" uuid NOT NULL,
	"member_id" uuid NOT NULL,
	"during" "tstzrange" DEFAULT 'empty' NOT NULL,
	"live" boolean DEFAULT true NOT NULL,
	CONSTRAINT "visit_technician_shop_id_visit_id_member_id_pk" PRIMARY KEY("shop_id","visit_id","member_id")
);
--> statement-breakpoint
ALTER TABLE "visit_technician" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "auth"."account" ADD CONSTRAINT "account_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "auth"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."session" ADD CONSTRAINT "session_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "auth"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "auth"."two_factor" ADD CONSTRAINT "two_factor_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "auth"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "customer" ADD CONSTRAINT "customer_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "site" ADD CONSTRAINT "site_shop_id_customer_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","customer_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument" ADD CONSTRAINT "instrument_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_holding" ADD CONSTRAINT "instrument_holding_shop_id_instrument_id_instrument_shop_id_id_fk" FOREIGN KEY ("shop_id","instrument_id") REFERENCES "public"."instrument"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_holding" ADD CONSTRAINT "instrument_holding_shop_id_site_id_site_shop_id_id_fk" FOREIGN KEY ("shop_id","site_id") REFERENCES "public"."site"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_holding" ADD CONSTRAINT "instrument_holding_shop_id_owner_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","owner_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_holding" ADD CONSTRAINT "instrument_holding_shop_id_payer_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","payer_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_holding" ADD CONSTRAINT "instrument_holding_shop_id_booking_contact_id_customer_shop_id_id_fk" FOREIGN KEY ("shop_id","booking_contact_id") REFERENCES "public"."customer"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument_string" ADD CONSTRAINT "instrument_string_shop_id_instrument_id_instrument_shop_id_id_fk" FOREIGN KEY ("shop_id","instrument_id") REFERENCES "public"."instrument"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stretch_plan" ADD CONSTRAINT "stretch_plan_shop_id_sheet_id_reading_sheet_shop_id_id_fk" FOREIGN KEY ("shop_id","sheet_id") REFERENCES "public"."reading_sheet"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stretch_plan" ADD CONSTRAINT "stretch_plan_shop_id_job_id_job_shop_id_id_fk" FOREIGN KEY ("shop_id","job_id") REFERENCES "public"."job"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stretch_plan" ADD CONSTRAINT "stretch_plan_shop_id_made_by_member_shop_id_id_fk" FOREIGN KEY ("shop_id","made_by") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "note_reading" ADD CONSTRAINT "note_reading_shop_id_sheet_id_reading_sheet_shop_id_id_fk" FOREIGN KEY ("shop_id","sheet_id") REFERENCES "public"."reading_sheet"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "note_reading" ADD CONSTRAINT "note_reading_shop_id_taken_by_member_shop_id_id_fk" FOREIGN KEY ("shop_id","taken_by") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_sheet" ADD CONSTRAINT "reading_sheet_shop_id_instrument_id_instrument_shop_id_id_fk" FOREIGN KEY ("shop_id","instrument_id") REFERENCES "public"."instrument"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_sheet" ADD CONSTRAINT "reading_sheet_shop_id_job_id_job_shop_id_id_fk" FOREIGN KEY ("shop_id","job_id") REFERENCES "public"."job"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_sheet" ADD CONSTRAINT "reading_sheet_shop_id_taken_by_member_shop_id_id_fk" FOREIGN KEY ("shop_id","taken_by") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "house_style" ADD CONSTRAINT "house_style_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitation" ADD CONSTRAINT "invitation_shop_id_invited_by_member_shop_id_id_fk" FOREIGN KEY ("shop_id","invited_by") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "member" ADD CONSTRAINT "member_shop_id_shop_id_fk" FOREIGN KEY ("shop_id") REFERENCES "public"."shop"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_shop_id_visit_id_visit_shop_id_id_fk" FOREIGN KEY ("shop_id","visit_id") REFERENCES "public"."visit"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_shop_id_instrument_id_instrument_shop_id_id_fk" FOREIGN KEY ("shop_id","instrument_id") REFERENCES "public"."instrument"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit" ADD CONSTRAINT "visit_shop_id_site_id_site_shop_id_id_fk" FOREIGN KEY ("shop_id","site_id") REFERENCES "public"."site"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit" ADD CONSTRAINT "visit_shop_id_moved_to_id_visit_shop_id_id_fk" FOREIGN KEY ("shop_id","moved_to_id") REFERENCES "public"."visit"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit" ADD CONSTRAINT "visit_shop_id_answers_visit_id_visit_shop_id_id_fk" FOREIGN KEY ("shop_id","answers_visit_id") REFERENCES "public"."visit"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit_event" ADD CONSTRAINT "visit_event_shop_id_visit_id_visit_shop_id_id_fk" FOREIGN KEY ("shop_id","visit_id") REFERENCES "public"."visit"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit_event" ADD CONSTRAINT "visit_event_shop_id_by_member_id_member_shop_id_id_fk" FOREIGN KEY ("shop_id","by_member_id") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit_technician" ADD CONSTRAINT "visit_technician_shop_id_visit_id_visit_shop_id_id_fk" FOREIGN KEY ("shop_id","visit_id") REFERENCES "public"."visit"("shop_id","id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "visit_technician" ADD CONSTRAINT "visit_technician_shop_id_member_id_member_shop_id_id_fk" FOREIGN KEY ("shop_id","member_id") REFERENCES "public"."member"("shop_id","id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "account_person" ON "auth"."account" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "session_person" ON "auth"."session" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "two_factor_person" ON "auth"."two_factor" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "verification_identifier" ON "auth"."verification" USING btree ("identifier");--> statement-breakpoint
CREATE INDEX "customer_by_name" ON "customer" USING btree ("shop_id",lower(name),"id");--> statement-breakpoint
CREATE INDEX "customer_by_change" ON "customer" USING btree ("shop_id","updated_at","id");--> statement-breakpoint
CREATE INDEX "customer_search" ON "customer" USING gin ("shop_id",search_text gin_trgm_ops);--> statement-breakpoint
CREATE INDEX "site_by_name" ON "site" USING btree ("shop_id",lower(name),"id");--> statement-breakpoint
CREATE INDEX "site_by_change" ON "site" USING btree ("shop_id","updated_at","id");--> statement-breakpoint
CREATE INDEX "site_of_customer" ON "site" USING btree ("shop_id","customer_id");--> statement-breakpoint
CREATE INDEX "site_search" ON "site" USING gin ("shop_id",search_text gin_trgm_ops);--> statement-breakpoint
CREATE INDEX "instrument_by_name" ON "instrument" USING btree ("shop_id",lower(maker || ' ' || model),"id");--> statement-breakpoint
CREATE INDEX "instrument_by_change" ON "instrument" USING btree ("shop_id","updated_at","id");--> statement-breakpoint
CREATE INDEX "instrument_search" ON "instrument" USING gin ("shop_id",search_text gin_trgm_ops);--> statement-breakpoint
CREATE UNIQUE INDEX "instrument_holding_open" ON "instrument_holding" USING btree ("shop_id","instrument_id") WHERE until is null;--> statement-breakpoint
CREATE INDEX "instrument_holding_site" ON "instrument_holding" USING btree ("shop_id","site_id") WHERE until is null;--> statement-breakpoint
CREATE INDEX "instrument_holding_owner" ON "instrument_holding" USING btree ("shop_id","owner_id") WHERE until is null;--> statement-breakpoint
CREATE UNIQUE INDEX "stretch_plan_of_job" ON "stretch_plan" USING btree ("shop_id","job_id") WHERE job_id is not null and superseded_at is null;--> statement-breakpoint
CREATE INDEX "stretch_plan_of_sheet" ON "stretch_plan" USING btree ("shop_id","sheet_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "note_reading_take" ON "note_reading" USING btree ("shop_id","sheet_id","midi","string","take");--> statement-breakpoint
CREATE INDEX "reading_sheet_of_instrument" ON "reading_sheet" USING btree ("shop_id","instrument_id","taken_at");--> statement-breakpoint
CREATE INDEX "reading_sheet_of_job" ON "reading_sheet" USING btree ("shop_id","job_id");--> statement-breakpoint
CREATE UNIQUE INDEX "house_style_name" ON "house_style" USING btree ("shop_id",lower(name)) WHERE archived_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "invitation_open" ON "invitation" USING btree ("shop_id",lower(email)) WHERE accepted_at is null and revoked_at is null;--> statement-breakpoint
CREATE UNIQUE INDEX "member_person" ON "member" USING btree ("shop_id","person_id") WHERE ended_at is null;--> statement-breakpoint
CREATE INDEX "member_of_person" ON "member" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "job_once_a_visit" ON "job" USING btree ("shop_id","visit_id","instrument_id");--> statement-breakpoint
CREATE INDEX "job_of_instrument" ON "job" USING btree ("shop_id","instrument_id");--> statement-breakpoint
CREATE INDEX "visit_by_start" ON "visit" USING btree ("shop_id","starts_local","id");--> statement-breakpoint
CREATE INDEX "visit_of_site" ON "visit" USING btree ("shop_id","site_id","starts_local");--> statement-breakpoint
CREATE INDEX "visit_event_visit" ON "visit_event" USING btree ("shop_id","visit_id","at");--> statement-breakpoint
CREATE INDEX "visit_technician_member" ON "visit_technician" USING btree ("shop_id","member_id");--> statement-breakpoint
CREATE POLICY "customer_read" ON "customer" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or id = nullif(current_setting('app.customer_id', true), '')::uuid));--> statement-breakpoint
CREATE POLICY "customer_insert" ON "customer" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "customer_update" ON "customer" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "customer_delete" ON "customer" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "site_read" ON "site" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or customer_id = nullif(current_setting('app.customer_id', true), '')::uuid));--> statement-breakpoint
CREATE POLICY "site_insert" ON "site" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "site_update" ON "site" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "site_delete" ON "site" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_read" ON "instrument" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or exists (select 1 from instrument_holding h where h.shop_id = instrument.shop_id
        and h.instrument_id = instrument.id and h.owner_id = nullif(current_setting('app.customer_id', true), '')::uuid and h.until is null)));--> statement-breakpoint
CREATE POLICY "instrument_insert" ON "instrument" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_update" ON "instrument" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_delete" ON "instrument" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_holding_read" ON "instrument_holding" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or (owner_id = nullif(current_setting('app.customer_id', true), '')::uuid and until is null)));--> statement-breakpoint
CREATE POLICY "instrument_holding_insert" ON "instrument_holding" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_holding_update" ON "instrument_holding" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_holding_delete" ON "instrument_holding" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_string_read" ON "instrument_string" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_string_insert" ON "instrument_string" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_string_update" ON "instrument_string" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "instrument_string_delete" ON "instrument_string" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "stretch_plan_read" ON "stretch_plan" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "stretch_plan_insert" ON "stretch_plan" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "stretch_plan_update" ON "stretch_plan" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "stretch_plan_delete" ON "stretch_plan" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "note_reading_read" ON "note_reading" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "note_reading_insert" ON "note_reading" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "note_reading_update" ON "note_reading" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "note_reading_delete" ON "note_reading" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "reading_sheet_read" ON "reading_sheet" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "reading_sheet_insert" ON "reading_sheet" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "reading_sheet_update" ON "reading_sheet" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "reading_sheet_delete" ON "reading_sheet" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "house_style_read" ON "house_style" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "house_style_insert" ON "house_style" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "house_style_update" ON "house_style" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "house_style_delete" ON "house_style" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "invitation_read" ON "invitation" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "invitation_insert" ON "invitation" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "invitation_update" ON "invitation" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "invitation_delete" ON "invitation" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "member_read" ON "member" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or customer_id = nullif(current_setting('app.customer_id', true), '')::uuid));--> statement-breakpoint
CREATE POLICY "member_insert" ON "member" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "member_update" ON "member" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "member_delete" ON "member" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "shop_read" ON "shop" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (id = nullif(current_setting('app.shop_id', true), '')::uuid);--> statement-breakpoint
CREATE POLICY "shop_insert" ON "shop" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "shop_update" ON "shop" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "job_read" ON "job" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or exists (select 1 from visit v where v.shop_id = job.shop_id and v.id = job.visit_id)));--> statement-breakpoint
CREATE POLICY "job_insert" ON "job" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "job_update" ON "job" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "job_delete" ON "job" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_read" ON "visit" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or exists (select 1 from site s where s.shop_id = visit.shop_id and s.id = visit.site_id
        and s.customer_id = nullif(current_setting('app.customer_id', true), '')::uuid)));--> statement-breakpoint
CREATE POLICY "visit_insert" ON "visit" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_update" ON "visit" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_delete" ON "visit" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_event_read" ON "visit_event" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or exists (select 1 from visit v where v.shop_id = visit_event.shop_id and v.id = visit_event.visit_id)));--> statement-breakpoint
CREATE POLICY "visit_event_insert" ON "visit_event" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_technician_read" ON "visit_technician" AS PERMISSIVE FOR SELECT TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and (nullif(current_setting('app.customer_id', true), '')::uuid is null or exists (select 1 from visit v where v.shop_id = visit_technician.shop_id and v.id = visit_technician.visit_id)));--> statement-breakpoint
CREATE POLICY "visit_technician_insert" ON "visit_technician" AS PERMISSIVE FOR INSERT TO "agraffe_app" WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_technician_update" ON "visit_technician" AS PERMISSIVE FOR UPDATE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null) WITH CHECK (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);--> statement-breakpoint
CREATE POLICY "visit_technician_delete" ON "visit_technician" AS PERMISSIVE FOR DELETE TO "agraffe_app" USING (shop_id = nullif(current_setting('app.shop_id', true), '')::uuid and nullif(current_setting('app.customer_id', true), '')::uuid is null);