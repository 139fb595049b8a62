import { describe, expect, it } from "vitest";
import { ownPath } from "./next-path";

describe("the page after sign-in", () => {
  it.each(["/", "/visits?day=2026-05-14#first", "/instruments/1/sheets", "/invitation/abc-DEF_1"])(
    "may be %s",
    (path) => {
      expect(ownPath(path)).toBe(path);
    },
  );

  it.each([
    "https://elsewhere.example/",
    "//elsewhere.example/",
    "///elsewhere.example",
    "/\\elsewhere.example",
    "\\\\elsewhere.example",
    "/\t/elsewhere.example",
    "/\n/elsewhere.example",
    "/./%2e//elsewhere.example",
    "/..//elsewhere.example",
    "javascript:alert(1)",
    "visits",
    "",
    "/sign-in?next=/sign-in",
    "/second-step",
    "/api/auth/sign-out",
    `/${"x".repeat(3000)}`,
    ["/visits"],
    undefined,
  ])("is never %j", (next) => {
    expect(ownPath(next)).toBe("/");
  });
});
