import { describe, expect, it } from "vitest";
import { z } from "zod";
import { AppError } from "@/lib/errors";
import { parseInput } from "./fields";

const schema = z.object({
  name: z.string().min(1, "Give it a name."),
  hz: z.number().max(480),
  parts: z.array(z.object({ text: z.string() })).default([]),
});

function faultsOf(input: unknown): Record<string, string> | undefined {
  try {
    parseInput(schema, input);
  } catch (error) {
    if (error instanceof AppError) return error.more.fields;
    throw error;
  }
  return undefined;
}

describe("input at a door", () => {
  it("names each field in plain words, however the validator puts it", () => {
    expect(faultsOf({ name: "", hz: "abc" })).toEqual({ name: "Give it a name.", hz: "Not a number." });
    expect(faultsOf({ name: "A", hz: 500 })).toEqual({ hz: "Not above 480." });
  });

  it("refuses what is nested too deeply to be read, instead of failing", () => {
    let nested: unknown = "end";
    for (let depth = 0; depth < 20_000; depth += 1) nested = [nested];
    expect(() => parseInput(schema, nested)).toThrow("nested too deeply");
  });

  it("refuses the character that no text of the database can hold, wherever it stands", () => {
    expect(faultsOf({ name: "A\0B", hz: 440 })).toHaveProperty("name");
    expect(faultsOf({ name: "A", hz: 440, parts: [{ text: "fine" }, { text: "\0" }] })).toHaveProperty([
      "parts.1.text",
    ]);
  });

  it("lets everything else through as it is", () => {
    expect(parseInput(schema, { name: "C♯ “Grand”", hz: 440 })).toEqual({
      name: "C♯ “Grand”",
      hz: 440,
      parts: [],
    });
  });
});
