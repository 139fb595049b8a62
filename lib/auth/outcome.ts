import { isAPIError } from "better-auth/api";
import { AppError, invalid } from "@/lib/errors";

type Names = { password?: string; currentPassword?: string };

/** The sign-in library's refusals in our words, at the field they belong to. What is not expected is thrown on. */
function asRefusal(error: unknown, names: Names = {}): unknown {
  if (!isAPIError(error)) return error;
  const code = error.body?.code ?? "";
  const message = error.body?.message ?? "";
  const password = names.password ?? "password";
  switch (code) {
    case "INVALID_EMAIL_OR_PASSWORD":
    case "INVALID_EMAIL":
      return new AppError(
        "invalid",
        "The address and the password do not go together. Check both, or set a new password.",
      );
    case "EMAIL_NOT_VERIFIED":
      return new AppError(
        "unconfirmed",
        "Your address is not confirmed yet. Look for our mail, also among the unwanted, and open its link.",
      );
    case "NO_MAIL":
      return new AppError("unavailable", message);
    case "NAME_MISSING":
      return invalid({ name: message });
    case "WEAK_PASSWORD":
    case "PASSWORD_SHORT_ALONE":
      return invalid({ [password]: message }, message);
    case "PASSWORD_TOO_SHORT":
    case "PASSWORD_TOO_LONG":
      return invalid({ [password]: "Use a password of 15 to 256 characters." });
    case "INVALID_PASSWORD":
      return invalid({ [names.currentPassword ?? password]: "This is not your password." });
    case "INVALID_TOKEN":
      return new AppError("invalid", "This link has been used or has expired. Ask for a new one.");
    case "INVALID_CODE":
      return invalid({
        code: "This code does not fit. Codes change every 30 seconds: type the one shown now.",
      });
    case "CODE_USED":
      return invalid({ code: message });
    case "INVALID_BACKUP_CODE":
      return invalid({ code: "This is none of your unused recovery codes." });
    case "INVALID_TWO_FACTOR_COOKIE":
      return new AppError("signed-out", "This sign-in waited too long. Begin again with your password.");
    case "TOO_MANY_ATTEMPTS_REQUEST_NEW_CODE":
      return new AppError("too-many-requests", "Five codes were wrong. Begin again with your password.");
    case "ACCOUNT_TEMPORARILY_LOCKED":
      return new AppError("too-many-requests", "Too many wrong codes. Wait a quarter of an hour.");
    case "TOO_MANY_SIGN_INS":
      return new AppError("too-many-requests", message);
    case "TOTP_ALREADY_ENABLED":
      return new AppError("conflict", "Two-step sign-in is on already. Load the page again.");
    case "TOTP_NOT_ENABLED":
    case "TWO_FACTOR_NOT_ENABLED":
      return new AppError("conflict", "Two-step sign-in is not on. Load the page again.");
  }
  if (error.statusCode === 401)
    return new AppError("signed-out", "You are signed out. Sign in again; what you typed is still here.");
  return error;
}

export async function refusalsInWords<T>(run: () => Promise<T>, names?: Names): Promise<T> {
  try {
    return await run();
  } catch (error) {
    throw asRefusal(error, names);
  }
}
