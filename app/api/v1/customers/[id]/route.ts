import { customerChange, customerRecord } from "@/lib/customers/schema";
import { archiveCustomer, changeCustomer, getCustomer } from "@/lib/customers/service";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams, versionQuery } from "@/lib/doors/params";

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
  problems: ["stale"],
  handle: ({ actor, params, body }) => changeCustomer(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "customers.change",
  summary: "Archive a customer",
  params: idParams,
  query: versionQuery,
  response: customerRecord,
  problems: ["stale"],
  handle: ({ actor, params, query }) => archiveCustomer(actor, params.id, query.version),
});
