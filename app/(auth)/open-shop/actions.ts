"use server";

import { headers } from "next/headers";
import { requirePerson } from "@/lib/auth/actor";
import { rememberShop } from "@/lib/auth/auth";
import { defineAction } from "@/lib/doors/define-action";
import { openShop } from "@/lib/people/opening/service";
import { openShopInput } from "@/lib/people/schema";

export const openShopAction = defineAction({
  name: "shop.open",
  permission: "signed-in",
  input: openShopInput,
  limit: { most: 20, seconds: 600 },
  run: async (_actor, input) => {
    const person = await requirePerson(await headers());
    const { shopId } = await openShop(person, input);
    await rememberShop({ sessionId: person.sessionId }, shopId);
    return { goTo: "/" };
  },
});
