import { newSiteEvent, siteEventList, siteEventRecord } from "@/lib/diary/events/schema";
import { addSiteEvent, findSiteEvents } from "@/lib/diary/events/service";
import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";

export const GET = defineRoute({
  method: "GET",
  permission: "service-plans.read",
  summary: "List the events to come at a site",
  params: idParams,
  response: siteEventList,
  handle: ({ actor, params }) => findSiteEvents(actor, params.id),
});

export const POST = defineRoute({
  method: "POST",
  permission: "service-plans.change",
  summary: "Add an event for which a site's instruments are to be ready",
  params: idParams,
  body: newSiteEvent,
  response: siteEventRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, params, body }) => addSiteEvent(actor, params.id, body),
});
