"use server";

import { revalidatePath } from "next/cache";
import { headers } from "next/headers";
import { z } from "zod";
import { defineAction } from "@/lib/doors/define-action";
import {
  changeName,
  changePassword,
  endOtherSessions,
  endSession,
  switchShop,
} from "@/lib/people/account/service";
import {
  codeInput,
  nameInput,
  passwordChange,
  passwordCheck,
  sessionId,
  shopChoice,
} from "@/lib/people/schema";
import { beginTwoStep, confirmTwoStep, endTwoStep, newRecoveryCodes } from "@/lib/people/two-step/service";

const permission = "account.change";
/** Each of these asks for the password or a code, so they are guesses too. */
const limit = { most: 20, seconds: 300 };

const showAccount = () => revalidatePath("/", "layout");

export const changeNameAction = defineAction({
  name: "account.change-name",
  permission,
  input: nameInput,
  run: async (actor, { name }) => {
    await changeName(actor, await headers(), name);
    showAccount();
    return { name };
  },
});

export const changePasswordAction = defineAction({
  name: "account.change-password",
  permission,
  input: passwordChange,
  limit,
  run: async (actor, input) => {
    await changePassword(actor, await headers(), input);
    showAccount();
    return null;
  },
});

export const endSessionAction = defineAction({
  name: "account.end-session",
  permission,
  input: sessionId,
  run: async (actor, { id }) => {
    await endSession(actor, await headers(), id);
    showAccount();
    return { id };
  },
});

export const endOtherSessionsAction = defineAction({
  name: "account.end-other-sessions",
  permission,
  input: z.object({}),
  run: async (actor) => {
    await endOtherSessions(actor, await headers());
    showAccount();
    return null;
  },
});

export const beginTwoStepAction = defineAction({
  name: "account.begin-two-step",
  permission,
  input: passwordCheck,
  limit,
  run: async (actor, { password }) => beginTwoStep(actor, await headers(), password),
});

/** Shows the page anew only when the codes have been read: they are shown this once. */
export const confirmTwoStepAction = defineAction({
  name: "account.confirm-two-step",
  permission,
  input: codeInput,
  limit,
  run: async (actor, { code }) => {
    await confirmTwoStep(actor, await headers(), code);
    return null;
  },
});

export const endTwoStepAction = defineAction({
  name: "account.end-two-step",
  permission,
  input: passwordCheck,
  limit,
  run: async (actor, { password }) => {
    await endTwoStep(actor, await headers(), password);
    showAccount();
    return null;
  },
});

export const newRecoveryCodesAction = defineAction({
  name: "account.new-recovery-codes",
  permission,
  input: passwordCheck,
  limit,
  run: async (actor, { password }) => ({
    recoveryCodes: await newRecoveryCodes(actor, await headers(), password),
  }),
});

export const switchShopAction = defineAction({
  name: "account.switch-shop",
  permission,
  input: shopChoice,
  run: async (actor, { shopId }) => {
    await switchShop(actor, shopId);
    return { goTo: "/" };
  },
});
