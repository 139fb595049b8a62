import { defineRoute } from "@/lib/doors/define-route";
import { idParams, versionQuery } from "@/lib/doors/params";
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
  problems: ["stale"],
  handle: ({ actor, params, body }) => changeInstrument(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "instruments.place",
  summary: "Archive an instrument",
  params: idParams,
  query: versionQuery,
  response: instrumentRecord,
  problems: ["stale"],
  handle: ({ actor, params, query }) => archiveInstrument(actor, params.id, query.version),
});
