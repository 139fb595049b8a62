import { defineRoute } from "@/lib/doors/define-route";
import { meRecord } from "@/lib/people/schema";

export const GET = defineRoute({
  method: "GET",
  permission: "shop.read",
  summary: "Who is signed in, in which shop and as what",
  response: meRecord,
  handle: async ({ actor }) => ({
    personId: actor.personId,
    memberId: actor.memberId,
    name: actor.name,
    role: actor.role,
    shopId: actor.shopId,
    shopName: actor.shopName,
    customerId: actor.customerId,
  }),
});
