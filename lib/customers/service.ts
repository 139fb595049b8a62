import "server-only";
import { withShop } from "@/db/client";
import { customerById, insertCustomer, listCustomers, updateCustomer } from "@/db/queries/customers";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { ArchiveQuery } from "@/lib/doors/params";
import { AppError, notFound, stale } from "@/lib/errors";
import { newId } from "@/lib/ids";
import type { ListPage } from "@/lib/pages/list-query";
import { written, writtenPage } from "@/lib/pages/record-dates";
import { askAboutOpenVisits } from "@/lib/visits/open/service";
import type { CustomerChange, CustomerListQuery, CustomerRecord, CustomerRow, NewCustomer } from "./schema";

type Row = NonNullable<Awaited<ReturnType<typeof customerById>>>;

/** A customer's own sign-in sees the record, but not what the shop notes about it. */
function record(actor: Actor, row: Row): CustomerRecord {
  return { ...written(row), notes: actor.role === "customer" ? null : row.notes };
}

export async function findCustomers(actor: Actor, query: CustomerListQuery): Promise<ListPage<CustomerRow>> {
  const reach = authorise(actor, "customers.read");
  return writtenPage(await withShop(actor, (tx) => listCustomers(tx, actor.shopId, query, reach)));
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
    if (row) {
      if (change.archived && !change.confirm) await askAboutOpenVisits(tx, actor, "customer", id);
      return record(actor, row);
    }
    const current = await customerById(tx, actor.shopId, id);
    throw current ? stale("customer", record(actor, current)) : notFound("customer");
  });
}

export function archiveCustomer(actor: Actor, id: string, asked: ArchiveQuery): Promise<CustomerRecord> {
  return changeCustomer(actor, id, { ...asked, archived: true });
}
