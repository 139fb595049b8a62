import { describe, expect, it } from "vitest";
import { isPackage, type Source, sources } from "./sources";

const all = sources();

/** Breaches as "file imports target", so that a failure names the line to mend. */
function breaches(
  of: (source: Source) => boolean,
  forbidden: (target: string, source: Source) => boolean,
): string[] {
  return all
    .filter(of)
    .flatMap((source) =>
      source.imports
        .filter((target) => forbidden(target, source))
        .map((target) => `${source.path} imports ${target}`),
    );
}

const within =
  (...folders: string[]) =>
  (source: Source) =>
    folders.some((folder) => source.path.startsWith(folder));
const reaches = (target: string, ...prefixes: string[]) =>
  prefixes.some((prefix) => target === prefix || target.startsWith(`${prefix}/`));

const isTypeOnly = (source: Source, target: string) => {
  const name = target.split("/").at(-1) ?? target;
  const lines = source.text.match(new RegExp(`import[^;]*?from\\s+["'][^"']*${name}["']`, "g")) ?? [];
  return lines.length > 0 && lines.every((line) => line.startsWith("import type"));
};

describe("who may import whom", () => {
  it("finds the sources it judges", () => {
    expect(all.length).toBeGreaterThan(100);
    expect(all.some((source) => source.imports.length > 0)).toBe(true);
  });

  it("keeps the acoustics pure: nothing but itself", () => {
    expect(
      breaches(within("lib/acoustics/"), (target, source) =>
        /(schemas|door)\.ts$/.test(source.path)
          ? !reaches(target, "lib/acoustics", "zod")
          : !reaches(target, "lib/acoustics"),
      ),
    ).toEqual([]);
  });

  it("keeps clock, chance and environment out of acoustics and rules", () => {
    const pure = all.filter(
      (source) =>
        source.path.startsWith("lib/acoustics/") ||
        /^lib\/.*rules\.ts$/.test(source.path) ||
        /^lib\/(dates|wall-time)\.ts$/.test(source.path),
    );
    const impure = /\bDate\.now\(|\bnew Date\(\)|\bMath\.random\(|\bprocess\.env\b|\bcrypto\./;
    expect(pure.filter((source) => impure.test(source.text)).map((source) => source.path)).toEqual([]);
  });

  it("keeps React, Next and the database out of rules", () => {
    expect(
      breaches(
        (source) => /^lib\/.*rules\.ts$/.test(source.path),
        (target, source) =>
          reaches(target, "react", "next", "server-only", "lib/env", "lib/log") ||
          (reaches(target, "db") && !isTypeOnly(source, target)),
      ),
    ).toEqual([]);
  });

  it("lets only services, identity and limits reach queries", () => {
    expect(
      breaches(
        (source) => !/^(db|scripts)\//.test(source.path),
        (target, source) =>
          reaches(target, "db") &&
          !isTypeOnly(source, target) &&
          !/^lib\/[\w-]+\/([\w-]+\/)?service\.ts$/.test(source.path) &&
          ![
            "lib/auth/auth.ts",
            "lib/auth/actor.ts",
            "lib/doors/rate-limit.ts",
            "lib/health.ts",
            "lib/plans/chosen-style.ts",
          ].includes(source.path),
      ),
    ).toEqual([]);
  });

  it("keeps the session out of queries", () => {
    expect(
      breaches(
        within("db/queries/"),
        (target, source) =>
          (reaches(target, "lib/auth") && !isTypeOnly(source, target)) ||
          reaches(target, "next", "react", "lib/doors"),
      ),
    ).toEqual([]);
  });

  it("keeps React, navigation and caches out of services", () => {
    expect(
      breaches(
        (source) => /service\.ts$/.test(source.path),
        (target) => reaches(target, "react", "next/navigation", "next/cache", "components", "app"),
      ),
    ).toEqual([]);
  });

  it("keeps pages and doors off the database and the mail", () => {
    expect(
      breaches(within("app/"), (target) => reaches(target, "db", "lib/env/../db", "nodemailer", "postgres")),
    ).toEqual([]);
  });

  it("keeps components free of services, doors and the database", () => {
    expect(
      breaches(
        within("components/"),
        (target, source) =>
          (reaches(target, "db", "lib/doors", "lib/auth", "lib/env", "lib/log") || /service$/.test(target)) &&
          !isTypeOnly(source, target) &&
          !reaches(target, "lib/auth/access", "lib/auth/passwords"),
      ),
    ).toEqual([]);
  });

  it("keeps product words out of components/ui: it imports no subject", () => {
    expect(
      breaches(within("components/ui/"), (target) =>
        reaches(target, "lib/acoustics", "lib/readings", "lib/customers"),
      ),
    ).toEqual([]);
  });

  it.each([
    ["nodemailer", "lib/mail/send.ts"],
    ["better-auth/adapters/drizzle", "lib/auth/auth.ts"],
  ])("lets one file import %s", (name, home) => {
    const users = all.filter((source) => source.imports.includes(name)).map((source) => source.path);
    expect(users).toEqual([home]);
  });

  it("reads the environment in one place, scripts and the proxy's build constant aside", () => {
    const readers = all
      .filter((source) => source.text.includes("process.env") && !source.path.startsWith("scripts/"))
      .map((source) => source.path);
    expect(readers).toEqual(["lib/env.ts"]);
  });

  it("has no barrel but the agreed ones", () => {
    const barrels = all.filter((source) => /\/index\.tsx?$/.test(source.path)).map((source) => source.path);
    expect(barrels.sort()).toEqual(["db/schema/index.ts", "lib/acoustics/index.ts"]);
  });

  it("keeps files small enough to read", () => {
    const long = all.filter((source) => source.text.split("\n").length > 400).map((source) => source.path);
    expect(long).toEqual([]);
  });

  it("imports packages that are declared", async () => {
    const { default: manifest } = await import("../../package.json", { with: { type: "json" } });
    const declared = new Set([
      ...Object.keys(manifest.dependencies),
      ...Object.keys(manifest.devDependencies),
    ]);
    const nameOf = (target: string) =>
      target
        .split("/")
        .slice(0, target.startsWith("@") ? 2 : 1)
        .join("/");
    const undeclared = all.flatMap((source) =>
      source.imports
        .filter((target) => isPackage(target) && !target.startsWith("node:") && !target.startsWith("."))
        .filter((target) => !declared.has(nameOf(target)))
        .map((target) => `${source.path} imports ${target}`),
    );
    expect(undeclared).toEqual([]);
  });
});
