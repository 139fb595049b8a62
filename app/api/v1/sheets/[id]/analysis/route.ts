import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { analysisQuery, analysisRecord } from "@/lib/plans/schema";
import { getAnalysis } from "@/lib/plans/service";

export const GET = defineRoute({
  method: "GET",
  permission: "plans.read",
  summary: "B of all keys, the stretch plan and what to measure next, from one sheet",
  params: idParams,
  query: analysisQuery,
  response: analysisRecord,
  handle: ({ actor, params, query }) => getAnalysis(actor, params.id, query),
});
