// @vitest-environment happy-dom
import { beforeEach, describe, expect, it } from "vitest";
import { keepDrafts, readKeptDrafts } from "./kept-drafts";
import type { KeptDraft } from "./sheet-answers";

const draft: KeptDraft = {
  place: { midi: 69, string: "all", take: 1 },
  version: 0,
  draft: { cells: {}, kept: [], dropped: [], confirmed: [], removed: false },
};

beforeEach(() => localStorage.clear());

describe("what is typed and not yet saved", () => {
  it("outlives the tab it was typed in", () => {
    keepDrafts("a", [draft]);
    sessionStorage.clear();
    expect(readKeptDrafts("a")).toEqual([draft]);
    expect(readKeptDrafts("b")).toEqual([]);
  });

  it("leaves nothing behind once it is saved", () => {
    keepDrafts("a", [draft]);
    keepDrafts("a", []);
    expect(localStorage.length).toBe(0);
  });

  it("is left out where it cannot be understood any more", () => {
    localStorage.setItem("agraffe:sheet:a", "{broken");
    expect(readKeptDrafts("a")).toEqual([]);
    localStorage.setItem("agraffe:sheet:a", JSON.stringify([{ place: {} }]));
    expect(readKeptDrafts("a")).toEqual([]);
  });
});
