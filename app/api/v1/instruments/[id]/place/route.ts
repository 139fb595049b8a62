import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { correctPlace } from "@/lib/instruments/holdings/service";
import { holdingChange, instrumentRecord } from "@/lib/instruments/schema";

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "instruments.place",
  summary: "Put a slip in an instrument's present place or owner right",
  params: idParams,
  body: holdingChange,
  response: instrumentRecord,
  problems: ["stale", "conflict"],
  handle: ({ actor, params, body }) => correctPlace(actor, params.id, body),
});
