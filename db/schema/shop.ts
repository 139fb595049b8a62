import { sql } from "drizzle-orm";
import {
  boolean,
  char,
  check,
  doublePrecision,
  foreignKey,
  index,
  integer,
  jsonb,
  pgEnum,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import type { RegisterRule } from "@/lib/acoustics/styles";
import { instant, shopKey, stamps, versioned } from "./columns";
import { customer } from "./customers";
import { appRole, currentCustomer, currentShop, shopWall } from "./walls";

export const shop = pgTable(
  "shop",
  {
    id: uuid("id").primaryKey(),
    name: text("name").notNull(),
    timeZone: text("time_zone").notNull(),
    country: char("country", { length: 2 }).notNull(),
    currency: char("currency", { length: 3 }).notNull(),
    locale: text("locale").notNull().default("en-GB"),
    referenceHz: doublePrecision("reference_hz").notNull().default(440),
    /** A built-in style's name or a house style's id. */
    defaultStyle: text("default_style").notNull().default("even"),
    /** Records of a demo shop are invented; every screen that shows them says so. */
    demo: boolean("demo").notNull().default(false),
    ...stamps,
    ...versioned,
  },
  (table) => [
    check("shop_name_not_blank", sql`btrim(${table.name}) <> ''`),
    check("shop_reference_plausible", sql`${table.referenceHz} between 380 and 480`),
    pgPolicy("shop_read", { for: "select", to: appRole, using: sql`id = ${currentShop}` }),
    pgPolicy("shop_insert", {
      for: "insert",
      to: appRole,
      withCheck: sql`id = ${currentShop} and ${currentCustomer} is null`,
    }),
    pgPolicy("shop_update", {
      for: "update",
      to: appRole,
      using: sql`id = ${currentShop} and ${currentCustomer} is null`,
      withCheck: sql`id = ${currentShop} and ${currentCustomer} is null`,
    }),
  ],
);

export const role = pgEnum("role", ["owner", "office", "technician", "customer"]);

export const member = pgTable(
  "member",
  {
    ...shopKey,
    personId: uuid("person_id").notNull(),
    role: role("role").notNull(),
    name: text("name").notNull(),
    email: text("email").notNull(),
    /** The customer a customer's sign-in stands for. */
    customerId: uuid("customer_id"),
    /** Owners tune too. */
    bookable: boolean("bookable").notNull().default(false),
    endedAt: instant("ended_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId], foreignColumns: [shop.id] }).onDelete("cascade"),
    foreignKey({
      name: "member_customer",
      columns: [table.shopId, table.customerId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    uniqueIndex("member_person").on(table.shopId, table.personId).where(sql`ended_at is null`),
    index("member_of_person").on(table.personId),
    check("member_customer_named", sql`(${table.role} = 'customer') = (${table.customerId} is not null)`),
    check("member_customer_not_bookable", sql`not (${table.role} = 'customer' and ${table.bookable})`),
    ...shopWall("member", sql`customer_id = ${currentCustomer}`),
  ],
);

export const invitation = pgTable(
  "invitation",
  {
    ...shopKey,
    email: text("email").notNull(),
    role: role("role").notNull(),
    customerId: uuid("customer_id"),
    tokenHash: text("token_hash").notNull().unique(),
    invitedBy: uuid("invited_by").notNull(),
    expiresAt: instant("expires_at").notNull(),
    acceptedAt: instant("accepted_at"),
    revokedAt: instant("revoked_at"),
    ...stamps,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId], foreignColumns: [shop.id] }).onDelete("cascade"),
    foreignKey({
      columns: [table.shopId, table.invitedBy],
      foreignColumns: [member.shopId, member.id],
    }),
    foreignKey({
      name: "invitation_customer",
      columns: [table.shopId, table.customerId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    uniqueIndex("invitation_open")
      .on(table.shopId, sql`lower(email)`)
      .where(sql`accepted_at is null and revoked_at is null`),
    check("invitation_customer_named", sql`(${table.role} = 'customer') = (${table.customerId} is not null)`),
    ...shopWall("invitation"),
  ],
);

export const houseStyle = pgTable(
  "house_style",
  {
    ...shopKey,
    name: text("name").notNull(),
    intervals: jsonb("intervals").$type<RegisterRule[]>().notNull(),
    smoothness: doublePrecision("smoothness").notNull(),
    toleranceCents: doublePrecision("tolerance_cents").notNull().default(1),
    archivedAt: instant("archived_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId], foreignColumns: [shop.id] }).onDelete("cascade"),
    uniqueIndex("house_style_name").on(table.shopId, sql`lower(name)`).where(sql`archived_at is null`),
    check("house_style_smoothness", sql`${table.smoothness} >= 0`),
    check("house_style_tolerance", sql`${table.toleranceCents} > 0`),
    ...shopWall("house_style"),
  ],
);

/** Counts of one window for the rate limit; reached only through count_request(). */
export const requestCount = pgTable("request_count", {
  key: text("key").primaryKey(),
  windowEnds: instant("window_ends").notNull(),
  count: integer("count").notNull(),
});
