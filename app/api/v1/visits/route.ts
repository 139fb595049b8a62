import { defineRoute } from "@/lib/doors/define-route";
import { newVisit, visitList, visitListQuery, visitRecord } from "@/lib/visits/schema";
import { createVisit, findVisits } from "@/lib/visits/service";

export const GET = defineRoute({
  method: "GET",
  permission: "visits.read",
  summary: "List visits by state, technician, site, customer, instrument and days",
  query: visitListQuery,
  response: visitList,
  handle: ({ actor, query }) => findVisits(actor, query),
});

export const POST = defineRoute({
  method: "POST",
  permission: "visits.change",
  summary: "Book a visit; the same id twice is one record. A technician's visits never overlap",
  body: newVisit,
  response: visitRecord,
  status: 201,
  problems: ["visit-overlap", "id-in-use"],
  handle: ({ actor, body }) => createVisit(actor, body),
});
