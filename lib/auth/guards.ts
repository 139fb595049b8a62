import "server-only";
import { APIError, createAuthMiddleware, getSessionFromCtx } from "better-auth/api";
import { countRequest, forgetRequests } from "@/lib/doors/rate-limit";
import { mailConfigured } from "@/lib/mail/send";
import { knownDevice, rememberDevice } from "./device-cookie";
import { nobody } from "./nobody";
import { passwordFault, shortestAlone } from "./passwords";
import { plainName } from "./plain-name";
import { isProvenAddress } from "./proven-address";

/** Paths that set a password, and the field it comes in. */
const passwordFields: Record<string, string> = {
  "/reset-password": "newPassword",
  "/change-password": "newPassword",
};

type Context = Parameters<Parameters<typeof createAuthMiddleware>[0]>[0];

/** What every account write goes through, whether it comes over HTTP or from one of our actions. */
export const beforeAccountWrite = createAuthMiddleware(async (context) => {
  switch (context.path) {
    case "/sign-in/email":
      return slowDownGuessing(context);
    case "/two-factor/verify-totp":
    case "/two-factor/verify-backup-code":
      refuseTrustedDevice(context);
      if (context.path === "/two-factor/verify-totp") await refuseUsedCode(context);
      return;
    case "/two-factor/disable":
      return refuseShortPasswordAlone(String(context.body?.password ?? ""));
    case "/sign-up/email":
      return prepareSignUp(context);
  }
  const field = passwordFields[context.path];
  if (field) await refuseWeakPassword(context, String(context.body?.[field] ?? ""));
});

export const afterAccountWrite = createAuthMiddleware(async (context) => {
  if (context.context.returned instanceof APIError) return;
  if (context.path === "/sign-in/email") await forgetRequests(await guessKey(context));
  const signedIn = context.context.newSession?.user;
  if (!signedIn) return;
  // With a second step the password alone is not a sign-in yet: this comes again after the code.
  if (context.path === "/sign-in/email" && "twoFactorEnabled" in signedIn && signedIn.twoFactorEnabled)
    return;
  await rememberDevice(context, signedIn.email.toLowerCase());
});

async function guessKey(context: Context): Promise<string> {
  const email = String(context.body?.email ?? "")
    .trim()
    .toLowerCase();
  const device = await knownDevice(context, email);
  return device ? `sign-in:${email}:${device}` : `sign-in:${email}`;
}

/** Besides the limit per address: whoever guesses has many addresses, an account is one. */
async function slowDownGuessing(context: Context): Promise<void> {
  const { allowed } = await countRequest(await guessKey(context), { most: 20, seconds: 15 * 60 });
  if (!allowed) {
    throw new APIError("TOO_MANY_REQUESTS", {
      code: "TOO_MANY_SIGN_INS",
      message: "Too many sign-ins to this account failed. Wait a quarter of an hour, or reset the password.",
    });
  }
}

/**
 * What is refused here is refused whether the address is known or not. A sign-up that was never confirmed
 * makes way for the next one with its address: its link dies with it, so nobody confirms another's password.
 */
async function prepareSignUp(context: Context) {
  const email = String(context.body?.email ?? "").toLowerCase();
  const password = String(context.body?.password ?? "");
  const name = String(context.body?.name ?? "");
  if (!plainName(name))
    throw new APIError("UNPROCESSABLE_ENTITY", { code: "NAME_MISSING", message: "Give your name." });
  await refuseWeakPassword(context, password);
  if (!isProvenAddress(email) && !mailConfigured()) {
    throw new APIError("SERVICE_UNAVAILABLE", {
      code: "NO_MAIL",
      message: "Mail is not set up on this server, so an address cannot be confirmed. Set SMTP_URL.",
    });
  }
  if (!isProvenAddress(email)) {
    // Of two at once the second would fail where the address is free, and only there. It gets the usual answer.
    const { allowed } = await countRequest(`sign-up:${email}`, { most: 1, seconds: 10 });
    if (!allowed) {
      await context.context.password.hash(password);
      return context.json({ token: null, user: nobody(name, email) });
    }
  }
  await context.context.adapter.deleteMany({
    model: "user",
    where: [
      { field: "email", value: email },
      { field: "emailVerified", value: false },
    ],
  });
}

/** A device that skips the second step would make a stolen laptop enough. */
function refuseTrustedDevice(context: Context): void {
  if (!context.body?.trustDevice) return;
  throw new APIError("BAD_REQUEST", {
    code: "TRUST_NOT_OFFERED",
    message: "The second step is asked at every sign-in.",
  });
}

/** A code read over a shoulder must not work a second time while its half minute lasts. */
async function refuseUsedCode(context: Context): Promise<void> {
  const cookie = context.context.createAuthCookie("two_factor");
  const challenge = await context.getSignedCookie(cookie.name, context.context.secret);
  if (!challenge) return;
  const pending = await context.context.internalAdapter.findVerificationValue(challenge);
  if (!pending) return;
  const code = String(context.body?.code ?? "");
  const { allowed } = await countRequest(`code:${pending.value}:${code}`, { most: 1, seconds: 180 });
  if (!allowed) {
    throw new APIError("UNAUTHORIZED", {
      code: "CODE_USED",
      message: "This code was tried already. Wait for the next one.",
    });
  }
}

function refuseShortPasswordAlone(password: string): void {
  if ([...password.normalize("NFKC")].length >= shortestAlone) return;
  throw new APIError("UNPROCESSABLE_ENTITY", {
    code: "PASSWORD_SHORT_ALONE",
    message: `Without the second step a password needs ${shortestAlone} characters. Choose a longer one first.`,
  });
}

async function refuseWeakPassword(context: Context, password: string): Promise<void> {
  const who = await whosePassword(context);
  const fault = passwordFault(password, {
    secondStep: who.secondStep,
    context: [who.name, who.email.split("@")[0] ?? "", who.email.split("@")[1]?.split(".")[0] ?? ""],
  });
  if (fault) throw new APIError("UNPROCESSABLE_ENTITY", { code: "WEAK_PASSWORD", message: fault });
}

async function whosePassword(
  context: Context,
): Promise<{ name: string; email: string; secondStep: boolean }> {
  if (context.path === "/sign-up/email") {
    return {
      name: String(context.body?.name ?? ""),
      email: String(context.body?.email ?? ""),
      secondStep: false,
    };
  }
  const person =
    context.path === "/reset-password"
      ? await personOfResetLink(context)
      : (await getSessionFromCtx(context))?.user;
  return {
    name: person?.name ?? "",
    email: person?.email ?? "",
    secondStep: Boolean(person && "twoFactorEnabled" in person && person.twoFactorEnabled),
  };
}

async function personOfResetLink(context: Context) {
  const { internalAdapter } = context.context;
  const token = String(context.body?.token ?? "");
  const pending = await internalAdapter.findVerificationValue(`reset-password:${token}`);
  return pending ? internalAdapter.findUserById(pending.value) : null;
}
