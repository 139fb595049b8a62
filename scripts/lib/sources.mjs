import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";

const sourceFolders = ["app", "components", "lib", "db", "public"];
const rootFiles = /\.(ts|mjs|js|css)$|^(package-lock|package|tsconfig)\.json$|^\.env/;
const notInTheBuild =
  /\.test\.tsx?$|^(vitest|playwright|drizzle)\.config\.|^next-env\.d\.ts$|\.tsbuildinfo$|^\.env\.example$/;

function filesUnder(root, folder) {
  const found = [];
  for (const entry of fs.readdirSync(path.join(root, folder), { withFileTypes: true })) {
    const name = path.join(folder, entry.name);
    if (entry.isDirectory()) found.push(...filesUnder(root, name));
    else if (entry.isFile()) found.push(name);
  }
  return found;
}

/** Everything `next build` reads, whether git knows it yet or not. */
function buildSources(root) {
  const files = sourceFolders
    .filter((folder) => fs.existsSync(path.join(root, folder)))
    .flatMap((folder) => filesUnder(root, folder));
  const configuration = fs
    .readdirSync(root, { withFileTypes: true })
    .filter((entry) => entry.isFile() && rootFiles.test(entry.name))
    .map((entry) => entry.name);
  return [...files, ...configuration].filter((file) => !notInTheBuild.test(file)).sort();
}

export function hashSources(root) {
  const hash = createHash("sha256").update(process.version);
  for (const file of buildSources(root)) {
    const content = fs.readFileSync(path.join(root, file));
    hash.update(`\0${file}\0${content.length}\0`).update(content);
  }
  return hash.digest("hex");
}
