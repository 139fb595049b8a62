import { type SQL, sql } from "drizzle-orm";
import { pgPolicy, pgRole } from "drizzle-orm/pg-core";

/** The role the web server logs in as for the shops' tables. Made by scripts/migrate.ts. */
export const appRole = pgRole("agraffe_app").existing();

export const currentShop = sql.raw("nullif(current_setting('app.shop_id', true), '')::uuid");
export const currentCustomer = sql.raw("nullif(current_setting('app.customer_id', true), '')::uuid");

/**
 * No customer's session. Written as a test for NOT NULL because of the planner, which has no figures for a
 * setting: it takes IS NULL to hold for one row in 200 and IS NOT NULL for nearly all. Staff see nearly all
 * rows, and with the other spelling every join of a shop's list is planned as if there were hardly any.
 */
const staff = sql.raw(
  "case when coalesce(current_setting('app.customer_id', true), '') = '' then true end is not null",
);

/**
 * The wall of one table: rows of the current shop only. Staff read and write; a customer's session
 * reads the rows that `customerSees` allows (none unless given) and writes none.
 */
export function shopWall(table: string, customerSees?: SQL) {
  const sees = customerSees ? sql`((${staff}) or ${customerSees})` : staff;
  return [
    pgPolicy(`${table}_read`, {
      for: "select",
      to: appRole,
      using: sql`shop_id = ${currentShop} and ${sees}`,
    }),
    pgPolicy(`${table}_insert`, {
      for: "insert",
      to: appRole,
      withCheck: sql`shop_id = ${currentShop} and ${staff}`,
    }),
    pgPolicy(`${table}_update`, {
      for: "update",
      to: appRole,
      using: sql`shop_id = ${currentShop} and ${staff}`,
      withCheck: sql`shop_id = ${currentShop} and ${staff}`,
    }),
    pgPolicy(`${table}_delete`, {
      for: "delete",
      to: appRole,
      using: sql`shop_id = ${currentShop} and ${staff}`,
    }),
  ];
}

/** As `shopWall`, for a record that is only ever added to. */
export function appendOnlyWall(table: string, customerSees?: SQL) {
  return shopWall(table, customerSees).slice(0, 2);
}
