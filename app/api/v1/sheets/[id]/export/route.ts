import { attachment } from "@/lib/doors/attachment";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { sheetExportQuery } from "@/lib/exports/schema";
import { exportSheet } from "@/lib/exports/service";

export const GET = defineRoute({
  method: "GET",
  permission: "export.readings",
  summary: "A sheet's readings or fits as CSV or JSON",
  params: idParams,
  query: sheetExportQuery,
  handle: async ({ actor, params, query }) => attachment(await exportSheet(actor, params.id, query)),
});
