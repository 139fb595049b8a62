import { sql } from "drizzle-orm";
import {
  check,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  smallint,
  text,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import type { Style, Temperament } from "@/lib/acoustics/types";
import { instant, shopKey, stamps } from "./columns";
import { readingSheet } from "./readings";
import { member } from "./shop";
import { job } from "./visits";
import { shopWall } from "./walls";

/**
 * A computed plan, kept as it was: arrays over the keys from `firstMidi` upwards, with everything that
 * went into it. A plan is never edited; another one is saved.
 */
export const stretchPlan = pgTable(
  "stretch_plan",
  {
    ...shopKey,
    sheetId: uuid("sheet_id").notNull(),
    /** Set when this is the plan of that job: at most one at a time. */
    jobId: uuid("job_id"),
    styleName: text("style_name").notNull(),
    style: jsonb("style").$type<Style>().notNull(),
    temperament: jsonb("temperament").$type<Temperament>().notNull(),
    referenceHz: doublePrecision("reference_hz").notNull(),
    firstMidi: smallint("first_midi").notNull(),
    stretchCents: doublePrecision("stretch_cents").array().notNull(),
    bandCents: doublePrecision("band_cents").array().notNull(),
    targetHz: doublePrecision("target_hz").array().notNull(),
    listenPartial: smallint("listen_partial").array().notNull(),
    listenHz: doublePrecision("listen_hz").array().notNull(),
    b: doublePrecision("b").array().notNull(),
    lnBSigma: doublePrecision("ln_b_sigma").array().notNull(),
    computationVersion: integer("computation_version").notNull(),
    supersededAt: instant("superseded_at"),
    madeBy: uuid("made_by"),
    ...stamps,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.sheetId],
      foreignColumns: [readingSheet.shopId, readingSheet.id],
    }),
    foreignKey({ columns: [table.shopId, table.jobId], foreignColumns: [job.shopId, job.id] }),
    foreignKey({ columns: [table.shopId, table.madeBy], foreignColumns: [member.shopId, member.id] }),
    uniqueIndex("stretch_plan_of_job")
      .on(table.shopId, table.jobId)
      .where(sql`job_id is not null and superseded_at is null`),
    index("stretch_plan_of_sheet").on(table.shopId, table.sheetId, table.createdAt),
    check(
      "stretch_plan_in_step",
      sql`cardinality(${table.stretchCents}) = cardinality(${table.bandCents})
        and cardinality(${table.stretchCents}) = cardinality(${table.targetHz})
        and cardinality(${table.stretchCents}) = cardinality(${table.listenPartial})
        and cardinality(${table.stretchCents}) = cardinality(${table.listenHz})
        and cardinality(${table.stretchCents}) = cardinality(${table.b})
        and cardinality(${table.stretchCents}) = cardinality(${table.lnBSigma})
        and cardinality(${table.stretchCents}) between 1 and 120`,
    ),
    ...shopWall("stretch_plan"),
  ],
);
