import "server-only";
import { APIError, createAuthMiddleware, getSessionFromCtx } from "better-auth/api";
import { countRequest, forgetRequests } from "@/lib/doors/rate-limit";
import { passwordFault, shortestAlone } from "./passwords";

/** Paths that set a password, and the field it comes in. */
const passwordFields: Record<string, string> = {
  "/sign-up/email": "password",
  "/reset-password": "newPassword",
  "/change-password": "newPassword",
};

type Context = Parameters<Parameters<typeof createAuthMiddleware>[0]>[0];

/** What every account write goes through, whether it comes over HTTP or from one of our actions. */
export const beforeAccountWrite = createAuthMiddleware(async (context) => {
  switch (context.path) {
    case "/sign-in/email":
      return slowDownGuessing(String(context.body?.email ?? ""));
    case "/two-factor/verify-totp":
    case "/two-factor/verify-backup-code":
      refuseTrustedDevice(context);
      if (context.path === "/two-factor/verify-totp") await refuseUsedCode(context);
      return;
    case "/two-factor/disable":
      return refuseShortPasswordAlone(String(context.body?.password ?? ""));
  }
  const field = passwordFields[context.path];
  if (field) await refuseWeakPassword(context, String(context.body?.[field] ?? ""));
});

export const afterAccountWrite = createAuthMiddleware(async (context) => {
  if (context.path !== "/sign-in/email" || context.context.returned instanceof APIError) return;
  await forgetRequests(signInKey(String(context.body?.email ?? "")));
});

function signInKey(email: string): string {
  return `sign-in:${email.trim().toLowerCase()}`;
}

/** Besides the limit per address: an address can be forged in a header, an account cannot. */
async function slowDownGuessing(email: string): Promise<void> {
  const { allowed } = await countRequest(signInKey(email), { most: 20, seconds: 15 * 60 });
  if (!allowed) {
    throw new APIError("TOO_MANY_REQUESTS", {
      code: "TOO_MANY_SIGN_INS",
      message: "Too many sign-ins to this account failed. Wait a quarter of an hour, or reset the password.",
    });
  }
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
