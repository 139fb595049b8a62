import "server-only";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { APIError } from "better-auth/api";
import { hashPassword, verifyPassword } from "better-auth/crypto";
import { nextCookies } from "better-auth/next-js";
import { twoFactor } from "better-auth/plugins";
import { eq } from "drizzle-orm";
import { authDb } from "@/db/client";
import { account, person, rateLimit, twoFactor as secondStep, session, verification } from "@/db/schema";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { log } from "@/lib/log";
import { mailInBackground } from "@/lib/mail/send";
import { passwordResetMail } from "@/lib/mail/templates/password-reset";
import { afterAccountWrite, beforeAccountWrite } from "./guards";
import { longest, normalisePassword, shortestWithSecondStep } from "./passwords";

function localOrigins(appUrl: string): string[] {
  const { port, protocol } = new URL(appUrl);
  return env().LOCAL_SERVICES ? ["127.0.0.1", "localhost"].map((host) => `${protocol}//${host}:${port}`) : [];
}

/** What the product does not use is not reachable either. */
const closedPaths = [
  "/account-info",
  "/change-email",
  "/delete-user",
  "/delete-user/callback",
  "/get-access-token",
  "/link-social",
  "/list-accounts",
  "/refresh-token",
  "/send-verification-email",
  "/sign-in/social",
  "/two-factor/send-otp",
  "/two-factor/verify-otp",
  "/unlink-account",
  "/update-session",
  "/update-user",
  "/verify-email",
];

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
        // Not awaited: how long the answer takes must not tell whether the address is known.
        mailInBackground(passwordResetMail({ to: user.email, name: user.name, link }));
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
    disabledPaths: closedPaths,
    advanced: {
      disableOriginCheck: false,
      disableCSRFCheck: false,
      cookiePrefix: "agraffe",
      database: { generateId: () => newId() },
      defaultCookieAttributes: { sameSite: "lax", httpOnly: true },
    },
    hooks: { before: beforeAccountWrite, after: afterAccountWrite },
    databaseHooks: {
      user: {
        create: { before: async (user) => ({ data: { ...user, name: plainName(user.name), image: null } }) },
      },
    },
    plugins: [twoFactor({ issuer: "Agraffe" }), nextCookies()],
  });
}

/** A name goes into mails and headings: one line, of a length that fits. */
function plainName(name: string): string {
  const plain = name
    .replace(/[\p{Cc}\p{Cf}\s]+/gu, " ")
    .trim()
    .slice(0, 120);
  if (!plain)
    throw new APIError("UNPROCESSABLE_ENTITY", { code: "NAME_MISSING", message: "Give your name." });
  return plain;
}

export type Auth = ReturnType<typeof build>;

let instance: Auth | undefined;

/** Built on first use: the build imports this module without an environment. */
export function auth(): Auth {
  instance ??= build();
  return instance;
}

/** The shop a sign-in works in from now on. The caller has checked the membership. */
export async function rememberShop(
  which: { sessionId: string } | { token: string },
  shopId: string,
): Promise<void> {
  const where = "token" in which ? eq(session.token, which.token) : eq(session.id, which.sessionId);
  await authDb().update(session).set({ shopId }).where(where);
}

/** Asked only for the holder of a link that was mailed to this address. */
export async function addressIsKnown(email: string): Promise<boolean> {
  const rows = await authDb().select({ id: person.id }).from(person).where(eq(person.email, email));
  return rows.length > 0;
}
