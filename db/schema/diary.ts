import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  date,
  foreignKey,
  index,
  pgEnum,
  pgTable,
  primaryKey,
  smallint,
  text,
  uuid,
} from "drizzle-orm/pg-core";
import { shopKey, stamps, versioned } from "./columns";
import { site } from "./customers";
import { instrument } from "./instruments";
import { member } from "./shop";
import { shopWall } from "./walls";

export const rhythmKind = pgEnum("rhythm_kind", ["interval", "months", "events"]);
export const intervalUnit = pgEnum("interval_unit", ["week", "month"]);

/** The recurring rule that makes an instrument due. What is due is computed from it and the visits, never stored. */
export const servicePlan = pgTable(
  "service_plan",
  {
    shopId: uuid("shop_id").notNull(),
    instrumentId: uuid("instrument_id").notNull(),
    rhythm: rhythmKind("rhythm").notNull(),
    every: smallint("every"),
    unit: intervalUnit("unit"),
    /** Months of the year, 1 to 12. */
    months: smallint("months").array(),
    daysBefore: smallint("days_before"),
    startsOn: date("starts_on", { mode: "string" }).notNull(),
    /** The last service before the book was opened. */
    servedBefore: date("served_before", { mode: "string" }),
    rests: boolean("rests").notNull().default(false),
    /** The plan wakes by itself on this day; null while it rests until somebody wakes it. */
    restsUntil: date("rests_until", { mode: "string" }),
    technicianId: uuid("technician_id"),
    /** ISO weekdays the customer prefers, 1 Monday to 7 Sunday; empty: any. */
    weekdays: smallint("weekdays").array().notNull().default([]),
    /** Hours the customer prefers, in minutes after midnight at the site. */
    hoursFrom: smallint("hours_from"),
    hoursUntil: smallint("hours_until"),
    work: text("work").notNull().default("Tuning"),
    workMinutes: smallint("work_minutes").notNull().default(90),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.instrumentId] }),
    foreignKey({
      columns: [table.shopId, table.instrumentId],
      foreignColumns: [instrument.shopId, instrument.id],
    }).onDelete("cascade"),
    foreignKey({ columns: [table.shopId, table.technicianId], foreignColumns: [member.shopId, member.id] }),
    check(
      "service_plan_rhythm_whole",
      sql`coalesce(case ${table.rhythm}
        when 'interval' then ${table.every} between 1 and 120 and ${table.unit} is not null
        when 'months' then cardinality(${table.months}) between 1 and 12 and ${table.months} <@ '{1,2,3,4,5,6,7,8,9,10,11,12}'
        else ${table.daysBefore} between 0 and 60
      end, false)`,
    ),
    check("service_plan_weekdays", sql`${table.weekdays} <@ '{1,2,3,4,5,6,7}'`),
    check(
      "service_plan_hours",
      sql`(${table.hoursFrom} is null) = (${table.hoursUntil} is null)
        and (${table.hoursFrom} is null or (${table.hoursFrom} >= 0 and ${table.hoursFrom} < ${table.hoursUntil} and ${table.hoursUntil} <= 1440))`,
    ),
    check("service_plan_work_minutes", sql`${table.workMinutes} between 15 and 720`),
    check("service_plan_rest", sql`${table.rests} or ${table.restsUntil} is null`),
    ...shopWall("service_plan"),
  ],
);

/** A concert or service for which the instruments of a site are to be ready. */
export const siteEvent = pgTable(
  "site_event",
  {
    ...shopKey,
    siteId: uuid("site_id").notNull(),
    day: date("day", { mode: "string" }).notNull(),
    name: text("name").notNull(),
    ...stamps,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId, table.siteId], foreignColumns: [site.shopId, site.id] }),
    index("site_event_of_site").on(table.shopId, table.siteId, table.day),
    check("site_event_name_not_blank", sql`btrim(${table.name}) <> ''`),
    ...shopWall("site_event"),
  ],
);
