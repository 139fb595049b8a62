import { sql } from "drizzle-orm";
import {
  check,
  customType,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  primaryKey,
  smallint,
  text,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import type { FitResult } from "@/lib/acoustics/types";
import { instant, shopKey, stamps, versioned } from "./columns";
import { instrument } from "./instruments";
import { member } from "./shop";
import { job } from "./visits";
import { shopWall } from "./walls";

/** The driver gives NaN where an array's entry is null; what is not known is null here. */
const knownOrNull = customType<{ data: number | null; driverData: number | null }>({
  dataType: () => "double precision",
  fromDriver: (value) => (value === null || Number.isNaN(value) ? null : value),
});

export const stage = pgEnum("stage", ["as-found", "after-raise", "as-left"]);

export const readingSheet = pgTable(
  "reading_sheet",
  {
    ...shopKey,
    instrumentId: uuid("instrument_id").notNull(),
    jobId: uuid("job_id"),
    stage: stage("stage").notNull(),
    takenAt: instant("taken_at").notNull(),
    takenBy: uuid("taken_by"),
    referenceHz: doublePrecision("reference_hz").notNull(),
    humidityPercent: doublePrecision("humidity_percent"),
    temperatureC: doublePrecision("temperature_c"),
    remarks: text("remarks"),
    archivedAt: instant("archived_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.instrumentId],
      foreignColumns: [instrument.shopId, instrument.id],
    }),
    foreignKey({ columns: [table.shopId, table.jobId], foreignColumns: [job.shopId, job.id] }),
    foreignKey({ columns: [table.shopId, table.takenBy], foreignColumns: [member.shopId, member.id] }),
    index("reading_sheet_of_instrument").on(table.shopId, table.instrumentId, table.takenAt),
    index("reading_sheet_of_job").on(table.shopId, table.jobId),
    check("reading_sheet_reference_plausible", sql`${table.referenceHz} between 380 and 480`),
    check("reading_sheet_humidity", sql`${table.humidityPercent} between 0 and 100`),
    check("reading_sheet_temperature", sql`${table.temperatureC} between -30 and 60`),
    ...shopWall("reading_sheet"),
  ],
);

/**
 * All readings of one string in one take, with the fit beside them. The arrays run in step: entry i is
 * one reading. `string` is 1..k from the left, or 0 for the whole unison sounding together.
 */
export const noteReading = pgTable(
  "note_reading",
  {
    ...shopKey,
    sheetId: uuid("sheet_id").notNull(),
    midi: smallint("midi").notNull(),
    string: smallint("string").notNull().default(0),
    take: smallint("take").notNull().default(1),
    partials: smallint("partials").array().notNull(),
    hz: doublePrecision("hz").array().notNull(),
    /** Null entries: no error was given. */
    sigmaCents: knownOrNull("sigma_cents").array().notNull(),
    kept: smallint("kept").array().notNull().default(sql`'{}'`),
    dropped: smallint("dropped").array().notNull().default(sql`'{}'`),
    f1Hz: doublePrecision("f1_hz").notNull(),
    b: doublePrecision("b"),
    bSigma: doublePrecision("b_sigma"),
    fit: jsonb("fit").$type<FitResult>().notNull(),
    fitVersion: integer("fit_version").notNull(),
    takenBy: uuid("taken_by"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.sheetId],
      foreignColumns: [readingSheet.shopId, readingSheet.id],
    }).onDelete("cascade"),
    foreignKey({ columns: [table.shopId, table.takenBy], foreignColumns: [member.shopId, member.id] }),
    uniqueIndex("note_reading_take").on(table.shopId, table.sheetId, table.midi, table.string, table.take),
    check("note_reading_midi", sql`${table.midi} between 9 and 120`),
    check("note_reading_string", sql`${table.string} between 0 and 5 and ${table.take} between 1 and 99`),
    check(
      "note_reading_in_step",
      sql`cardinality(${table.partials}) between 1 and 64
        and cardinality(${table.partials}) = cardinality(${table.hz})
        and cardinality(${table.partials}) = cardinality(${table.sigmaCents})`,
    ),
    check(
      "note_reading_positive",
      sql`0 < all (${table.hz}) and 'Infinity' > all (${table.hz}) and 0 < all (${table.partials}) and ${table.f1Hz} > 0`,
    ),
    ...shopWall("note_reading"),
  ],
);
