"use server";

import { headers } from "next/headers";
import { ownPath } from "@/lib/auth/next-path";
import { defineAction } from "@/lib/doors/define-action";
import { signUpForm } from "@/lib/people/schema";
import { signUpWithShop } from "@/lib/people/sign-in/service";

export const signUpAction = defineAction({
  name: "sign-in.sign-up",
  permission: "anyone",
  input: signUpForm,
  limit: { most: 20, seconds: 600 },
  run: async (_actor, { next, ...input }) => {
    const { shopOpened } = await signUpWithShop(await headers(), input);
    return { goTo: shopOpened ? ownPath(next) : "/open-shop" };
  },
});
