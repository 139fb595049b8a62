import { AppError, type ErrorCode, statusOfCode } from "@/lib/errors";
import { currentRequestId, log } from "@/lib/log";

/** RFC 9457 problem details. `errors` name the fields; `current` carries the newer record of a stale write. */
export type Problem = {
  type: string;
  title: string;
  status: number;
  detail: string;
  code: ErrorCode;
  requestId?: string;
  errors?: { path: string; message: string }[];
  current?: unknown;
};

const titles: Record<ErrorCode, string> = {
  malformed: "Malformed request",
  "signed-out": "Signed out",
  forbidden: "Not allowed",
  unconfirmed: "Address not confirmed",
  "not-found": "Not found",
  stale: "Changed meanwhile",
  conflict: "Conflict",
  "needs-confirming": "Needs confirming",
  "id-in-use": "Id in use",
  "visit-overlap": "Visits overlap",
  "move-not-allowed": "Move not allowed",
  "last-owner": "Last owner",
  "too-large": "Too large",
  "unsupported-type": "Unsupported content type",
  invalid: "Invalid input",
  "too-many-requests": "Too many requests",
  unexpected: "Unexpected fault",
  unavailable: "Unavailable",
};

/** Unexpected errors are logged whole and shown as one plain sentence with the request's number. */
export function asAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  log().error({ err: error }, "unexpected error");
  const number = currentRequestId()?.slice(0, 8) ?? "";
  return new AppError(
    "unexpected",
    `Something went wrong on our side; nothing was saved. Try again. Note ${number} for support.`,
  );
}

function problemOf(error: AppError): Problem {
  const { fields, current } = error.more;
  return {
    type: `/problems/${error.code}`,
    title: titles[error.code],
    status: statusOfCode[error.code],
    detail: error.message,
    code: error.code,
    requestId: currentRequestId(),
    ...(fields ? { errors: Object.entries(fields).map(([path, message]) => ({ path, message })) } : {}),
    ...(current === undefined ? {} : { current }),
  };
}

export function problemResponse(error: AppError): Response {
  const headers: Record<string, string> = {
    "content-type": "application/problem+json",
    "cache-control": "no-store",
  };
  if (error.more.retryAfterSeconds) headers["retry-after"] = String(error.more.retryAfterSeconds);
  return new Response(JSON.stringify(problemOf(error)), { status: error.status, headers });
}
