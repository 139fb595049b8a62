import "server-only";
import type { createAuthMiddleware } from "better-auth/api";
import { hashToken, newToken } from "@/lib/ids";

type Context = Parameters<Parameters<typeof createAuthMiddleware>[0]>[0];

const aYear = 365 * 24 * 60 * 60;

/** One a person and browser. The name keeps several people of one desk apart; the signed value says whose it is. */
function cookieFor(context: Context, whose: string) {
  return context.context.createAuthCookie(`device.${whose.slice(0, 16)}`, { maxAge: aYear });
}

/**
 * The name of this browser, if this account was signed in to from it before, after OWASP's "slow down online
 * guessing attacks with device cookies": such a browser has its own count of wrong passwords, so a stranger
 * who uses up the common one does not lock out the person.
 */
export async function knownDevice(context: Context, email: string): Promise<string | null> {
  const whose = hashToken(email);
  const value = await context.getSignedCookie(cookieFor(context, whose).name, context.context.secret);
  const [owner, device] = value ? value.split(".") : [];
  return owner === whose && device ? device : null;
}

export async function rememberDevice(context: Context, email: string): Promise<void> {
  const whose = hashToken(email);
  const { name, attributes } = cookieFor(context, whose);
  const value = `${whose}.${newToken().token}`;
  await context.setSignedCookie(name, value, context.context.secret, attributes);
}
