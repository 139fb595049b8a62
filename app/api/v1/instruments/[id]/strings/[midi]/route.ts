import { defineRoute } from "@/lib/doors/define-route";
import { stringInput, stringParams, stringQuery, stringRecord } from "@/lib/instruments/schema";
import { removeString, saveString } from "@/lib/instruments/strings/service";

export const PUT = defineRoute({
  method: "PUT",
  permission: "instruments.change",
  summary: "Save the strings of one note",
  params: stringParams,
  body: stringInput,
  response: stringRecord,
  problems: ["stale"],
  handle: ({ actor, params, body }) => saveString(actor, params.id, params.midi, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "instruments.change",
  summary: "Remove the strings of one note",
  params: stringParams,
  query: stringQuery,
  status: 204,
  problems: ["stale"],
  handle: ({ actor, params, query }) => removeString(actor, params.id, params.midi, query.version),
});
