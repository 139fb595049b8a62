DROP INDEX "customer_by_name";--> statement-breakpoint
DROP INDEX "site_by_name";--> statement-breakpoint
DROP INDEX "instrument_by_name";--> statement-breakpoint
ALTER TABLE "instrument" ADD COLUMN "name" text GENERATED ALWAYS AS (btrim(maker || ' ' || model)) STORED NOT NULL;--> statement-breakpoint
CREATE INDEX "customer_by_name" ON "customer" USING btree ("shop_id",name collate "und-x-icu","id");--> statement-breakpoint
CREATE INDEX "site_by_name" ON "site" USING btree ("shop_id",name collate "und-x-icu","id");--> statement-breakpoint
CREATE INDEX "instrument_by_name" ON "instrument" USING btree ("shop_id",name collate "und-x-icu","id");