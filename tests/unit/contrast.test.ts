import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";

/*
 * Every pair of colours that meets on a page, computed from the style sheet itself.
 * Formula and limits: WCAG 2.2, "relative luminance", 1.4.3 (text 4.5), 1.4.6 (7), 1.4.11 (controls 3).
 */

const css = readFileSync(path.join(import.meta.dirname, "../../app/globals.css"), "utf8");

/** The tokens of :root as one colour scheme has them: of light-dark(a, b) the one or the other. */
function tokensOf(scheme: "light" | "dark"): Map<string, string> {
  const at = css.search(/^:root \{\n\s+color-scheme: light dark;/m);
  if (at < 0) throw new Error("no block of tokens");
  const body = css.slice(css.indexOf("{", at) + 1, css.indexOf("}", at));
  return new Map(
    [...body.matchAll(/--([\w-]+):\s*([^;]+);/g)].map(([, name = "", value = ""]) => {
      const pair = /^light-dark\((#[0-9a-f]+), (#[0-9a-f]+)\)$/.exec(value);
      return [name, (scheme === "light" ? pair?.[1] : pair?.[2]) ?? value];
    }),
  );
}

const light = tokensOf("light");
const dark = tokensOf("dark");

function luminance(tokens: Map<string, string>, name: string): number {
  const hex = /^#([0-9a-f]{6})$/i.exec(tokens.get(name) ?? "")?.[1];
  if (!hex) throw new Error(`--${name} is not a plain colour`);
  const [red = 0, green = 0, blue = 0] = [0, 2, 4].map((at) => {
    const share = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(tokens: Map<string, string>, front: string, back: string): number {
  const [high = 0, low = 0] = [luminance(tokens, front), luminance(tokens, back)].sort((a, b) => b - a);
  return (high + 0.05) / (low + 0.05);
}

const pages = ["paper", "sheet", "cover"];
const washes = ["brass-wash", "rust-wash", "iron-wash", "felt-wash", "spruce-wash"];

const pairs: Array<[front: string, back: string, atLeast: number]> = [
  ...[...pages, ...washes].map((back): [string, string, number] => ["ink", back, 7]),
  ...[...pages, ...washes].map((back): [string, string, number] => ["ink-soft", back, 4.5]),
  ...["felt", "brass", "iron", "spruce", "rust"].flatMap((front) =>
    [...pages, "brass-wash"].map((back): [string, string, number] => [front, back, 4.5]),
  ),
  ["rust", "rust-wash", 4.5],
  ["iron", "iron-wash", 4.5],
  ["felt", "felt-wash", 4.5],
  ["spruce", "spruce-wash", 4.5],
  ["on-felt", "felt-fill", 4.5],
  ["on-felt", "felt-press", 4.5],
  ["sheet", "ink", 7],
  ...pages.map((back): [string, string, number] => ["edge", back, 3]),
  ...pages.map((back): [string, string, number] => ["brass-fill", back, 3]),
];

describe.each([
  ["light", light],
  ["dark", dark],
])("contrast in %s", (_, tokens) => {
  it.each(pairs)("%s on %s is at least %d to 1", (front, back, atLeast) => {
    expect(contrast(tokens, front, back)).toBeGreaterThanOrEqual(atLeast);
  });
});

describe("the themes", () => {
  it("say each token once", () => {
    const print = css.indexOf("@media print");
    const said = [...css.slice(0, print).matchAll(/^\s*--([\w-]+):/gm)].map((match) => match[1]);
    expect(said.filter((name, index) => light.has(name ?? "") && said.indexOf(name) !== index)).toEqual([]);
    expect([...dark.keys()].filter((name) => dark.get(name) !== light.get(name)).length).toBeGreaterThan(25);
  });

  it("compute a ratio known from outside: black on white is 21 to 1 (WCAG 2.2)", () => {
    const plain = new Map([
      ["a", "#000000"],
      ["b", "#ffffff"],
    ]);
    expect(contrast(plain, "a", "b")).toBeCloseTo(21, 10);
  });
});
