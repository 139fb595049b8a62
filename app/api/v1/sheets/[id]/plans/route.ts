import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { planInput, planList, planRecord } from "@/lib/plans/schema";
import { findPlans, savePlan } from "@/lib/plans/service";

export const GET = defineRoute({
  method: "GET",
  permission: "plans.read",
  summary: "List the plans kept for a sheet, newest first",
  params: idParams,
  response: planList,
  handle: ({ actor, params }) => findPlans(actor, params.id),
});

export const POST = defineRoute({
  method: "POST",
  permission: "plans.change",
  summary: "Compute and keep a stretch plan; the same id twice is one plan",
  params: idParams,
  body: planInput,
  response: planRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, params, body }) => savePlan(actor, params.id, body),
});
