import { defineRoute } from "@/lib/doors/define-route";
import { memberList } from "@/lib/people/schema";
import { listTeam } from "@/lib/people/service";

export const GET = defineRoute({
  method: "GET",
  permission: "team.read",
  summary: "Everybody who signs in to the shop",
  response: memberList,
  handle: async ({ actor }) => ({ items: await listTeam(actor), next: null }),
});
