"use server";

import { defineAction } from "@/lib/doors/define-action";
import { resetRequest } from "@/lib/people/schema";
import { requestPasswordReset } from "@/lib/people/sign-in/service";

export const requestResetAction = defineAction({
  name: "sign-in.request-reset",
  permission: "anyone",
  input: resetRequest,
  limit: { most: 20, seconds: 600 },
  run: async (_actor, { email }) => {
    await requestPasswordReset(email);
    return { email };
  },
});
