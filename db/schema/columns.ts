import { integer, timestamp, uuid } from "drizzle-orm/pg-core";

/** Columns that every record of a shop carries. */
export const shopKey = {
  shopId: uuid("shop_id").notNull(),
  id: uuid("id").notNull(),
};

export function instant(name: string) {
  return timestamp(name, { withTimezone: true, mode: "date" });
}

export const stamps = {
  createdAt: instant("created_at").notNull().defaultNow(),
  updatedAt: instant("updated_at").notNull().defaultNow(),
};

/** Counted up by every change; a writer names the version it saw. */
export const versioned = { version: integer("version").notNull().default(1) };
