import { NetworkError, ProblemError } from "@/lib/client/fetch-json";
import { noteRecord } from "@/lib/readings/schema";
import type { Trouble } from "./sheet-row";

export type Failure = { trouble: Trouble; faults: Record<number, string> };

/** What a failed save means for one row, whose readings were sent in the order of `partials`. */
export function failureOf(error: unknown, partials: readonly number[], path = "readings"): Failure {
  const plain = (trouble: Trouble): Failure => ({ trouble, faults: {} });
  if (error instanceof NetworkError) return plain({ kind: "network" });
  if (!(error instanceof ProblemError)) {
    return plain({ kind: "refused", message: "Something went wrong. What you typed is still here." });
  }
  const { status, problem, message } = error;
  if (status === 401) return plain({ kind: "signed-out" });
  // The server is away, or asks for patience: as good as no answer.
  if (status === 429 || status === 502 || status === 503 || status === 504) return plain({ kind: "network" });
  if (problem.code === "stale") {
    const theirs = noteRecord.safeParse(problem.current);
    return plain({ kind: "stale", theirs: theirs.success ? theirs.data : null });
  }
  const own = (problem.errors ?? []).filter((fault) => `${fault.path}.`.startsWith(`${path}.`));
  const faults: Record<number, string> = {};
  for (const fault of own) {
    const partial = partials[Number(fault.path.slice(path.length + 1).split(".")[0])];
    if (partial !== undefined && !faults[partial]) faults[partial] = fault.message;
  }
  const whole = (problem.errors ?? []).find((fault) => fault.path === path || fault.path.endsWith("midi"));
  return { trouble: { kind: "refused", message: whole?.message ?? message }, faults };
}

/** Whether a refusal of many rows speaks of this one. */
export function concerns(error: unknown, index: number): boolean {
  return (
    error instanceof ProblemError &&
    (error.problem.errors ?? []).some((fault) => fault.path.startsWith(`notes.${index}.`))
  );
}
