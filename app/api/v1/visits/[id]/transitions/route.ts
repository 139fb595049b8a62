import { defineRoute } from "@/lib/doors/define-route";
import { idParams } from "@/lib/doors/params";
import { transitionVisit } from "@/lib/visits/moves/service";
import { visitRecord, visitTransition } from "@/lib/visits/schema";

export const POST = defineRoute({
  method: "POST",
  permission: "visits.change",
  summary: "Take a visit one step on in its life; moving it makes its successor",
  params: idParams,
  body: visitTransition,
  response: visitRecord,
  problems: ["stale", "move-not-allowed", "visit-overlap", "id-in-use"],
  handle: ({ actor, params, body }) => transitionVisit(actor, params.id, body),
});
