import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";

export const root = path.join(import.meta.dirname, "..", "..");

export type Source = { path: string; text: string; imports: string[] };

const folders = ["app", "components", "lib", "db", "scripts"];
const importPattern =
  /(?:^|\n)\s*(?:import|export)\s[^;]*?from\s+["']([^"']+)["']|(?:^|[^\w.])import\(\s*["']([^"']+)["']\s*\)|(?:^|\n)import\s+["']([^"']+)["']/g;

function filesUnder(folder: string): string[] {
  return readdirSync(path.join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const name = `${folder}/${entry.name}`;
    if (entry.isDirectory()) return filesUnder(name);
    return /\.(ts|tsx)$/.test(entry.name) && !/\.test\.tsx?$/.test(entry.name) ? [name] : [];
  });
}

/** Imports as paths from the root, "@/lib/env"-style and relative ones alike; packages by their name. */
function importsOf(file: string, text: string): string[] {
  return [...text.matchAll(importPattern)].map((match) => {
    const target = match[1] ?? match[2] ?? match[3] ?? "";
    if (target.startsWith("@/")) return target.slice(2);
    if (target.startsWith(".")) return path.posix.join(path.posix.dirname(file), target);
    return target;
  });
}

export function sources(): Source[] {
  return folders.flatMap(filesUnder).map((file) => {
    const text = readFileSync(path.join(root, file), "utf8");
    return { path: file, text, imports: importsOf(file, text) };
  });
}

export function isPackage(target: string): boolean {
  return !folders.some((folder) => target === folder || target.startsWith(`${folder}/`));
}
