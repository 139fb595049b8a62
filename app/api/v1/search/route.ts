import { defineRoute } from "@/lib/doors/define-route";
import { searchAnswer, searchQuery } from "@/lib/search/schema";
import { search } from "@/lib/search/service";

export const GET = defineRoute({
  method: "GET",
  permission: "search.read",
  summary: "Find customers, sites and instruments by parts of names, addresses and serial numbers",
  query: searchQuery,
  response: searchAnswer,
  handle: ({ actor, query }) => search(actor, query),
});
