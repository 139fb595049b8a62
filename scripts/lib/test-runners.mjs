import fs from "node:fs";
import path from "node:path";
import { childEnvironment } from "./environment.mjs";
import { CommandFailed } from "./problem.mjs";
import { launch, run } from "./processes.mjs";
import { inProject, localFolder } from "./project.mjs";
import { nodeTestCounts, playwrightFileCounts, settle, vitestFileCounts } from "./test-counts.mjs";

const reportFolder = path.join(localFolder, "reports");

function freshReport(name) {
  fs.mkdirSync(reportFolder, { recursive: true });
  const file = path.join(reportFolder, `${name}.json`);
  fs.rmSync(file, { force: true });
  return file;
}

/** Runs a test runner and reads its counts; `failure` carries what it said when it is not content. */
async function count({ script, args, env, log, report, read }) {
  const child = launch(process.execPath, [...script, ...args], {
    env: childEnvironment(env),
    log,
    onOutput: report,
  });
  const { code } = await child.exited;
  const counts = settle(read(child.output()), code);
  if (counts.failed === 0) return counts;
  const failure = new CommandFailed(`${counts.failed} failed in ${log}.`, {
    output: child.output(),
    logFile: child.logFile,
  });
  return { ...counts, failure };
}

/** A tool that is either content or not counts as one test. */
async function single(script, args, { log, report, title, env = {} }) {
  await run(process.execPath, [script, ...args], {
    env: childEnvironment(env),
    log,
    title,
    onOutput: report,
  });
}

export async function runLint(report) {
  const biome = inProject("node_modules", "@biomejs", "biome", "bin", "biome");
  await single(biome, ["check", "."], { log: "lint", title: "Format and lint", report });
  return { passed: 1, failed: 0 };
}

export async function runTypes(report) {
  const next = inProject("node_modules", "next", "dist", "bin", "next");
  await single(next, ["typegen"], { log: "typegen", title: "Making the route types", report });
  const tsc = inProject("node_modules", "typescript", "bin", "tsc");
  await single(tsc, ["--noEmit"], { log: "types", title: "Checking the types", report });
  return { passed: 1, failed: 0 };
}

export function runVitest(project, { report, filters, env = {} }) {
  const file = freshReport(project);
  return count({
    script: [inProject("node_modules", "vitest", "vitest.mjs")],
    args: [
      ["run", "--project", project, "--reporter=default", "--reporter=json"],
      [`--outputFile.json=${file}`, ...filters],
    ].flat(),
    env,
    log: project,
    report,
    read: () => vitestFileCounts(file),
  });
}

export function runScriptTests(report) {
  const folder = inProject("tests", "scripts");
  const files = fs.readdirSync(folder).filter((name) => name.endsWith(".test.mjs"));
  return count({
    script: ["--test", "--test-reporter=tap"],
    args: files.map((name) => path.join(folder, name)),
    env: {},
    log: "scripts",
    report,
    read: nodeTestCounts,
  });
}

export function runPlaywright({ report, filters, env }) {
  const file = freshReport("browser");
  return count({
    script: [inProject("node_modules", "@playwright", "test", "cli.js")],
    args: ["test", "--reporter=list,json", ...filters],
    env: { ...env, PLAYWRIGHT_JSON_OUTPUT_FILE: file, PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: "1" },
    log: "browser",
    report,
    read: () => playwrightFileCounts(file),
  });
}
