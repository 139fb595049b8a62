import { z } from "zod";
import { advise } from "./advise";
import { beats } from "./beats";
import { compare } from "./compare";
import { fit } from "./fit";
import { keyboard } from "./keyboard";
import {
  adviseSchema,
  beatsSchema,
  compareSchema,
  fitSchema,
  keyboardSchema,
  stretchSchema,
  temperamentSchema,
} from "./schemas";
import { stretch } from "./stretch";
import { describeTemperament } from "./temperament";
import { AcousticsError, type BuiltInStyle, type Style, type Temperament } from "./types";

/** The computation behind a door that takes JSON: one document in, one out, errors with code, message and path. */

type Verb = { input: z.ZodType; run: (document: unknown) => unknown };

function verb<Schema extends z.ZodType>(input: Schema, run: (parsed: z.output<Schema>) => unknown): Verb {
  return { input, run: (document) => run(checked(input, document)) };
}

// JSON brings names as plain text; the functions check them and answer with the list of those there are.
type Named = { style?: string | Style; temperament?: string | number[] };
function named<Input extends Named>(input: Input) {
  return input as Input & { style?: BuiltInStyle | Style; temperament?: Temperament };
}

export const verbs: Readonly<Record<string, Verb>> = {
  fit: verb(fitSchema, fit),
  keyboard: verb(keyboardSchema, keyboard),
  stretch: verb(stretchSchema, (input) => stretch(named(input))),
  advise: verb(adviseSchema, (input) => advise(named(input))),
  beats: verb(beatsSchema, (input) => beats(named(input))),
  temperament: verb(temperamentSchema, (input) => describeTemperament(named(input))),
  compare: verb(compareSchema, compare),
};

export type Refusal = { error: { code: string; message: string; path: string } };

export type Answer = { ok: boolean; document: unknown };

/**
 * Answer one document, given as JSON text. An array is answered element by element, a bad element with an error object in
 * its place; `ok` is false when the whole document is refused.
 */
export function answer(verbName: string, text: string): Answer {
  const found = Object.hasOwn(verbs, verbName) ? verbs[verbName] : undefined;
  if (!found) {
    const message = `There is no verb "${verbName}". The verbs are: ${Object.keys(verbs).join(", ")}.`;
    return { ok: false, document: { error: { code: "unknown-verb", message, path: "" } } };
  }
  let document: unknown;
  try {
    document = JSON.parse(text);
  } catch {
    const message = "This is not a JSON document. JSON knows no NaN and no Infinity.";
    return { ok: false, document: { error: { code: "not-json", message, path: "" } } };
  }
  if (Array.isArray(document)) {
    return { ok: true, document: document.map((element) => answerOne(found, element).document) };
  }
  return answerOne(found, document);
}

function answerOne(found: Verb, element: unknown): Answer {
  try {
    return { ok: true, document: found.run(element) };
  } catch (error) {
    if (!(error instanceof AcousticsError)) throw error;
    const { code, message, path } = error;
    return { ok: false, document: { error: { code, message, path } } satisfies Refusal };
  }
}

/** JSON schema of a verb's input, or null when there is no such verb. */
export function describeVerb(verbName: string): unknown {
  const found = Object.hasOwn(verbs, verbName) ? verbs[verbName] : undefined;
  return found ? z.toJSONSchema(found.input, { io: "input" }) : null;
}

function checked<Schema extends z.ZodType>(schema: Schema, document: unknown): z.output<Schema> {
  const result = schema.safeParse(document);
  if (result.success) return result.data;
  const issue = deepest(result.error.issues);
  throw new AcousticsError(codeOf(issue), issue?.message ?? "This input is not understood.", pathOf(issue));
}

type Issue = z.core.$ZodIssue;

/** Of a choice between shapes, the complaint of the shape that came nearest. */
function deepest(issues: readonly Issue[], above: readonly PropertyKey[] = []): Issue | undefined {
  const [first] = issues;
  if (!first) return undefined;
  const here = { ...first, path: [...above, ...first.path] };
  if (first.code !== "invalid_union") return here;
  const inner = first.errors
    .map((each) => deepest(each, here.path))
    .reduce((best, each) => ((each?.path.length ?? 0) > (best?.path.length ?? 0) ? each : best), undefined);
  return inner && inner.path.length > here.path.length ? inner : here;
}

function codeOf(issue: Issue | undefined): string {
  if (issue?.code !== "invalid_type") return "wrong-shape";
  return issue.expected === "number" ? "not-a-number" : "wrong-type";
}

function pathOf(issue: Issue | undefined): string {
  return (issue?.path ?? []).reduce<string>((path, step) => {
    if (typeof step === "number") return `${path}[${step}]`;
    return path === "" ? String(step) : `${path}.${String(step)}`;
  }, "");
}
