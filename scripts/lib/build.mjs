import fs from "node:fs";
import path from "node:path";
import { childEnvironment } from "./environment.mjs";
import { run } from "./processes.mjs";
import { inProject, localFolder, projectRoot } from "./project.mjs";
import { hashSources } from "./sources.mjs";

const buildFolder = inProject(".next");
/** Inside the build, so that whatever clears the build clears its stamp. */
const stampFile = path.join(buildFolder, "source-hash");
const notServed = new Set(["cache", "dev", "types", "diagnostics", "trace", "trace-build", "lock"]);

export const nextCommand = inProject("node_modules", "next", "dist", "bin", "next");

function readText(file) {
  try {
    return fs.readFileSync(file, "utf8");
  } catch {
    return undefined;
  }
}

export async function ensureBuild(report) {
  const hash = hashSources(projectRoot);
  if (readText(stampFile) === hash) return "unchanged";
  fs.rmSync(stampFile, { force: true });
  await run(process.execPath, [nextCommand, "build"], {
    env: childEnvironment({ NODE_ENV: "production" }),
    log: "build",
    title: "Building the pages",
    onOutput: report,
  });
  fs.writeFileSync(stampFile, hash);
  return "built";
}

/**
 * A server runs from its own copy of the build, so that building again, for a start or for the tests, never
 * changes files under it. Links to node_modules become absolute on the way, so the copy may lie deeper.
 * Returns the folder as `NEXT_DIST_DIR` wants it.
 */
export function copyBuildFor(name) {
  const copy = path.join(localFolder, "serving", name);
  const markFile = path.join(copy, "copied-from");
  const mark = `${projectRoot} ${readText(path.join(buildFolder, "BUILD_ID"))}`;
  if (readText(markFile) !== mark) {
    fs.rmSync(copy, { recursive: true, force: true });
    fs.cpSync(buildFolder, copy, {
      recursive: true,
      filter: (source) => path.dirname(source) !== buildFolder || !notServed.has(path.basename(source)),
    });
    // Written last: a copy that was cut short has none.
    fs.writeFileSync(markFile, mark);
  }
  return path.relative(projectRoot, copy);
}
