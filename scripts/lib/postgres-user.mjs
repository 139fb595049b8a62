import fs from "node:fs";
import path from "node:path";
import { Problem } from "./problem.mjs";
import { run } from "./processes.mjs";

/**
 * PostgreSQL refuses to run as root. Started by root it runs as the user who owns the data, or as Debian's
 * `postgres` for new data; started by anybody else it runs as that person (undefined).
 */
export function databaseUser(existingData) {
  if (process.getuid() !== 0) return undefined;
  if (existingData && fs.existsSync(existingData)) {
    const { uid, gid } = fs.statSync(existingData);
    if (uid !== 0) return { uid, gid };
  }
  const line = fs
    .readFileSync("/etc/passwd", "utf8")
    .split("\n")
    .find((entry) => entry.startsWith("postgres:"));
  if (!line) throw new Problem("This machine has PostgreSQL but no user called postgres to run it as.");
  const [, , uid, gid] = line.split(":");
  return { uid: Number(uid), gid: Number(gid) };
}

/** Whether that user can own and fill a folder here: a checkout below a closed home folder cannot be reached. */
export async function canKeepDataIn(folder, user) {
  const probe = path.join(folder, `reach-${process.pid}`);
  try {
    fs.mkdirSync(folder, { recursive: true });
    // The way in must stay open whatever the umask, and nobody but us needs to list what is inside.
    fs.chmodSync(folder, 0o711);
    fs.mkdirSync(probe, { mode: 0o700 });
    if (user) fs.chownSync(probe, user.uid, user.gid);
    await run("test", ["-O", probe, "-a", "-w", probe], { identity: user, cwd: "/" });
    return true;
  } catch {
    return false;
  } finally {
    fs.rmSync(probe, { recursive: true, force: true });
  }
}
