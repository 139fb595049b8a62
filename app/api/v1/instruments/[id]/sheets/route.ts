import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { newSheet, sheetList, sheetListQuery, sheetRecord } from "@/lib/readings/schema";
import { createSheet, findSheets } from "@/lib/readings/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sheets.read",
  summary: "List an instrument's reading sheets, newest first",
  params: idParams,
  query: sheetListQuery,
  response: sheetList,
  handle: ({ actor, params, query }) => findSheets(actor, params.id, query),
});

export const POST = defineRoute({
  method: "POST",
  permission: "sheets.change",
  summary: "Begin a reading sheet; the same id twice is one sheet",
  params: idParams,
  body: newSheet,
  response: sheetRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, params, body }) => createSheet(actor, params.id, body),
});
