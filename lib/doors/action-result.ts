import type { ErrorCode, FieldErrors } from "@/lib/errors";

/** What a server action answers: expected errors come back as values, with the fields they belong to. */
export type ActionResult<T> =
  | { ok: true; data: T }
  | { ok: false; error: { code: ErrorCode; message: string; fields?: FieldErrors; current?: unknown } };
