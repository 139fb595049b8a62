import { complain, muteSteps } from "./output.mjs";
import { isAlive, npmAbove } from "./process-identity.mjs";
import { killEverything, stopEverything } from "./processes.mjs";

const parentPollMs = 1000;
/** A terminal's Ctrl-C reaches this process twice, directly and through npm; that is one request. */
const sameRequestMs = 1500;

const cleanups = [];
let ending = false;

export function isEnding() {
  return ending;
}

/** Run after every child has ended, latest first; each must bear being run when half of the start was done. */
export function onShutdown(cleanup) {
  cleanups.push(cleanup);
}

export async function shutDown(code) {
  if (ending) return new Promise(() => {});
  ending = true;
  muteSteps();
  await stopEverything();
  for (const cleanup of cleanups.reverse()) {
    try {
      await cleanup();
    } catch (error) {
      complain(error.message);
    }
  }
  process.exit(code);
}

/** `codeFor(signal)` says how the command should end when somebody asks it to stop. */
export function endOnSignals({ codeFor, announce }) {
  let askedAt = 0;
  const ask = (signal) => {
    if (ending) {
      if (signal !== "parent" && performance.now() - askedAt > sameRequestMs) {
        killEverything();
        process.exit(codeFor(signal));
      }
      return;
    }
    askedAt = performance.now();
    announce?.(signal);
    shutDown(codeFor(signal));
  };
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => ask(signal));

  // npm passes signals on, but not SIGKILL: without this its death would leave the servers running unseen.
  const npm = process.env.npm_lifecycle_event ? npmAbove() : undefined;
  if (npm) {
    setInterval(() => {
      if (!isAlive(npm)) ask("parent");
    }, parentPollMs).unref();
  }
}
