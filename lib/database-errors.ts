/** Constraint violations as PostgreSQL reports them; Drizzle wraps the driver's error as its cause. */
export type Violation = { kind: "unique" | "exclusion" | "check" | "foreign-key"; constraint: string };

const kinds: Record<string, Violation["kind"]> = {
  "23505": "unique",
  "23P01": "exclusion",
  "23514": "check",
  "23503": "foreign-key",
};

export function violationOf(error: unknown): Violation | null {
  for (let current = error; current instanceof Error; current = current.cause) {
    const { code, constraint_name: constraint } = current as Error & {
      code?: unknown;
      constraint_name?: unknown;
    };
    const kind = typeof code === "string" ? kinds[code] : undefined;
    if (kind) return { kind, constraint: typeof constraint === "string" ? constraint : "" };
  }
  return null;
}

export function isUniqueViolation(error: unknown, constraint: string): boolean {
  const violation = violationOf(error);
  return violation?.kind === "unique" && violation.constraint === constraint;
}
