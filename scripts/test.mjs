import "./lib/require-node.mjs";
import { copyBuildFor } from "./lib/build.mjs";
import { seed } from "./lib/databases.mjs";
import { acquire } from "./lib/lock.mjs";
import { complain, say, step } from "./lib/output.mjs";
import { findFreePort } from "./lib/ports.mjs";
import { alone, buildPages, prepare } from "./lib/prepare.mjs";
import { explain, Problem } from "./lib/problem.mjs";
import { startMailbox, startWeb } from "./lib/services.mjs";
import { addressOf } from "./lib/settings.mjs";
import { endOnSignals, isEnding, onShutdown, shutDown } from "./lib/shutdown.mjs";
import { runLint, runPlaywright, runScriptTests, runTypes, runVitest } from "./lib/test-runners.mjs";
import { integrationEnvironment, testEnvironment } from "./lib/test-services.mjs";
import { copyTemplate, makeTemplate, startThrowAwayCluster } from "./lib/throwaway-cluster.mjs";

const stepNames = ["lint", "types", "unit", "scripts", "integration", "browser"];
const firstWebPort = 3100;
const exitCodes = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129, parent: 1 };

const total = { passed: 0, failed: 0 };

/** `npm test -- unit browser e2e/sign-in.spec.ts`: names of steps, then what to hand to their runners. */
function readArguments(args) {
  const chosen = args.filter((arg) => stepNames.includes(arg));
  const filters = args.filter((arg) => !stepNames.includes(arg));
  const unknown = filters.find((filter) => !/[/.]/.test(filter));
  if (unknown)
    throw new Problem(`There is no step called "${unknown}". The steps are: ${stepNames.join(", ")}.`);
  if (filters.length > 0 && chosen.length !== 1)
    throw new Problem(
      "Name one step to run single files of, for example: npm test -- unit lib/money.test.ts",
    );
  return { chosen: new Set(chosen.length > 0 ? chosen : stepNames), filters };
}

function describe({ passed, failed, skipped = 0 }) {
  return [`${passed} passed`, failed > 0 && `${failed} failed`, skipped > 0 && `${skipped} skipped`]
    .filter(Boolean)
    .join(", ");
}

/** Every step runs whatever became of the ones before; what it needs and cannot have fails it. */
async function check(label, work) {
  const before = total.failed;
  try {
    await step(label, async (report) => {
      const counts = await work(report);
      total.passed += counts.passed;
      total.failed += counts.failed;
      if (counts.failure) throw counts.failure;
      return describe(counts);
    });
  } catch (error) {
    if (isEnding()) return;
    if (total.failed === before) total.failed += 1;
    complain(`\n${explain(error)}\n`);
  }
}

/** Something several steps need: made at the first asking, and the same failure for each of them. */
function once(make) {
  let made;
  return () => {
    made ??= make();
    return made;
  };
}

const throwAwayWithTemplate = once(async () => {
  const throwAway = await startThrowAwayCluster();
  onShutdown(throwAway.remove);
  await makeTemplate(throwAway);
  return throwAway;
});

const mailbox = once(() => startMailbox({ log: "mailbox-test" }));

async function runIntegration(report, filters) {
  const environment = await integrationEnvironment({
    throwAway: await throwAwayWithTemplate(),
    mailbox: await mailbox(),
  });
  return runVitest("integration", { report, filters, env: environment });
}

/** A seeded database of its own, a server on a free port, then the browser against it. */
async function runBrowser(report, filters, distDir) {
  if (!distDir) throw new Problem("The browser tests cannot run, because the pages could not be built.");
  const throwAway = await throwAwayWithTemplate();
  const urls = await copyTemplate(throwAway, "agraffe_browser");
  const box = await mailbox();
  const host = "127.0.0.1";
  const port = await findFreePort(firstWebPort, { host });
  const address = addressOf(host, port);
  const { secrets } = throwAway;
  const environment = testEnvironment({
    urls,
    secrets,
    mailbox: box,
    appUrl: address,
    logLevel: "warn",
  });
  await seed(urls, environment, "seed-test");
  const web = await startWeb({ host, port, address, distDir, environment, log: "web-test" });
  const env = { BASE_URL: address, MAILBOX_URL: box.mailboxUrl };
  const counts = await runPlaywright({ report, filters, env });
  await web.child.stop();
  return counts;
}

/** One run at a time serves from the tests' copy of the build; the lock goes with this process. */
async function waitForBrowserTurn() {
  let told = false;
  await acquire("browser", (holder) => {
    if (!told) say(`Waiting for the browser tests of process ${holder.pid} …`);
    told = true;
    return true;
  });
}

async function test() {
  const { chosen, filters } = readArguments(process.argv.slice(2));
  endOnSignals({
    codeFor: (signal) => exitCodes[signal] ?? 1,
    announce: () => say("\nStopping …"),
  });
  await prepare({
    postgres: ["scripts", "integration", "browser"].some((name) => chosen.has(name)),
    chromium: chosen.has("browser"),
  });
  if (chosen.has("lint")) await check("Format and lint", runLint);
  if (chosen.has("types")) await check("Types", (report) => alone(() => runTypes(report)));
  if (chosen.has("unit")) await check("Unit tests", (report) => runVitest("unit", { report, filters }));
  if (chosen.has("scripts")) await check("Tests of the scripts", runScriptTests);
  if (chosen.has("browser")) await waitForBrowserTurn();
  // The integration tests read the build's manifests, to know every door there is.
  let distDir;
  if (chosen.has("integration") || chosen.has("browser"))
    await check("Build", async (report) => {
      const copy = chosen.has("browser") ? () => copyBuildFor("test") : () => undefined;
      ({ distDir } = await buildPages(report, copy));
      return { passed: 1, failed: 0 };
    });
  if (chosen.has("integration"))
    await check("Integration tests", (report) => runIntegration(report, filters));
  if (chosen.has("browser")) await check("Browser tests", (report) => runBrowser(report, filters, distDir));
}

try {
  await test();
} catch (error) {
  if (!isEnding()) {
    total.failed += 1;
    complain(`\n${explain(error)}`);
  }
}
if (!isEnding()) {
  say();
  say(`${total.passed} passed, ${total.failed} failed`);
}
await shutDown(total.failed === 0 ? 0 : 1);
