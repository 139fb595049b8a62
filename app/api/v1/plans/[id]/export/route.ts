import { attachment } from "@/lib/doors/attachment";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { planExportQuery } from "@/lib/exports/schema";
import { exportPlan } from "@/lib/exports/service";

export const GET = defineRoute({
  method: "GET",
  permission: "export.readings",
  summary: "A kept plan as CSV or JSON",
  params: idParams,
  query: planExportQuery,
  handle: async ({ actor, params, query }) => attachment(await exportPlan(actor, params.id, query.format)),
});
