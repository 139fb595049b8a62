import assert from "node:assert/strict";
import { spawn } from "node:child_process";
import { test } from "node:test";
import { setTimeout as sleep } from "node:timers/promises";
import { acquire, askHolder } from "../../scripts/lib/lock.mjs";
import { identify, isAlive } from "../../scripts/lib/process-identity.mjs";
import { launch, run } from "../../scripts/lib/processes.mjs";

const scripts = new URL("../../scripts/lib/", import.meta.url);

/** Another Node process running the given module text, able to import the scripts' modules. */
function otherProcess(text) {
  return spawn(process.execPath, ["--input-type=module", "-e", text], {
    stdio: ["ignore", "pipe", "inherit"],
  });
}

async function firstLine(child) {
  for await (const part of child.stdout) return String(part).trim();
  return "";
}

async function until(condition) {
  for (let tries = 0; tries < 100; tries += 1) {
    if (await condition()) return true;
    await sleep(50);
  }
  return false;
}

test("a lock is held by one, tells who holds it, and is free once its holder is killed", async () => {
  const name = `test-${process.pid}`;
  const other = otherProcess(`
    import { acquire } from "${new URL("lock.mjs", scripts)}";
    const { lock } = await acquire("${name}");
    lock.publish({ url: "http://there" });
    setInterval(() => {}, 1000);
    console.log("held");
  `);
  assert.equal(await firstLine(other), "held");
  const { lock, holder } = await acquire(name);
  assert.equal(lock, undefined);
  assert.equal(holder.pid, other.pid);
  assert.equal(holder.url, "http://there");
  other.kill("SIGKILL");
  const mine = await acquire(name, () => true);
  assert.ok(mine.lock);
  await mine.lock.release();
  assert.equal(await askHolder(name), undefined);
});

test("children end with a parent that is killed without warning", async () => {
  const other = otherProcess(`
    import { launch } from "${new URL("processes.mjs", scripts)}";
    console.log(launch("sleep", ["300"]).pid);
  `);
  const child = identify(Number(await firstLine(other)));
  assert.ok(isAlive(child));
  other.kill("SIGKILL");
  assert.ok(await until(() => !isAlive(child)));
});

test("stopping a child ends what it started, even what does not listen", async () => {
  const child = launch("sh", ["-c", "trap '' TERM; sleep 300 & echo $!; wait; wait"], { patience: 300 });
  await until(() => child.output().includes("\n"));
  const grandchild = identify(Number(child.output()));
  assert.ok(isAlive(grandchild));
  await child.stop();
  assert.ok(await until(() => !isAlive(grandchild)));
});

test("a command that fails says what it printed", async () => {
  await assert.rejects(run("sh", ["-c", "echo why; exit 3"], { title: "It" }), (error) => {
    assert.match(error.message, /It ended with code 3/);
    assert.match(error.output, /why/);
    return true;
  });
  await assert.rejects(run("no-such-command-here", []), { name: "CommandFailed" });
});

test("a process id that was used again is not taken for the old process", () => {
  const me = identify(process.pid);
  assert.ok(isAlive(me));
  assert.equal(isAlive(`${process.pid} 1`), false);
  assert.equal(isAlive(""), false);
});
