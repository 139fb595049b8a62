"use server";

import { headers } from "next/headers";
import { z } from "zod";
import { ownPath } from "@/lib/auth/next-path";
import { defineAction } from "@/lib/doors/define-action";
import { signOut } from "@/lib/people/sign-in/service";

export const signOutAction = defineAction({
  name: "sign-in.sign-out",
  permission: "anyone",
  input: z.object({ next: z.string().max(2000).optional() }),
  run: async (_actor, { next }) => {
    await signOut(await headers());
    return { goTo: next ? `/sign-in?next=${encodeURIComponent(ownPath(next))}` : "/sign-in" };
  },
});
