/** The name of the database constraint that refused a write, wherever the driver or a wrapper put it. */
export function constraintOf(error: unknown): string | null {
  for (let at = error, depth = 0; at && typeof at === "object" && depth < 4; depth++) {
    if ("constraint_name" in at && typeof at.constraint_name === "string") return at.constraint_name;
    at = "cause" in at ? at.cause : null;
  }
  return null;
}
