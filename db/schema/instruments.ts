import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  date,
  doublePrecision,
  foreignKey,
  index,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  smallint,
  text,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import type { Temperament } from "@/lib/acoustics/types";
import { instant, shopKey, stamps, versioned } from "./columns";
import { customer, site } from "./customers";
import { shop } from "./shop";
import { currentCustomer, shopWall } from "./walls";

export const instrumentKind = pgEnum("instrument_kind", ["grand", "upright", "square", "other"]);

export const instrument = pgTable(
  "instrument",
  {
    ...shopKey,
    maker: text("maker").notNull(),
    model: text("model").notNull().default(""),
    serial: text("serial").notNull().default(""),
    year: smallint("year"),
    kind: instrumentKind("kind").notNull(),
    /** Room or position within the site. */
    room: text("room").notNull().default(""),
    firstMidi: smallint("first_midi").notNull().default(21),
    lastMidi: smallint("last_midi").notNull().default(108),
    /** First note on the other bridge; null until somebody has looked. */
    breakMidi: smallint("break_midi"),
    referenceHz: doublePrecision("reference_hz").notNull().default(440),
    temperament: jsonb("temperament").$type<Temperament>().notNull().default(sql`'"equal"'::jsonb`),
    /** What the player asked for once and for all; people's own words. */
    standingNote: text("standing_note"),
    /** Maker and model, as an instrument is called and sorted. */
    name: text("name").notNull().generatedAlwaysAs(sql`btrim(maker || ' ' || model)`),
    searchText: text("search_text")
      .notNull()
      .generatedAlwaysAs(
        sql`lower(maker || ' ' || model || ' ' || serial || ' ' || regexp_replace(serial, '[^0-9A-Za-z]', '', 'g') || ' ' || room)`,
      ),
    archivedAt: instant("archived_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId], foreignColumns: [shop.id] }).onDelete("cascade"),
    index("instrument_by_name").on(table.shopId, sql`name collate "und-x-icu"`, table.id),
    index("instrument_by_change").on(table.shopId, table.updatedAt, table.id),
    index("instrument_search").using("gin", table.shopId, sql`search_text gin_trgm_ops`),
    check("instrument_maker_not_blank", sql`btrim(${table.maker}) <> ''`),
    check("instrument_year_plausible", sql`${table.year} between 1700 and 2100`),
    check(
      "instrument_key_range",
      sql`${table.firstMidi} between 9 and 60 and ${table.lastMidi} between 72 and 120`,
    ),
    check(
      "instrument_break_inside",
      sql`${table.breakMidi} > ${table.firstMidi} and ${table.breakMidi} <= ${table.lastMidi}`,
    ),
    check("instrument_reference_plausible", sql`${table.referenceHz} between 380 and 480`),
    ...shopWall(
      "instrument",
      sql`exists (select 1 from instrument_holding h where h.shop_id = instrument.shop_id
        and h.instrument_id = instrument.id and h.owner_id = ${currentCustomer} and h.until is null)`,
    ),
  ],
);

/**
 * Where an instrument stood and whose it was, by dates: pianos are sold and moved. The open row is
 * today's. Ranges of one instrument never overlap (exclusion constraint in the migration).
 */
export const instrumentHolding = pgTable(
  "instrument_holding",
  {
    ...shopKey,
    instrumentId: uuid("instrument_id").notNull(),
    siteId: uuid("site_id").notNull(),
    ownerId: uuid("owner_id").notNull(),
    payerId: uuid("payer_id"),
    bookingContactId: uuid("booking_contact_id"),
    since: date("since").notNull(),
    until: date("until"),
    ...stamps,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.instrumentId],
      foreignColumns: [instrument.shopId, instrument.id],
    }).onDelete("cascade"),
    foreignKey({ columns: [table.shopId, table.siteId], foreignColumns: [site.shopId, site.id] }),
    foreignKey({ columns: [table.shopId, table.ownerId], foreignColumns: [customer.shopId, customer.id] }),
    foreignKey({ columns: [table.shopId, table.payerId], foreignColumns: [customer.shopId, customer.id] }),
    foreignKey({
      columns: [table.shopId, table.bookingContactId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    uniqueIndex("instrument_holding_open").on(table.shopId, table.instrumentId).where(sql`until is null`),
    index("instrument_holding_site").on(table.shopId, table.siteId).where(sql`until is null`),
    index("instrument_holding_owner").on(table.shopId, table.ownerId).where(sql`until is null`),
    check("instrument_holding_order", sql`${table.until} is null or ${table.until} >= ${table.since}`),
    ...shopWall("instrument_holding", sql`(owner_id = ${currentCustomer} and until is null)`),
  ],
);

/** One note of the scale, where somebody has measured it. Diameters in mm, never gauge numbers alone. */
export const instrumentString = pgTable(
  "instrument_string",
  {
    shopId: uuid("shop_id").notNull(),
    instrumentId: uuid("instrument_id").notNull(),
    midi: smallint("midi").notNull(),
    strings: smallint("strings").notNull(),
    wound: boolean("wound").notNull(),
    speakingLengthMm: doublePrecision("speaking_length_mm"),
    /** Plain wire, or the core of a wound string. */
    diameterMm: doublePrecision("diameter_mm"),
    outerDiameterMm: doublePrecision("outer_diameter_mm"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.instrumentId, table.midi] }),
    foreignKey({
      columns: [table.shopId, table.instrumentId],
      foreignColumns: [instrument.shopId, instrument.id],
    }).onDelete("cascade"),
    check("instrument_string_count", sql`${table.strings} between 1 and 5`),
    check(
      "instrument_string_length",
      sql`${table.speakingLengthMm} > 0 and ${table.speakingLengthMm} < 3000`,
    ),
    check("instrument_string_diameter", sql`${table.diameterMm} > 0.2 and ${table.diameterMm} < 3`),
    check(
      "instrument_string_wrap",
      sql`${table.outerDiameterMm} is null or (${table.wound} and ${table.outerDiameterMm} > ${table.diameterMm})`,
    ),
    ...shopWall("instrument_string"),
  ],
);
