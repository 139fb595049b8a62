import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { adviceRecord } from "@/lib/plans/schema";
import { getAdvice } from "@/lib/plans/service";

export const GET = defineRoute({
  method: "GET",
  permission: "plans.read",
  summary: "Which note to measure next, from the instrument's newest sheet",
  params: idParams,
  response: adviceRecord,
  handle: ({ actor, params }) => getAdvice(actor, params.id),
});
