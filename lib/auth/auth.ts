import "server-only";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { APIError, createAuthMiddleware } from "better-auth/api";
import { hashPassword, verifyPassword } from "better-auth/crypto";
import { nextCookies } from "better-auth/next-js";
import { twoFactor } from "better-auth/plugins";
import { eq } from "drizzle-orm";
import { authDb } from "@/db/client";
import { account, person, rateLimit, twoFactor as secondStep, session, verification } from "@/db/schema";
import { countRequest } from "@/lib/doors/rate-limit";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { log } from "@/lib/log";
import { sendMail } from "@/lib/mail/send";
import { passwordResetMail } from "@/lib/mail/templates/password-reset";
import { longest, normalisePassword, passwordFault, shortestWithSecondStep } from "./passwords";

function localOrigins(appUrl: string): string[] {
  const { port, protocol } = new URL(appUrl);
  return env().LOCAL_SERVICES ? ["127.0.0.1", "localhost"].map((host) => `${protocol}//${host}:${port}`) : [];
}

/** Paths that set a password, and the field it comes in. */
const passwordFields: Record<string, string> = {
  "/sign-up/email": "password",
  "/reset-password": "newPassword",
  "/change-password": "newPassword",
};

function build() {
  const settings = env();
  return betterAuth({
    appName: "Agraffe",
    baseURL: settings.APP_URL,
    basePath: "/api/auth",
    secret: settings.AUTH_SECRET,
    trustedOrigins: [settings.APP_URL, ...localOrigins(settings.APP_URL)],
    telemetry: { enabled: false },
    logger: {
      log: (level, message) =>
        log()[level === "error" ? "error" : level === "warn" ? "warn" : "debug"](message),
    },
    database: drizzleAdapter(authDb(), {
      provider: "pg",
      schema: { user: person, session, account, verification, twoFactor: secondStep, rateLimit },
    }),
    emailAndPassword: {
      enabled: true,
      minPasswordLength: shortestWithSecondStep,
      maxPasswordLength: longest,
      resetPasswordTokenExpiresIn: 60 * 60,
      revokeSessionsOnPasswordReset: true,
      password: {
        hash: (password) => hashPassword(normalisePassword(password)),
        verify: ({ hash, password }) => verifyPassword({ hash, password: normalisePassword(password) }),
      },
      sendResetPassword: async ({ user, token }) => {
        const link = `${settings.APP_URL}/reset-password?token=${encodeURIComponent(token)}`;
        await sendMail(passwordResetMail({ to: user.email, name: user.name, link }));
      },
    },
    session: {
      expiresIn: 30 * 24 * 60 * 60,
      updateAge: 24 * 60 * 60,
      additionalFields: { shopId: { type: "string", required: false, input: false } },
    },
    rateLimit: {
      enabled: true,
      storage: "database",
      window: 60,
      max: 120,
      customRules: {
        "/sign-in/email": { window: 60, max: 20 },
        "/sign-up/email": { window: 600, max: 20 },
        "/request-password-reset": { window: 600, max: 10 },
        "/two-factor/*": { window: 60, max: 10 },
        "/get-session": false,
      },
    },
    advanced: {
      cookiePrefix: "agraffe",
      database: { generateId: () => newId() },
      defaultCookieAttributes: { sameSite: "lax", httpOnly: true },
    },
    hooks: {
      before: createAuthMiddleware(async (context) => {
        if (context.path === "/sign-in/email") await slowDownGuessing(String(context.body?.email ?? ""));
        const field = passwordFields[context.path];
        if (!field) return;
        const fault = passwordFault(String(context.body?.[field] ?? ""), {
          secondStep: context.path === "/change-password" && (await hasSecondStep(context.headers)),
          context: [String(context.body?.name ?? ""), String(context.body?.email ?? "").split("@")[0] ?? ""],
        });
        if (fault) throw new APIError("UNPROCESSABLE_ENTITY", { code: "WEAK_PASSWORD", message: fault });
      }),
    },
    plugins: [twoFactor({ issuer: "Agraffe" }), nextCookies()],
  });
}

/** Besides the limit per address: an address can be forged in a header, an account cannot. */
async function slowDownGuessing(email: string): Promise<void> {
  const { allowed } = await countRequest(`sign-in:${email.trim().toLowerCase()}`, {
    most: 20,
    seconds: 15 * 60,
  });
  if (!allowed) {
    throw new APIError("TOO_MANY_REQUESTS", {
      code: "TOO_MANY_REQUESTS",
      message: "Too many sign-ins to this account. Wait a quarter of an hour, or reset the password.",
    });
  }
}

async function hasSecondStep(headers: Headers | undefined): Promise<boolean> {
  if (!headers) return false;
  const current = await auth().api.getSession({ headers });
  return Boolean(current?.user.twoFactorEnabled);
}

export type Auth = ReturnType<typeof build>;

let instance: Auth | undefined;

/** Built on first use: the build imports this module without an environment. */
export function auth(): Auth {
  instance ??= build();
  return instance;
}

/** The shop a sign-in works in from now on. The caller has checked the membership. */
export async function rememberShop(sessionId: string, shopId: string): Promise<void> {
  await authDb().update(session).set({ shopId }).where(eq(session.id, sessionId));
}
