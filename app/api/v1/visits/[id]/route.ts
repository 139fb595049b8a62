import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { cancelVisit } from "@/lib/visits/moves/service";
import { cancelQuery, visitChange, visitRecord } from "@/lib/visits/schema";
import { changeVisit, getVisit } from "@/lib/visits/service";

export const GET = defineRoute({
  method: "GET",
  permission: "visits.read",
  summary: "Read a visit with its jobs and its history",
  params: idParams,
  response: visitRecord,
  handle: ({ actor, params }) => getVisit(actor, params.id),
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "visits.change",
  summary: "Correct a visit: who comes, the work, notes, and the time while it has not begun",
  params: idParams,
  body: visitChange,
  response: visitRecord,
  problems: ["stale", "visit-overlap", "move-not-allowed", "conflict", "id-in-use"],
  handle: ({ actor, params, body }) => changeVisit(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "visits.change",
  summary: "Cancel a visit, where its life still allows that",
  params: idParams,
  query: cancelQuery,
  response: visitRecord,
  problems: ["stale", "move-not-allowed"],
  handle: ({ actor, params, query }) => cancelVisit(actor, params.id, query),
});
