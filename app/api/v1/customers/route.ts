import { customerList, customerListQuery, customerRecord, newCustomer } from "@/lib/customers/schema";
import { createCustomer, findCustomers } from "@/lib/customers/service";
import { defineRoute } from "@/lib/doors/define-route";

export const GET = defineRoute({
  method: "GET",
  permission: "customers.read",
  summary: "List customers",
  query: customerListQuery,
  response: customerList,
  handle: ({ actor, query }) => findCustomers(actor, query),
});

export const POST = defineRoute({
  method: "POST",
  permission: "customers.change",
  summary: "Create a customer; the same id twice is one record",
  body: newCustomer,
  response: customerRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, body }) => createCustomer(actor, body),
});
