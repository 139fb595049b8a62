import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { compareQuery, comparisonRecord } from "@/lib/plans/compare/schema";
import { compareSheets } from "@/lib/plans/compare/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sheets.read",
  summary: "Compare two sheets of one instrument, note by note",
  params: idParams,
  query: compareQuery,
  response: comparisonRecord,
  handle: ({ actor, params, query }) => compareSheets(actor, params.id, query.sheets),
});
