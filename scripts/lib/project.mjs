import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

export const projectRoot = fs.realpathSync(fileURLToPath(new URL("../..", import.meta.url)));

/** Tells two checkouts on one machine apart wherever something has to live outside the project. */
export const projectHash = createHash("sha256").update(projectRoot).digest("hex").slice(0, 10);

/** Everything the scripts write inside the project, apart from node_modules and .next. Git ignores it. */
export const localFolder = path.join(projectRoot, ".local");

export const logFolder = path.join(localFolder, "logs");

export function inProject(...parts) {
  return path.join(projectRoot, ...parts);
}
