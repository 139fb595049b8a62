"use server";

import { headers } from "next/headers";
import { requirePerson } from "@/lib/auth/actor";
import { rememberShop } from "@/lib/auth/auth";
import { defineAction } from "@/lib/doors/define-action";
import { acceptAsNewPerson, acceptInvitation } from "@/lib/people/invitations/service";
import { acceptAsNewInput, acceptInput } from "@/lib/people/schema";

const limit = { most: 30, seconds: 600 };

export const acceptAsNewAction = defineAction({
  name: "invitations.accept-as-new",
  permission: "anyone",
  input: acceptAsNewInput,
  limit,
  run: async (_actor, input) => {
    await acceptAsNewPerson(await headers(), input);
    return { goTo: "/" };
  },
});

export const acceptAction = defineAction({
  name: "invitations.accept",
  permission: "signed-in",
  input: acceptInput,
  limit,
  run: async (_actor, { token }) => {
    const person = await requirePerson(await headers());
    const { shopId } = await acceptInvitation(person, token);
    await rememberShop({ sessionId: person.sessionId }, shopId);
    return { goTo: "/" };
  },
});
