import { expect, test } from "vitest";
import { readSpan } from "./visit-span";

const at = (query: string) => readSpan(new URLSearchParams(query), "2026-05-14");

test("the ledger opens on what is to come, the nearest first", () => {
  expect(at("")).toEqual({ name: "coming", from: "2026-05-14", to: undefined, latestFirst: false });
  expect(at("when=nonsense").name).toBe("coming");
});

test("past visits end yesterday and begin with the latest", () => {
  expect(at("when=past")).toEqual({ name: "past", from: undefined, to: "2026-05-13", latestFirst: true });
});

test("days in the address go before the word, and what is no day is not asked of the server", () => {
  expect(at("when=past&from=2026-01-01&to=2026-01-31")).toMatchObject({
    name: "days",
    from: "2026-01-01",
    to: "2026-01-31",
  });
  expect(at("from=2026-02-30").name).toBe("coming");
});
