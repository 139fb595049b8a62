import { sql } from "drizzle-orm";
import {
  boolean,
  check,
  customType,
  foreignKey,
  index,
  pgEnum,
  pgTable,
  primaryKey,
  smallint,
  text,
  timestamp,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import { instant, shopKey, stamps, versioned } from "./columns";
import { customer, site } from "./customers";
import { instrument } from "./instruments";
import { member } from "./shop";
import { appendOnlyWall, currentCustomer, shopWall } from "./walls";

export const visitState = pgEnum("visit_state", [
  "offered",
  "confirmed",
  "on-the-way",
  "in-progress",
  "done",
  "closed",
  "declined",
  "moved",
  "cancelled",
  "missed",
]);

const timeRange = customType<{ data: string }>({ dataType: () => "tstzrange" });

/**
 * One appointment at one site. The wall time and the site's zone are the truth; `during` is derived by a
 * trigger and recomputed when zone rules change.
 */
export const visit = pgTable(
  "visit",
  {
    ...shopKey,
    siteId: uuid("site_id").notNull(),
    /** Whose visit it is: the site's customer when it was booked. It stays theirs when the site becomes another's. */
    customerId: uuid("customer_id").notNull(),
    state: visitState("state").notNull().default("offered"),
    startsLocal: timestamp("starts_local", { mode: "string" }).notNull(),
    endsLocal: timestamp("ends_local", { mode: "string" }).notNull(),
    /** Which of the two, where clocks go back and the wall time occurs twice: 0 the first, 1 the second. */
    startsFold: smallint("starts_fold").notNull().default(0),
    endsFold: smallint("ends_fold").notNull().default(0),
    timeZone: text("time_zone").notNull(),
    during: timeRange("during").notNull().default(sql`'empty'`),
    /** Where this visit went when it was moved. */
    movedToId: uuid("moved_to_id"),
    /** The visit a complaint answers. */
    answersVisitId: uuid("answers_visit_id"),
    notes: text("notes"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId, table.siteId], foreignColumns: [site.shopId, site.id] }),
    foreignKey({
      columns: [table.shopId, table.customerId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    foreignKey({ columns: [table.shopId, table.movedToId], foreignColumns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId, table.answersVisitId], foreignColumns: [table.shopId, table.id] }),
    index("visit_by_start").on(table.shopId, table.startsLocal, table.id),
    // Partial, since an equality of states is not leakproof and no index of states would be asked behind the wall.
    index("visit_unfinished")
      .on(table.shopId, table.startsLocal, table.id)
      .where(sql`state in ('offered', 'confirmed', 'on-the-way', 'in-progress', 'done')`),
    index("visit_come_to_nothing")
      .on(table.shopId, table.startsLocal, table.id)
      .where(sql`state in ('declined', 'moved', 'cancelled', 'missed')`),
    index("visit_of_site").on(table.shopId, table.siteId, table.startsLocal),
    index("visit_of_customer").on(table.shopId, table.customerId, table.startsLocal),
    check("visit_ends_after_start", sql`${table.endsLocal} > ${table.startsLocal}`),
    check("visit_fold", sql`${table.startsFold} in (0, 1) and ${table.endsFold} in (0, 1)`),
    check("visit_within_a_day", sql`${table.endsLocal} <= ${table.startsLocal} + interval '24 hours'`),
    ...shopWall("visit", sql`customer_id = ${currentCustomer}`),
  ],
);

const ofOwnVisit = (table: string) =>
  sql.raw(`exists (select 1 from visit v where v.shop_id = ${table}.shop_id and v.id = ${table}.visit_id)`);

/**
 * Who comes. `during` and `live` follow the visit by trigger; two live visits of one technician cannot
 * overlap (exclusion constraint visit_overlap in the migration).
 */
export const visitTechnician = pgTable(
  "visit_technician",
  {
    shopId: uuid("shop_id").notNull(),
    visitId: uuid("visit_id").notNull(),
    memberId: uuid("member_id").notNull(),
    during: timeRange("during").notNull().default(sql`'empty'`),
    live: boolean("live").notNull().default(true),
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.visitId, table.memberId] }),
    foreignKey({
      columns: [table.shopId, table.visitId],
      foreignColumns: [visit.shopId, visit.id],
    }).onDelete("cascade"),
    foreignKey({ columns: [table.shopId, table.memberId], foreignColumns: [member.shopId, member.id] }),
    index("visit_technician_member").on(table.shopId, table.memberId),
    ...shopWall("visit_technician", ofOwnVisit("visit_technician")),
  ],
);

/** Each change of a visit's state: who, when and why. */
export const visitEvent = pgTable(
  "visit_event",
  {
    ...shopKey,
    visitId: uuid("visit_id").notNull(),
    fromState: visitState("from_state"),
    toState: visitState("to_state").notNull(),
    byMemberId: uuid("by_member_id"),
    reason: text("reason"),
    at: instant("at").notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.visitId],
      foreignColumns: [visit.shopId, visit.id],
    }).onDelete("cascade"),
    foreignKey({ columns: [table.shopId, table.byMemberId], foreignColumns: [member.shopId, member.id] }),
    index("visit_event_visit").on(table.shopId, table.visitId, table.at),
    ...appendOnlyWall("visit_event", ofOwnVisit("visit_event")),
  ],
);

/** An instrument and the work on it within one visit. */
export const job = pgTable(
  "job",
  {
    ...shopKey,
    visitId: uuid("visit_id").notNull(),
    instrumentId: uuid("instrument_id").notNull(),
    work: text("work").notNull().default("Tuning"),
    position: smallint("position").notNull().default(0),
    remarks: text("remarks"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.visitId],
      foreignColumns: [visit.shopId, visit.id],
    }).onDelete("cascade"),
    foreignKey({
      columns: [table.shopId, table.instrumentId],
      foreignColumns: [instrument.shopId, instrument.id],
    }),
    uniqueIndex("job_once_a_visit").on(table.shopId, table.visitId, table.instrumentId),
    index("job_of_instrument").on(table.shopId, table.instrumentId),
    // On a day when the instrument was somebody else's, its work is theirs to know. own_on is in the migration.
    ...shopWall(
      "job",
      sql`exists (select 1 from visit v where v.shop_id = job.shop_id and v.id = job.visit_id
        and own_on(job.instrument_id, v.starts_local::date))`,
    ),
  ],
);
