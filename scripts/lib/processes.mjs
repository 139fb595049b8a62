import { spawn } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { childEnvironment } from "./environment.mjs";
import { verbose } from "./output.mjs";
import { CommandFailed } from "./problem.mjs";
import { logFolder, projectRoot } from "./project.mjs";

const keptOutput = 400_000;
const setpriv = ["/usr/bin/setpriv", "/bin/setpriv"].find((file) => fs.existsSync(file));

/** Every child that has not ended, oldest first. */
const running = new Set();

/** Makes the kernel end the child when this process is killed in a way it cannot answer. */
function endingWithParent(command, args, signal) {
  if (!setpriv) return [command, args];
  return [setpriv, ["--pdeathsig", signal.replace("SIG", ""), "--", command, ...args]];
}

function openLog(name) {
  if (!name) return undefined;
  fs.mkdirSync(logFolder, { recursive: true });
  const file = path.join(logFolder, `${name}.log`);
  return { file, stream: fs.createWriteStream(file) };
}

/**
 * Starts a child in a process group of its own, so that Ctrl-C reaches it only through `stop`.
 * `stopSignal: null` is for work that must not be cut short, such as installing packages.
 * `identity` is the user to run as; `wholeGroup: false` signals the leader alone.
 */
export function launch(command, args, options = {}) {
  const { cwd = projectRoot, env = childEnvironment(), identity, input, log, onOutput } = options;
  const { stopSignal = "SIGTERM", patience = 8_000, wholeGroup = true } = options;
  const [file, argv] = stopSignal ? endingWithParent(command, args, stopSignal) : [command, args];
  const handle = spawn(file, argv, {
    cwd,
    env,
    detached: true,
    stdio: [input === undefined ? "ignore" : "pipe", "pipe", "pipe"],
    ...(identity ? { uid: identity.uid, gid: identity.gid } : {}),
  });
  const logged = openLog(log);
  let kept = "";
  for (const stream of [handle.stdout, handle.stderr]) {
    stream.setEncoding("utf8");
    stream.on("data", (text) => {
      kept = (kept + text).slice(-keptOutput);
      logged?.stream.write(text);
      if (verbose) process.stdout.write(text);
      onOutput?.(text);
    });
  }
  handle.stdin?.on("error", () => {});
  handle.stdin?.end(input);

  const child = {
    name: log ?? path.basename(command),
    pid: handle.pid,
    ended: false,
    logFile: logged?.file,
    output: () => kept,
    exited: new Promise((resolve) => {
      handle.once("error", (error) => {
        kept += `${error.message}\n`;
        resolve({ code: 127, signal: null });
      });
      handle.once("close", (code, signal) => resolve({ code, signal }));
    }),
    signal(name) {
      if (child.pid === undefined) return;
      try {
        process.kill(wholeGroup ? -child.pid : child.pid, name);
      } catch (error) {
        if (error.code !== "ESRCH") throw error;
      }
    },
    async stop() {
      if (!child.ended && stopSignal) {
        child.signal(stopSignal);
        const impatience = setTimeout(() => child.signal("SIGKILL"), patience);
        await child.exited;
        clearTimeout(impatience);
      }
      await child.exited;
    },
  };
  running.add(child);
  child.exited.then(() => {
    child.ended = true;
    running.delete(child);
    logged?.stream.end();
    // Whatever a leader leaves behind in its group has nobody to report to any more.
    if (wholeGroup && stopSignal) child.signal("SIGKILL");
  });
  return child;
}

/** Runs a command to its end and gives back what it printed; throws CommandFailed otherwise. */
export async function run(command, args, options = {}) {
  const child = launch(command, args, options);
  const { code, signal } = await child.exited;
  if (code !== 0) {
    const end = signal ? `was ended by ${signal}` : `ended with code ${code}`;
    throw new CommandFailed(`${options.title ?? path.basename(command)} ${end}.`, {
      output: child.output(),
      logFile: child.logFile,
    });
  }
  return child.output();
}

/** Runs a script of the project, TypeScript included. */
export function runScript(script, env, options = {}) {
  return run(process.execPath, ["--import", "tsx", script, ...(options.args ?? [])], { ...options, env });
}

export async function stopEverything() {
  for (const child of [...running].reverse()) await child.stop();
}

export function killEverything() {
  for (const child of running) child.signal("SIGKILL");
}
