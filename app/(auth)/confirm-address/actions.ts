"use server";

import { cookies, headers } from "next/headers";
import { defineAction } from "@/lib/doors/define-action";
import { confirmAddress, sendConfirmationAgain } from "@/lib/people/confirmation/service";
import { confirmationRequest, confirmInput } from "@/lib/people/schema";
import { signUpCookie } from "@/lib/people/sign-up/kept-sign-up";

const limit = { most: 30, seconds: 600 };

export const confirmAddressAction = defineAction({
  name: "sign-in.confirm-address",
  permission: "anyone",
  input: confirmInput,
  limit,
  run: async (_actor, input) => {
    const { name, options } = await signUpCookie();
    const jar = await cookies();
    const going = await confirmAddress(await headers(), { ...input, browserToken: jar.get(name)?.value });
    // Not deleted by name alone: a browser drops a "__Secure-" cookie only when told so securely.
    jar.set(name, "", { ...options, maxAge: 0 });
    return going;
  },
});

export const sendConfirmationAction = defineAction({
  name: "sign-in.send-confirmation",
  permission: "anyone",
  input: confirmationRequest,
  limit,
  run: async (_actor, { email }) => {
    await sendConfirmationAgain(email);
    return { email };
  },
});
