"use server";

import { defineAction } from "@/lib/doors/define-action";
import { resetInput } from "@/lib/people/schema";
import { resetPassword } from "@/lib/people/sign-in/service";

export const resetPasswordAction = defineAction({
  name: "sign-in.reset-password",
  permission: "anyone",
  input: resetInput,
  limit: { most: 30, seconds: 600 },
  run: async (_actor, input) => {
    await resetPassword(input);
    return { goTo: "/sign-in?done=password" };
  },
});
