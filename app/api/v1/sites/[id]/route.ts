import { defineRoute } from "@/lib/doors/define-route";
import { archiveQuery, idParams } from "@/lib/doors/params";
import { siteChange, siteRecord } from "@/lib/sites/schema";
import { archiveSite, changeSite, getSite } from "@/lib/sites/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sites.read",
  summary: "Read a site",
  params: idParams,
  response: siteRecord,
  handle: ({ actor, params }) => getSite(actor, params.id),
});

export const PATCH = defineRoute({
  method: "PATCH",
  permission: "sites.change",
  summary: "Change a site",
  params: idParams,
  body: siteChange,
  response: siteRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, body }) => changeSite(actor, params.id, body),
});

export const DELETE = defineRoute({
  method: "DELETE",
  permission: "sites.change",
  summary: "Archive a site; asks first while visits are not over",
  params: idParams,
  query: archiveQuery,
  response: siteRecord,
  problems: ["stale", "needs-confirming"],
  handle: ({ actor, params, query }) => archiveSite(actor, params.id, query),
});
