import "server-only";
import { auth } from "@/lib/auth/auth";
import { refusalsInWords } from "@/lib/auth/outcome";
import { countRequest } from "@/lib/doors/rate-limit";
import { AppError } from "@/lib/errors";
import { requireMail } from "@/lib/mail/send";

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

/** The same answer in about the same time, whether the address is known or not. */
export async function requestPasswordReset(email: string): Promise<void> {
  requireMail();
  await refusalsInWords(() => auth().api.requestPasswordReset({ body: { email } }));
}

/** Whether a mailed link can still set a password. Asking changes nothing. */
export async function resetLinkWorks(token: string): Promise<boolean> {
  const { internalAdapter } = await auth().$context;
  const pending = await internalAdapter.findVerificationValue(`reset-password:${token}`);
  return Boolean(pending && pending.expiresAt > new Date());
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
