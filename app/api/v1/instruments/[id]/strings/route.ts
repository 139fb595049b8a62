import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { stringList, stringsInput } from "@/lib/instruments/schema";
import { findStrings, saveStrings } from "@/lib/instruments/strings/service";

export const GET = defineRoute({
  method: "GET",
  permission: "instruments.read",
  summary: "List the strings of an instrument by note",
  params: idParams,
  response: stringList,
  handle: ({ actor, params }) => findStrings(actor, params.id),
});

export const PUT = defineRoute({
  method: "PUT",
  permission: "instruments.change",
  summary: "Save the strings of several notes, all or none",
  params: idParams,
  body: stringsInput,
  response: stringList,
  problems: ["stale"],
  handle: ({ actor, params, body }) => saveStrings(actor, params.id, body),
});
