import fs from "node:fs";
import path from "node:path";
import { setTimeout as sleep } from "node:timers/promises";
import { Problem } from "./problem.mjs";

const patienceMs = 30_000;

function readPidFile(dataFolder) {
  try {
    const lines = fs.readFileSync(path.join(dataFolder, "postmaster.pid"), "utf8").split("\n");
    const [key, segment] = (lines[6] ?? "").trim().split(/\s+/);
    return { pid: Number(lines[0]), sharedMemory: { key, segment } };
  } catch {
    return undefined;
  }
}

/** The process id in the file may by now belong to something else; the command line, readable by all, tells. */
function isServerOf(dataFolder, pid) {
  try {
    const [program = "", ...args] = fs.readFileSync(`/proc/${pid}/cmdline`, "utf8").split("\0");
    return path.basename(program) === "postgres" && args[args.indexOf("-D") + 1] === dataFolder;
  } catch {
    return false;
  }
}

/** Server processes outlive a killed postmaster by a moment; until they are gone the data must not be touched. */
function isStillAttached({ key, segment }) {
  const table = fs.readFileSync("/proc/sysvipc/shm", "utf8").split("\n").slice(1);
  return table.some((line) => {
    const columns = line.trim().split(/\s+/);
    return columns[0] === key && columns[1] === segment && Number(columns[6]) > 0;
  });
}

async function waitUntil(condition) {
  const until = performance.now() + patienceMs;
  while (performance.now() < until) {
    if (condition()) return true;
    await sleep(100);
  }
  return false;
}

/**
 * Ends a server that a killed start left running on this data folder, and removes the pid file of one that
 * died. Returns what it found. Only this folder's server is ever signalled.
 */
export async function clearLeftovers(dataFolder) {
  const left = readPidFile(dataFolder);
  if (!left) return "nothing";
  let found = "a stale pid file";
  if (isServerOf(dataFolder, left.pid)) {
    found = "a running server";
    process.kill(left.pid, "SIGINT");
    if (!(await waitUntil(() => !isServerOf(dataFolder, left.pid))))
      throw new Problem(
        `A PostgreSQL server from an earlier run (process ${left.pid}) does not stop. End it and try again.`,
      );
  }
  if (!(await waitUntil(() => !isStillAttached(left.sharedMemory))))
    throw new Problem(
      `Processes of an earlier PostgreSQL server still use ${dataFolder}. End them and try again.`,
    );
  fs.rmSync(path.join(dataFolder, "postmaster.pid"), { force: true });
  return found;
}
