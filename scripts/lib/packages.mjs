import fs from "node:fs";
import { childEnvironment } from "./environment.mjs";
import { askHolder } from "./lock.mjs";
import { Problem } from "./problem.mjs";
import { run } from "./processes.mjs";
import { inProject, projectRoot } from "./project.mjs";

function readPackages(file) {
  try {
    return JSON.parse(fs.readFileSync(file, "utf8")).packages ?? {};
  } catch {
    return undefined;
  }
}

/**
 * npm writes node_modules/.package-lock.json last, so it describes what is really there. Packages for other
 * machines are in the lock file only, and marked optional.
 */
export function isInstalled(root = projectRoot) {
  const wanted = readPackages(`${root}/package-lock.json`);
  const present = readPackages(`${root}/node_modules/.package-lock.json`);
  if (!wanted || !present) return false;
  for (const [place, entry] of Object.entries(wanted)) {
    if (place === "" || entry.link) continue;
    const found = present[place];
    if (!found && entry.optional) continue;
    if (found?.version !== entry.version || found?.integrity !== entry.integrity) return false;
    if (!fs.existsSync(`${root}/${place}/package.json`)) return false;
  }
  return Object.keys(present).every((place) => place in wanted);
}

function npmCommand() {
  const script = process.env.npm_execpath;
  if (script?.endsWith(".js") && fs.existsSync(script)) return [process.execPath, [script]];
  return ["npm", []];
}

export async function ensurePackages(report) {
  if (isInstalled()) return "already installed";
  const running = await askHolder("start");
  if (running && running.pid !== process.pid && fs.existsSync(inProject("node_modules")))
    throw new Problem(
      `The npm packages have to be installed anew, which would pull them from under the Agraffe that runs from this folder${running.url ? ` at ${running.url}` : ""} (process ${running.pid}). Stop that one first.`,
    );
  const [npm, args] = npmCommand();
  await run(npm, [...args, "ci", "--include=dev", "--no-audit", "--no-fund"], {
    env: childEnvironment(),
    log: "npm-ci",
    title: "Installing the npm packages",
    onOutput: report,
  });
  return "installed";
}
