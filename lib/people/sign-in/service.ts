import "server-only";
import { auth } from "@/lib/auth/auth";
import { refusalsInWords } from "@/lib/auth/outcome";
import { passwordFault } from "@/lib/auth/passwords";
import { countRequest } from "@/lib/doors/rate-limit";
import { AppError, invalid } from "@/lib/errors";
import { log } from "@/lib/log";
import { requireMail } from "@/lib/mail/send";
import { openShop } from "@/lib/people/opening/service";
import type { SignUpInput } from "@/lib/people/schema";

/** Signing in sends no mail and says the same words whether the address or the password is wrong. */
export async function signIn(
  requestHeaders: Headers,
  input: { email: string; password: string; stay: boolean },
): Promise<{ secondStep: boolean }> {
  const answer = await refusalsInWords(() =>
    auth().api.signInEmail({
      body: { email: input.email, password: input.password, rememberMe: input.stay },
      headers: requestHeaders,
    }),
  );
  return { secondStep: "twoFactorRedirect" in answer && Boolean(answer.twoFactorRedirect) };
}

export async function confirmCode(requestHeaders: Headers, code: string): Promise<void> {
  await refusalsInWords(() => auth().api.verifyTOTP({ body: { code }, headers: requestHeaders }));
}

/** Each recovery code works once. */
export async function confirmRecoveryCode(requestHeaders: Headers, code: string): Promise<void> {
  await refusalsInWords(() => auth().api.verifyBackupCode({ body: { code }, headers: requestHeaders }));
}

export async function signOut(requestHeaders: Headers): Promise<void> {
  await auth().api.signOut({ headers: requestHeaders });
}

export async function signUpPerson(
  requestHeaders: Headers,
  input: { name: string; email: string; password: string },
  alsoGuessable: readonly string[] = [],
): Promise<{ personId: string; name: string; email: string; token: string | null }> {
  const fault = passwordFault(input.password, { context: alsoGuessable });
  if (fault) throw invalid({ password: fault });
  const { user, token } = await refusalsInWords(() =>
    auth().api.signUpEmail({
      body: { name: input.name, email: input.email, password: input.password },
      headers: requestHeaders,
    }),
  );
  return { personId: user.id, name: user.name, email: user.email, token };
}

/**
 * A person, and then their shop. A person whose shop could not be opened is signed in all the same; the
 * page /open-shop finishes it.
 */
export async function signUpWithShop(
  requestHeaders: Headers,
  input: SignUpInput,
): Promise<{ shopOpened: boolean }> {
  const person = await signUpPerson(requestHeaders, input, [input.shopName]);
  try {
    await openShop(person, input);
    return { shopOpened: true };
  } catch (error) {
    log().error({ err: error }, "the shop of a new person was not opened");
    return { shopOpened: false };
  }
}

/** The same answer in about the same time, whether the address is known or not. */
export async function requestPasswordReset(email: string): Promise<void> {
  requireMail();
  const { allowed } = await countRequest(`reset-mail:${email}`, { most: 5, seconds: 60 * 60 });
  // A known address would be flooded, an unknown one not: neither asker learns which it was.
  if (!allowed) return;
  await refusalsInWords(() => auth().api.requestPasswordReset({ body: { email } }));
}

/** Ends every session of the person and begins none: the next sign-in asks for the second step as before. */
export async function resetPassword(input: { token: string; password: string }): Promise<void> {
  const { allowed } = await countRequest(`reset-link:${input.token.slice(0, 64)}`, {
    most: 20,
    seconds: 3600,
  });
  if (!allowed) throw new AppError("too-many-requests", "Too many tries with this link. Ask for a new one.");
  await refusalsInWords(() =>
    auth().api.resetPassword({ body: { newPassword: input.password, token: input.token } }),
  );
}
