"use server";

import { headers } from "next/headers";
import { ownPath } from "@/lib/auth/next-path";
import { defineAction } from "@/lib/doors/define-action";
import { codeInput, recoveryCodeInput } from "@/lib/people/schema";
import { confirmCode, confirmRecoveryCode } from "@/lib/people/sign-in/service";

const limit = { most: 30, seconds: 60 };

export const confirmCodeAction = defineAction({
  name: "sign-in.code",
  permission: "anyone",
  input: codeInput,
  limit,
  run: async (_actor, { code, next }) => {
    await confirmCode(await headers(), code);
    return { goTo: ownPath(next) };
  },
});

export const confirmRecoveryCodeAction = defineAction({
  name: "sign-in.recovery-code",
  permission: "anyone",
  input: recoveryCodeInput,
  limit,
  run: async (_actor, { code, next }) => {
    await confirmRecoveryCode(await headers(), code);
    return { goTo: ownPath(next) };
  },
});
