import { dueList, dueQuery } from "@/lib/diary/due/schema";
import { findDue } from "@/lib/diary/due/service";
import { defineRoute } from "@/lib/doors/define-route";

export const GET = defineRoute({
  method: "GET",
  permission: "service-plans.read",
  summary: "List the instruments that want a visit, by state, technician, kind and town",
  query: dueQuery,
  response: dueList,
  handle: ({ actor, query }) => findDue(actor, query),
});
