"use server";

import { cookies, headers } from "next/headers";
import { defineAction } from "@/lib/doors/define-action";
import { signUpForm } from "@/lib/people/schema";
import { signUpCookie } from "@/lib/people/sign-up/kept-sign-up";
import { signUp } from "@/lib/people/sign-up/service";

export const signUpAction = defineAction({
  name: "sign-in.sign-up",
  permission: "anyone",
  input: signUpForm,
  limit: { most: 20, seconds: 600 },
  run: async (_actor, input) => {
    const { browserToken } = await signUp(await headers(), input);
    const { name, options } = await signUpCookie();
    (await cookies()).set(name, browserToken, options);
    return { email: input.email };
  },
});
