import { defineRoute } from "@/lib/doors/define-route";
import { idParams, versionQuery } from "@/lib/doors/params";
import { sheetChange, sheetRecord } from "@/lib/readings/schema";
import { changeSheet, getSheet } from "@/lib/readings/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sheets.read",
  summary: "Read a sheet with all its notes and fits",
  params: idParams,
  response: sheetRecord,
  handle: ({ actor, params }) => getSheet(actor, params.id),
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "sheets.change",
  summary: "Change a sheet's circumstances, or archive and restore it",
  params: idParams,
  body: sheetChange,
  response: sheetRecord,
  problems: ["stale"],
  handle: ({ actor, params, body }) => changeSheet(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "sheets.change",
  summary: "Archive a sheet",
  params: idParams,
  query: versionQuery,
  response: sheetRecord,
  problems: ["stale"],
  handle: ({ actor, params, query }) =>
    changeSheet(actor, params.id, { version: query.version, archived: true }),
});
