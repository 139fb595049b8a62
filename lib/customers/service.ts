import "server-only";
import { withShop } from "@/db/client";
import { customerById, insertCustomer, listCustomers, updateCustomer } from "@/db/queries/customers";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import type { CustomerChange, CustomerListQuery, CustomerRecord, CustomerRow, NewCustomer } from "./schema";

type Row = NonNullable<Awaited<ReturnType<typeof customerById>>>;

/** A customer's own sign-in sees the record, but not what the shop notes about it. */
function record(actor: Actor, row: Row): CustomerRecord {
  return {
    ...row,
    notes: actor.role === "customer" ? null : row.notes,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    updatedAt: row.updatedAt.toISOString(),
  };
}

export async function findCustomers(actor: Actor, query: CustomerListQuery): Promise<ListPage<CustomerRow>> {
  const reach = authorise(actor, "customers.read");
  const page = await withShop(actor, (tx) => listCustomers(tx, actor.shopId, query, reach));
  return {
    next: page.next,
    items: page.items.map((row) => ({
      ...row,
      archivedAt: row.archivedAt?.toISOString() ?? null,
      updatedAt: row.updatedAt.toISOString(),
    })),
  };
}

export async function getCustomer(actor: Actor, id: string): Promise<CustomerRecord> {
  authorise(actor, "customers.read");
  const row = await withShop(actor, (tx) => customerById(tx, actor.shopId, id));
  if (!row) throw notFound("customer");
  return record(actor, row);
}

export async function createCustomer(actor: Actor, input: NewCustomer): Promise<CustomerRecord> {
  authorise(actor, "customers.change");
  const id = input.id ?? newId();
  return withShop(actor, async (tx) => {
    const row =
      (await insertCustomer(tx, actor.shopId, id, input)) ?? (await customerById(tx, actor.shopId, id));
    if (!row) throw new AppError("id-in-use", "This id is taken. Send the record with another one.");
    return record(actor, row);
  });
}

export async function changeCustomer(
  actor: Actor,
  id: string,
  change: CustomerChange,
): Promise<CustomerRecord> {
  authorise(actor, "customers.change");
  return withShop(actor, async (tx) => {
    const row = await updateCustomer(tx, actor.shopId, id, change);
    if (row) return record(actor, row);
    const current = await customerById(tx, actor.shopId, id);
    throw current ? stale("customer", record(actor, current)) : notFound("customer");
  });
}

export function archiveCustomer(actor: Actor, id: string, version: number): Promise<CustomerRecord> {
  return changeCustomer(actor, id, { version, archived: true });
}
