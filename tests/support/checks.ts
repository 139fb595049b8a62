import document from "@/tests/reference/checks.json";

/** One check value of tests/reference/checks.json: what to compute, what must come out, and who says so. */
export type Check = {
  id: string;
  description: string;
  source: string;
  status: string;
  inputs: Record<string, number>;
  expected: unknown;
};

export function check(id: string): Check {
  const found = document.checks.find((each) => each.id === id);
  if (!found) throw new Error(`There is no check "${id}"`);
  const inputs = Object.fromEntries(
    Object.entries(found.inputs).filter((entry): entry is [string, number] => typeof entry[1] === "number"),
  );
  const { description, source, status, expected } = found;
  return { id, description, source, status, inputs, expected };
}

/** The expected value of a check that is one number. */
export function checkNumber(id: string): number {
  const { expected } = check(id);
  if (typeof expected !== "number") throw new Error(`"${id}" is not one number`);
  return expected;
}

/** The expected value of a check that is a table of numbers by name. */
export function checkTable(id: string): Record<string, number> {
  return numbersOf(check(id).expected, id);
}

export function numbersOf(value: unknown, id: string): Record<string, number> {
  if (typeof value !== "object" || value === null) throw new Error(`"${id}" is no table`);
  return Object.fromEntries(
    Object.entries(value).map(([name, entry]: [string, unknown]) => {
      if (typeof entry !== "number") throw new Error(`"${id}" has no number at "${name}"`);
      return [name, entry];
    }),
  );
}

/** An input of a check. */
export function input({ id, inputs }: Check, name: string): number {
  const value = inputs[name];
  if (value === undefined) throw new Error(`"${id}" has no input "${name}"`);
  return value;
}
