import "server-only";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { hashPassword, verifyPassword } from "better-auth/crypto";
import { nextCookies } from "better-auth/next-js";
import { twoFactor } from "better-auth/plugins";
import { and, eq } from "drizzle-orm";
import { authDb } from "@/db/client";
import { account, person, rateLimit, twoFactor as secondStep, session, verification } from "@/db/schema";
import { clientAddressHeader } from "@/lib/doors/client-address";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { log } from "@/lib/log";
import { afterAccountWrite, beforeAccountWrite } from "./guards";
import { nobodyAs } from "./nobody";
import { longest, normalisePassword, shortestWithSecondStep } from "./passwords";
import { mailConfirmationLink, mailResetLink, mailThatAddressIsKnown } from "./person-mails";
import { plainName } from "./plain-name";
import { isProvenAddress } from "./proven-address";

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
      // Signing up answers the same whether the address is known or not; the mail tells its owner which.
      requireEmailVerification: true,
      customSyntheticUser: ({ coreFields, id }) => nobodyAs(coreFields, id),
      onExistingUserSignUp: async ({ user }) => mailThatAddressIsKnown(user.email),
      sendResetPassword: async ({ user, token }) => mailResetLink(user, token),
      onPasswordReset: async ({ user }) => noteProvenAddress(user.id),
    },
    emailVerification: {
      expiresIn: 24 * 60 * 60,
      autoSignInAfterVerification: true,
      sendVerificationEmail: async ({ user, token }) => {
        if (!user.emailVerified) mailConfirmationLink(user.email, token);
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
      ipAddress: { ipAddressHeaders: [clientAddressHeader] },
      database: { generateId: () => newId() },
      defaultCookieAttributes: { sameSite: "lax", httpOnly: true },
    },
    hooks: { before: beforeAccountWrite, after: afterAccountWrite },
    databaseHooks: {
      user: {
        create: {
          before: async (user) => ({
            data: {
              ...user,
              name: plainName(user.name),
              image: null,
              emailVerified: isProvenAddress(user.email),
            },
          }),
        },
      },
    },
    plugins: [twoFactor({ issuer: "Agraffe" }), nextCookies()],
  });
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

/** The link that set the password was mailed to the person's address. */
async function noteProvenAddress(personId: string): Promise<void> {
  await authDb().update(person).set({ emailVerified: true }).where(eq(person.id, personId));
}

/**
 * Asked only for the holder of a link that was mailed to this address. A sign-up that was never confirmed
 * does not count: anybody may have begun it.
 */
export async function addressIsKnown(email: string): Promise<boolean> {
  const rows = await authDb()
    .select({ id: person.id })
    .from(person)
    .where(and(eq(person.email, email), eq(person.emailVerified, true)));
  return rows.length > 0;
}
