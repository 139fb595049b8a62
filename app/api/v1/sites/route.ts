import { defineRoute } from "@/lib/doors/define-route";
import { newSite, siteList, siteListQuery, siteRecord } from "@/lib/sites/schema";
import { createSite, findSites } from "@/lib/sites/service";

export const GET = defineRoute({
  method: "GET",
  permission: "sites.read",
  summary: "List sites",
  query: siteListQuery,
  response: siteList,
  handle: ({ actor, query }) => findSites(actor, query),
});

export const POST = defineRoute({
  method: "POST",
  permission: "sites.change",
  summary: "Create a site; the same id twice is one record",
  body: newSite,
  response: siteRecord,
  status: 201,
  problems: ["id-in-use"],
  handle: ({ actor, body }) => createSite(actor, body),
});
