import { customerChange, customerRecord } from "@/lib/customers/schema";
import { archiveCustomer, changeCustomer, getCustomer } from "@/lib/customers/service";
import { defineRoute } from "@/lib/doors/define-route";
import { archiveQuery, idParams } from "@/lib/doors/params";

export const GET = defineRoute({
  method: "GET",
  permission: "customers.read",
  summary: "Read a customer",
  params: idParams,
  response: customerRecord,
  handle: ({ actor, params }) => getCustomer(actor, params.id),
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "customers.change",
  summary: "Change a customer",
  params: idParams,
  body: customerChange,
  response: customerRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, body }) => changeCustomer(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "customers.change",
  summary: "Archive a customer; asks first while visits are not over",
  params: idParams,
  query: archiveQuery,
  response: customerRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, query }) => archiveCustomer(actor, params.id, query),
});
