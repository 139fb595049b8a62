import { defineRoute } from "@/lib/doors/define-route";
import { newStyle, styleList, styleRecord } from "@/lib/plans/schema";
import { createStyle, getStyles } from "@/lib/plans/styles/service";

export const GET = defineRoute({
  method: "GET",
  permission: "styles.read",
  summary: "The built-in styles and the shop's own",
  response: styleList,
  handle: ({ actor }) => getStyles(actor),
});

export const POST = defineRoute({
  method: "POST",
  permission: "styles.change",
  summary: "Create a house style; the same id twice is one style",
  body: newStyle,
  response: styleRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, body }) => createStyle(actor, body),
});
