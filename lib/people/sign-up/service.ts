import "server-only";
import { auth } from "@/lib/auth/auth";
import { refusalsInWords } from "@/lib/auth/outcome";
import { passwordFault } from "@/lib/auth/passwords";
import { withProvenAddress } from "@/lib/auth/proven-address";
import { AppError, invalid } from "@/lib/errors";
import { newToken } from "@/lib/ids";
import { requireMail } from "@/lib/mail/send";
import type { SignUpForm } from "@/lib/people/schema";
import { keepSignUp } from "./kept-sign-up";

type NewPerson = { name: string; email: string; password: string };

function refuseGuessable(password: string, names: readonly string[]): void {
  const fault = passwordFault(password, { context: names });
  if (fault) throw invalid({ password: fault });
}

/**
 * Answers the same whether the address is known or not; what is true is mailed to it. The shop that was typed
 * is kept until the address is confirmed. `browserToken` is for this browser: it will need no password then.
 */
export async function signUp(
  requestHeaders: Headers,
  { next, name, email, password, ...shop }: SignUpForm,
): Promise<{ browserToken: string }> {
  requireMail();
  refuseGuessable(password, [shop.shopName]);
  const { user } = await refusalsInWords(() =>
    auth().api.signUpEmail({ body: { name, email, password }, headers: requestHeaders }),
  );
  const { token, hash } = newToken();
  // For a known address `user` is nobody: it is kept all the same and fetched by no link.
  await keepSignUp(user.id, { browser: hash, next, shop });
  return { browserToken: token };
}

/** For whoever holds a link that was mailed to this address: signed up, confirmed and signed in at once. */
export async function signUpInvited(
  requestHeaders: Headers,
  { name, email, password }: NewPerson,
  alsoGuessable: readonly string[] = [],
): Promise<{ personId: string; name: string; email: string }> {
  refuseGuessable(password, alsoGuessable);
  await refusalsInWords(() =>
    withProvenAddress(email, () =>
      auth().api.signUpEmail({ body: { name, email, password }, headers: requestHeaders }),
    ),
  );
  const answer = await refusalsInWords(() =>
    auth().api.signInEmail({ body: { email, password }, headers: requestHeaders }),
  ).catch((error: unknown) => {
    if (error instanceof AppError && error.code === "invalid") throw alreadyKnown(email);
    throw error;
  });
  if (!("user" in answer)) throw alreadyKnown(email);
  return { personId: answer.user.id, name: answer.user.name, email: answer.user.email };
}

/** Somebody else's sign-up with the address came between. */
function alreadyKnown(email: string): AppError {
  return new AppError(
    "conflict",
    `${email} has a sign-in already. Sign in with it, then accept the invitation.`,
  );
}
