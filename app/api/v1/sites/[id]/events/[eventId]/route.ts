import { siteEventParams } from "@/lib/diary/events/schema";
import { removeSiteEvent } from "@/lib/diary/events/service";
import { defineRoute } from "@/lib/doors/define-route";

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "service-plans.change",
  summary: "Take an event of a site back",
  params: siteEventParams,
  status: 204,
  handle: ({ actor, params }) => removeSiteEvent(actor, params.id, params.eventId),
});
