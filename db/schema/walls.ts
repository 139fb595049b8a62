import { type SQL, sql } from "drizzle-orm";
import { pgPolicy, pgRole } from "drizzle-orm/pg-core";

/** The role the web server logs in as for the shops' tables. Made by scripts/migrate.ts. */
export const appRole = pgRole("agraffe_app").existing();

export const currentShop = sql.raw("nullif(current_setting('app.shop_id', true), '')::uuid");
export const currentCustomer = sql.raw("nullif(current_setting('app.customer_id', true), '')::uuid");

const staff = sql`${currentCustomer} is null`;

/**
 * The wall of one table: rows of the current shop only. Staff read and write; a customer's session
 * reads the rows that `customerSees` allows (none unless given) and writes none.
 */
export function shopWall(table: string, customerSees?: SQL) {
  const sees = customerSees ? sql`(${staff} or ${customerSees})` : staff;
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
