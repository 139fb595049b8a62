import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { planRecord } from "@/lib/plans/schema";
import { getPlan } from "@/lib/plans/service";

export const GET = defineRoute({
  method: "GET",
  permission: "plans.read",
  summary: "Read a kept plan",
  params: idParams,
  response: planRecord,
  handle: ({ actor, params }) => getPlan(actor, params.id),
});
