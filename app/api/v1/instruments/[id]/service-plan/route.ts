import { servicePlanInput, servicePlanRecord } from "@/lib/diary/service-plans/schema";
import { getServicePlan, removeServicePlan, saveServicePlan } from "@/lib/diary/service-plans/service";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams, versionQuery } from "@/lib/doors/params";
import { notFound } from "@/lib/errors";

export const GET = defineRoute({
  method: "GET",
  permission: "service-plans.read",
  summary: "Read when an instrument is to be served",
  params: idParams,
  response: servicePlanRecord,
  handle: async ({ actor, params }) => {
    const plan = await getServicePlan(actor, params.id);
    if (!plan) throw notFound("service plan");
    return plan;
  },
});

export const PUT = defineRoute({
  method: "PUT",
  permission: "service-plans.change",
  summary: "Say when an instrument is to be served; version 0 for its first plan",
  params: idParams,
  body: servicePlanInput,
  response: servicePlanRecord,
  problems: ["stale"],
  handle: ({ actor, params, body }) => saveServicePlan(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "service-plans.change",
  summary: "Let an instrument have no service plan any more",
  params: idParams,
  query: versionQuery,
  status: 204,
  problems: ["stale"],
  handle: ({ actor, params, query }) => removeServicePlan(actor, params.id, query.version),
});
