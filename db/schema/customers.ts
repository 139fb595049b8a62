import { sql } from "drizzle-orm";
import {
  char,
  check,
  doublePrecision,
  foreignKey,
  index,
  pgEnum,
  pgTable,
  primaryKey,
  text,
  uuid,
} from "drizzle-orm/pg-core";
import { instant, shopKey, stamps, versioned } from "./columns";
import { shop } from "./shop";
import { currentCustomer, shopWall } from "./walls";

export const customerKind = pgEnum("customer_kind", ["person", "organisation"]);

export const customer = pgTable(
  "customer",
  {
    ...shopKey,
    kind: customerKind("kind").notNull().default("person"),
    name: text("name").notNull(),
    /** Whom to ask for at an organisation. */
    contactName: text("contact_name"),
    email: text("email"),
    phone: text("phone"),
    notes: text("notes"),
    searchText: text("search_text")
      .notNull()
      .generatedAlwaysAs(
        sql`lower(name || ' ' || coalesce(contact_name, '') || ' ' || coalesce(email, '') || ' ' || coalesce(phone, '') || ' ' || regexp_replace(coalesce(phone, ''), '[^0-9]', '', 'g'))`,
      ),
    archivedAt: instant("archived_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({ columns: [table.shopId], foreignColumns: [shop.id] }).onDelete("cascade"),
    index("customer_by_name").on(table.shopId, sql`name collate "und-x-icu"`, table.id),
    index("customer_by_change").on(table.shopId, table.updatedAt, table.id),
    index("customer_search").using("gin", table.shopId, sql`search_text gin_trgm_ops`),
    check("customer_name_not_blank", sql`btrim(${table.name}) <> ''`),
    ...shopWall("customer", sql`id = ${currentCustomer}`),
  ],
);

export const site = pgTable(
  "site",
  {
    ...shopKey,
    customerId: uuid("customer_id").notNull(),
    name: text("name").notNull(),
    street: text("street").notNull().default(""),
    postalCode: text("postal_code").notNull().default(""),
    city: text("city").notNull().default(""),
    country: char("country", { length: 2 }).notNull(),
    timeZone: text("time_zone").notNull(),
    latitude: doublePrecision("latitude"),
    longitude: doublePrecision("longitude"),
    accessNotes: text("access_notes"),
    searchText: text("search_text")
      .notNull()
      .generatedAlwaysAs(sql`lower(name || ' ' || street || ' ' || postal_code || ' ' || city)`),
    archivedAt: instant("archived_at"),
    ...stamps,
    ...versioned,
  },
  (table) => [
    primaryKey({ columns: [table.shopId, table.id] }),
    foreignKey({
      columns: [table.shopId, table.customerId],
      foreignColumns: [customer.shopId, customer.id],
    }),
    index("site_by_name").on(table.shopId, sql`name collate "und-x-icu"`, table.id),
    index("site_by_city").on(table.shopId, sql`city collate "und-x-icu"`, table.id),
    index("site_by_change").on(table.shopId, table.updatedAt, table.id),
    index("site_of_customer").on(table.shopId, table.customerId),
    index("site_search").using("gin", table.shopId, sql`search_text gin_trgm_ops`),
    check("site_name_not_blank", sql`btrim(${table.name}) <> ''`),
    check(
      "site_position_whole",
      sql`(${table.latitude} is null) = (${table.longitude} is null)
        and (${table.latitude} is null or (${table.latitude} between -90 and 90 and ${table.longitude} between -180 and 180))`,
    ),
    ...shopWall("site", sql`customer_id = ${currentCustomer}`),
  ],
);
