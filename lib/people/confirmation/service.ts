import "server-only";
import { verifyJWT } from "better-auth/crypto";
import { z } from "zod";
import { auth } from "@/lib/auth/auth";
import { ownPath } from "@/lib/auth/next-path";
import { refusalsInWords } from "@/lib/auth/outcome";
import { AppError, invalid } from "@/lib/errors";
import { hashToken } from "@/lib/ids";
import { log } from "@/lib/log";
import { requireMail } from "@/lib/mail/send";
import { openShop } from "@/lib/people/opening/service";
import { keptSignUp, takeSignUp } from "@/lib/people/sign-up/kept-sign-up";

/** A link confirms the one sign-up it was made for; a later sign-up with the same address replaces that. */
const claims = z.object({ email: z.string(), userId: z.string(), updateTo: z.undefined().optional() });

async function personBehind(token: string) {
  const { internalAdapter, secret } = await auth().$context;
  const claimed = claims.safeParse(await verifyJWT(token, secret));
  if (!claimed.success) return null;
  const person = await internalAdapter.findUserById(claimed.data.userId);
  return person?.email === claimed.data.email ? person : null;
}

async function isBrowserOf(personId: string, browserToken: string | undefined): Promise<boolean> {
  if (!browserToken) return false;
  return (await keptSignUp(personId))?.browser === hashToken(browserToken);
}

export type Confirmation =
  | { state: "dead" }
  | { state: "done" }
  | { state: "open"; email: string; sameBrowser: boolean };

/** What the mailed link shows. Opening it changes nothing: programs that look through mail open links too. */
export async function confirmationBehind(
  token: string,
  browserToken: string | undefined,
): Promise<Confirmation> {
  const person = await personBehind(token);
  if (!person) return { state: "dead" };
  if (person.emailVerified) return { state: "done" };
  return {
    state: "open",
    email: person.email,
    sameBrowser: await isBrowserOf(person.id, browserToken),
  };
}

/**
 * Confirms the address, signs in and opens the shop that was typed on signing up. Whoever holds the link owns
 * the address, but may not be who signed up with it: another browser than theirs has to know the password, or
 * one could be led into an account of which a stranger keeps the password.
 */
export async function confirmAddress(
  requestHeaders: Headers,
  input: { token: string; password?: string; browserToken: string | undefined },
): Promise<{ goTo: string }> {
  const person = await personBehind(input.token);
  if (!person) throw new AppError("invalid", "This link has expired or was replaced by a newer mail.");
  if (person.emailVerified)
    throw new AppError("conflict", "This address is confirmed already. Sign in with it.");
  if (!(await isBrowserOf(person.id, input.browserToken)))
    await checkPassword(requestHeaders, person.email, input.password ?? "");
  await refusalsInWords(() =>
    auth().api.verifyEmail({ query: { token: input.token }, headers: requestHeaders }),
  );
  const kept = await takeSignUp(person.id);
  if (!kept) return { goTo: "/open-shop" };
  try {
    await openShop({ personId: person.id, name: person.name, email: person.email }, kept.shop);
    return { goTo: ownPath(kept.next) };
  } catch (error) {
    log().error({ err: error }, "the shop of a new person was not opened");
    return { goTo: "/open-shop" };
  }
}

async function checkPassword(requestHeaders: Headers, email: string, password: string): Promise<void> {
  if (!password) throw invalid({ password: "Type the password you chose." });
  try {
    await refusalsInWords(() =>
      auth().api.signInEmail({ body: { email, password }, headers: requestHeaders }),
    );
  } catch (error) {
    if (error instanceof AppError && error.code === "unconfirmed") return;
    if (error instanceof AppError && error.code === "invalid")
      throw invalid({
        password: "This is not the password of this sign-up. If it was not yours, set a new one instead.",
      });
    throw error;
  }
}

/** The same answer in about the same time, whether the address waits to be confirmed or not. */
export async function sendConfirmationAgain(email: string): Promise<void> {
  requireMail();
  await refusalsInWords(() => auth().api.sendVerificationEmail({ body: { email } }));
}
