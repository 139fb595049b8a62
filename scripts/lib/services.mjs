import { setTimeout as sleep } from "node:timers/promises";
import { nextCommand } from "./build.mjs";
import { childEnvironment } from "./environment.mjs";
import { CommandFailed } from "./problem.mjs";
import { launch } from "./processes.mjs";
import { inProject } from "./project.mjs";

const mailboxWithinMs = 30_000;
const webWithinMs = 90_000;

function died(child, what) {
  return new CommandFailed(`${what} did not start.`, { output: child.output(), logFile: child.logFile });
}

/** The mailbox takes any free ports and says which in its first line. */
export async function startMailbox({ log = "mailbox" } = {}) {
  const child = launch(
    process.execPath,
    ["--import", "tsx", inProject("scripts", "services", "mailbox.ts")],
    {
      env: childEnvironment(),
      log,
    },
  );
  const until = performance.now() + mailboxWithinMs;
  for (;;) {
    const line = child.output().match(/^\{"smtpPort".*\}$/m);
    if (line) {
      const { smtpPort, httpPort } = JSON.parse(line[0]);
      return {
        child,
        smtpUrl: `smtp://127.0.0.1:${smtpPort}`,
        mailboxUrl: `http://127.0.0.1:${httpPort}`,
      };
    }
    if (child.ended || performance.now() > until) throw died(child, "The mailbox");
    await sleep(50);
  }
}

/** `environment` is all the web server is told; it never includes the owner's database address. */
export async function startWeb({ host, port, address, distDir, environment, log = "web" }) {
  const child = launch(process.execPath, [nextCommand, "start", "-H", host, "-p", String(port)], {
    env: childEnvironment({ ...environment, NODE_ENV: "production", NEXT_DIST_DIR: distDir }),
    log,
  });
  const until = performance.now() + webWithinMs;
  for (;;) {
    if (child.ended) throw died(child, "The web server");
    const state = await readiness(address);
    if (state === "ready") return { child };
    if (performance.now() > until)
      throw new CommandFailed(`The web server is not ready after ${webWithinMs / 1000} s (${state}).`, {
        output: child.output(),
        logFile: child.logFile,
      });
    await sleep(150);
  }
}

async function readiness(address) {
  try {
    const answer = await fetch(`${address}/api/health/ready`, { signal: AbortSignal.timeout(5000) });
    await answer.arrayBuffer();
    return answer.status === 200 ? "ready" : `/api/health/ready answers ${answer.status}`;
  } catch {
    return "no answer";
  }
}
