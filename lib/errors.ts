/** Expected failures: a stable code, words that are safe to show, and where in the input it happened. */

export const statusOfCode = {
  malformed: 400,
  "signed-out": 401,
  forbidden: 403,
  unconfirmed: 403,
  "not-found": 404,
  stale: 409,
  conflict: 409,
  "needs-confirming": 409,
  "id-in-use": 409,
  "visit-overlap": 409,
  "move-not-allowed": 409,
  "last-owner": 409,
  "too-large": 413,
  "unsupported-type": 415,
  invalid: 422,
  "too-many-requests": 429,
  unexpected: 500,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof statusOfCode;

export type FieldErrors = Record<string, string>;

export class AppError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly more: {
      /** Path of the field, as "readings.3.hz", to what is wrong with it. */
      fields?: FieldErrors;
      /** For `stale`: the record as it is now. For `needs-confirming`: what there is to know before. */
      current?: unknown;
      retryAfterSeconds?: number;
    } = {},
  ) {
    super(message);
    this.name = "AppError";
  }

  get status(): number {
    return statusOfCode[this.code];
  }
}

/** Another shop's record and a missing one are the same thing to the asker. */
export function notFound(what: string): AppError {
  return new AppError("not-found", `This ${what} does not exist, or is not yours to see.`);
}

export function invalid(fields: FieldErrors, message = "Some fields need another look."): AppError {
  return new AppError("invalid", message, { fields });
}

/** Done when it is sent once more with `confirm`: not wrong, but perhaps not what was meant. */
export function needsConfirming(
  message: string,
  more: { fields?: FieldErrors; current?: unknown },
): AppError {
  return new AppError("needs-confirming", message, more);
}

export function stale(what: string, current: unknown): AppError {
  return new AppError(
    "stale",
    `Somebody changed this ${what} meanwhile. Look at the newer version and save again.`,
    {
      current,
    },
  );
}
