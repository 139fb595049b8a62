import "server-only";
import type { Actor } from "@/lib/auth/actor";
import { auth } from "@/lib/auth/auth";
import { authorise } from "@/lib/auth/authorise";
import { refusalsInWords } from "@/lib/auth/outcome";
import { AppError } from "@/lib/errors";
import { qrPath } from "./qr";

export type TwoStepSetup = {
  /** The same secret twice: to scan, and to type. */
  qr: { path: string; size: number };
  secret: string;
  recoveryCodes: string[];
};

/** Nothing changes at sign-in until a code has been confirmed. */
export async function beginTwoStep(
  actor: Actor,
  requestHeaders: Headers,
  password: string,
): Promise<TwoStepSetup> {
  authorise(actor, "account.change");
  const answer = await refusalsInWords(() =>
    auth().api.enableTwoFactor({ body: { password, method: "totp" }, headers: requestHeaders }),
  );
  if (!("totpURI" in answer)) throw new AppError("unavailable", "Two-step sign-in is not available here.");
  const secret = new URL(answer.totpURI).searchParams.get("secret") ?? "";
  return { qr: qrPath(answer.totpURI), secret, recoveryCodes: answer.backupCodes };
}

export async function confirmTwoStep(actor: Actor, requestHeaders: Headers, code: string): Promise<void> {
  authorise(actor, "account.change");
  await refusalsInWords(() => auth().api.verifyTOTP({ body: { code }, headers: requestHeaders }));
}

/** Without the second step the password stands alone, so it must be long enough to. */
export async function endTwoStep(actor: Actor, requestHeaders: Headers, password: string): Promise<void> {
  authorise(actor, "account.change");
  await refusalsInWords(async () => {
    await auth().api.verifyPassword({ body: { password }, headers: requestHeaders });
    await auth().api.disableTwoFactor({ body: { password }, headers: requestHeaders });
  });
}

/** Ten new codes; the ones before stop working. */
export async function newRecoveryCodes(
  actor: Actor,
  requestHeaders: Headers,
  password: string,
): Promise<string[]> {
  authorise(actor, "account.change");
  const { backupCodes } = await refusalsInWords(() =>
    auth().api.generateBackupCodes({ body: { password }, headers: requestHeaders }),
  );
  return backupCodes;
}
