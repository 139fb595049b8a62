import { defineRoute } from "@/lib/doors/define-route";
import { archiveQuery, idParams } from "@/lib/doors/params";
import { instrumentChange, instrumentRecord } from "@/lib/instruments/schema";
import { archiveInstrument, changeInstrument, getInstrument } from "@/lib/instruments/service";

export const GET = defineRoute({
  method: "GET",
  permission: "instruments.read",
  summary: "Read an instrument",
  params: idParams,
  response: instrumentRecord,
  handle: ({ actor, params }) => getInstrument(actor, params.id),
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "instruments.change",
  summary: "Change an instrument",
  params: idParams,
  body: instrumentChange,
  response: instrumentRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, body }) => changeInstrument(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "instruments.place",
  summary: "Archive an instrument; asks first while visits are not over",
  params: idParams,
  query: archiveQuery,
  response: instrumentRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, query }) => archiveInstrument(actor, params.id, query),
});
