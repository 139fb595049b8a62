import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { styleChange, styleRecord } from "@/lib/plans/schema";
import { changeStyle } from "@/lib/plans/styles/service";

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "styles.change",
  summary: "Change a house style, or archive and restore it",
  params: idParams,
  body: styleChange,
  response: styleRecord,
  problems: ["stale"],
  handle: ({ actor, params, body }) => changeStyle(actor, params.id, body),
});
