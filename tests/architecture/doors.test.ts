import { describe, expect, it, vi } from "vitest";
import { routes } from "@/app/api/v1/_routes";
import { doorsOf, openApi } from "@/lib/doors/openapi";
import { type Source, sources } from "./sources";

vi.mock("@/lib/auth/auth", () => ({ auth: () => ({}) }));

const all = sources();
const methods = /export const (GET|POST|PUT|PATCH|DELETE)\b/g;

/** Doors that are nobody's in particular: the sign-in library's own, and two probes that must not need a database. */
const unwrapped = new Set([
  "app/api/auth/[...all]/route.ts",
  "app/api/health/live/route.ts",
  "app/api/health/ready/route.ts",
]);

function pathOf(file: string): string {
  return file
    .replace(/^app\/api\/v1/, "")
    .replace(/\/route\.ts$/, "")
    .replace(/\[(\w+)\]/g, "{$1}");
}

const routeFiles = all.filter((source) => /^app\/.*\/route\.tsx?$/.test(source.path));
const actionFiles = all.filter((source) => /^\s*["']use server["']/.test(source.text));

describe("every door is wrapped", () => {
  it("wraps each exported method of each route in defineRoute, under its own name", () => {
    const bare = routeFiles
      .filter((source) => !unwrapped.has(source.path))
      .flatMap((source) => {
        const exported =
          source.text.match(
            /export (?:const|(?:async )?function) (?:GET|HEAD|POST|PUT|PATCH|DELETE|OPTIONS)\b/g,
          ) ?? [];
        const wrapped = [
          ...source.text.matchAll(/export const (\w+) = defineRoute\(\{\s*method: "(\w+)"/g),
        ].filter(([, name, method]) => name === method);
        return exported.length > 0 && exported.length === wrapped.length ? [] : [source.path];
      });
    expect(bare).toEqual([]);
  });

  it("wraps each exported action in defineAction", () => {
    const bare = actionFiles.flatMap((source) => {
      const exported = source.text.match(/^export .*$/gm) ?? [];
      return exported
        .filter((line) => !/^export const \w+ = defineAction\(/.test(line))
        .map((line) => `${source.path}: ${line}`);
    });
    expect(bare).toEqual([]);
  });

  it("keeps inline server actions out of pages: they would be unwrapped doors", () => {
    const inline = all
      .filter((source) => /\n\s+["']use server["']/.test(source.text))
      .map((source: Source) => source.path);
    expect(inline).toEqual([]);
  });

  it("describes every route of the API and no other", () => {
    const found = routeFiles
      .filter((source) => source.path.startsWith("app/api/v1/") && !source.path.includes("openapi.json"))
      .map((source) => pathOf(source.path));
    expect(Object.keys(routes).sort()).toEqual(found.sort());
  });

  it("finds as many doors in the description as the files export", () => {
    for (const source of routeFiles) {
      const module = routes[pathOf(source.path)];
      if (!module) continue;
      expect(doorsOf(module).length, source.path).toBe([...source.text.matchAll(methods)].length);
    }
  });

  it("keeps what answers nothing out of the description, and all else in it", () => {
    const paths = Object.keys(openApi(routes, "https://agraffe.example/api/v1").paths);
    expect(Object.keys(routes).filter((path) => !paths.includes(path))).toEqual(["/[[...nothing]]"]);
  });

  it("gives every operation its own id, a summary and its problems", () => {
    const document = openApi(routes, "https://agraffe.example/api/v1");
    const operations = Object.values(document.paths).flatMap((path) => Object.values(path));
    const ids = operations.map((operation) => operation.operationId);
    expect(new Set(ids).size).toBe(ids.length);
    for (const operation of operations) {
      expect(operation.summary.length).toBeGreaterThan(5);
      expect(Object.keys(operation.responses)).toContain("429");
    }
  });
});
