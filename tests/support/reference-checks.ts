import { z } from "zod";
import file from "@/tests/reference/checks.json";
import recorded from "@/tests/reference/recorded-notes.json";

const numbers = z.record(z.string(), z.number());

type Check = { inputs: Record<string, number>; expected: Record<string, number>; source: string };

/** A reference check whose inputs and expected values are tables of numbers; other inputs are left out. */
export function referenceCheck(id: string): Check {
  const found = file.checks.find((check) => check.id === id);
  if (found === undefined) throw new Error(`No reference check ${id}`);
  const inputs = Object.fromEntries(
    Object.entries(found.inputs).filter(([, value]) => typeof value === "number"),
  );
  return { inputs: numbers.parse(inputs), expected: numbers.parse(found.expected), source: found.source };
}

const note = z.object({ midi: z.number(), B: z.number(), sigma_B: z.number(), sigma_total: z.number() });

/**
 * Thirty notes of one grand, every third key, B over partials up to 16. Recordings: Alexander Holm, Salamander Grand
 * Piano V3, CC BY 3.0; estimates made independently with numpy and scipy.
 */
export const recordedNotes = z.array(note).parse(recorded.notes);
