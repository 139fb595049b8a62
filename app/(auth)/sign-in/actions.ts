"use server";

import { headers } from "next/headers";
import { ownPath } from "@/lib/auth/next-path";
import { defineAction } from "@/lib/doors/define-action";
import { signInInput } from "@/lib/people/schema";
import { signIn } from "@/lib/people/sign-in/service";

export const signInAction = defineAction({
  name: "sign-in.password",
  permission: "anyone",
  input: signInInput,
  limit: { most: 40, seconds: 60 },
  run: async (_actor, { next, ...input }) => {
    const { secondStep } = await signIn(await headers(), input);
    const goTo = ownPath(next);
    return { goTo: secondStep ? `/second-step?next=${encodeURIComponent(goTo)}` : goTo };
  },
});
