import type { z } from "zod";
import { AppError, type FieldErrors } from "@/lib/errors";

function fieldErrorsOf(error: z.ZodError): FieldErrors {
  const fields: FieldErrors = {};
  for (const issue of error.issues) {
    const path = issue.path.map(String).join(".") || "_";
    fields[path] ??= plainWords(issue);
  }
  return fields;
}

const kindWords: Record<string, string> = {
  number: "Not a number.",
  int: "Not a whole number.",
  string: "Not a text.",
  boolean: "Say true or false.",
  array: "Not a list.",
  object: "Not a record.",
};

/** The validator's own sentences are written for programmers; ours stand in the schemas. */
function plainWords(issue: z.core.$ZodIssue): string {
  if (!/^Invalid |^Too (big|small)/.test(issue.message)) return issue.message;
  if (issue.code === "invalid_type") {
    return issue.input === undefined && /undefined/.test(issue.message)
      ? "This is missing."
      : (kindWords[issue.expected] ?? "Not what is expected here.");
  }
  if (issue.code === "too_small") return `Not below ${issue.minimum}.`;
  if (issue.code === "too_big") return `Not above ${issue.maximum}.`;
  if (issue.code === "invalid_value") return `One of: ${issue.values.join(", ")}.`;
  if (issue.code === "invalid_format") return "Not written in the way expected here.";
  return "Not what is expected here.";
}

/** The path of a text that holds the character no database text can, or null. */
function nulPath(input: unknown, path: string): string | null {
  if (typeof input === "string") return input.includes("\0") ? path || "_" : null;
  if (typeof input !== "object" || input === null) return null;
  for (const [key, value] of Object.entries(input)) {
    const found = nulPath(value, path ? `${path}.${key}` : key);
    if (found) return found;
  }
  return null;
}

/** Input parsed by its schema, or an `invalid` error that names each field. */
function unkeepablePath(input: unknown): string | null {
  try {
    return nulPath(input, "");
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    throw new AppError("malformed", "This is nested too deeply to be read.");
  }
}

export function parseInput<Schema extends z.ZodType>(schema: Schema, input: unknown): z.output<Schema> {
  const unkeepable = unkeepablePath(input);
  if (unkeepable) {
    throw new AppError("invalid", "One field needs another look.", {
      fields: { [unkeepable]: "Holds a character that cannot be kept. Type it again." },
    });
  }
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
