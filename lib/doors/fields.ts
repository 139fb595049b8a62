import type { z } from "zod";
import { AppError, type FieldErrors } from "@/lib/errors";

export function fieldErrorsOf(error: z.ZodError): FieldErrors {
  const fields: FieldErrors = {};
  for (const issue of error.issues) {
    const path = issue.path.map(String).join(".") || "_";
    fields[path] ??= issue.message;
  }
  return fields;
}

/** Input parsed by its schema, or an `invalid` error that names each field. */
export function parseInput<Schema extends z.ZodType>(schema: Schema, input: unknown): z.output<Schema> {
  const result = schema.safeParse(input);
  if (result.success) return result.data;
  const fields = fieldErrorsOf(result.error);
  const count = Object.keys(fields).length;
  throw new AppError(
    "invalid",
    count === 1 ? "One field needs another look." : `${count} fields need another look.`,
    {
      fields,
    },
  );
}
