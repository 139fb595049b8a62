import { stripVTControlCharacters } from "node:util";

export const verbose = process.env.VERBOSE === "1";

const isTerminal = process.stdout.isTTY === true && !verbose;
const firstReminderSeconds = 10;
const reminderEverySeconds = 20;

// The terminal may be gone while we are still tidying up.
for (const stream of [process.stdout, process.stderr]) stream.on("error", () => {});

let muted = false;

/** From now on steps that fall over because we are ending say nothing. */
export function muteSteps() {
  muted = true;
  clearLine();
}

export function say(text = "") {
  process.stdout.write(`${text}\n`);
}

export function complain(text) {
  process.stderr.write(`${text}\n`);
}

function clearLine() {
  if (isTerminal) process.stdout.write("\r\u001b[K");
}

/**
 * Runs one named piece of work and prints one line for it when it ends. A terminal sees the seconds count;
 * elsewhere a long step says now and then that it is still at it. `work` returns a short note or nothing.
 */
export async function step(label, work) {
  const started = performance.now();
  const elapsed = () => (performance.now() - started) / 1000;
  let remindAt = firstReminderSeconds;
  let latest = "";
  const timer = setInterval(() => {
    if (muted) return;
    if (isTerminal) {
      process.stdout.write(`\r\u001b[K  ${elapsed().toFixed(0).padStart(6)} s  ${label} …`);
    } else if (elapsed() >= remindAt) {
      say(`  ${elapsed().toFixed(0).padStart(6)} s  ${label} …${latest ? ` ${latest}` : ""}`);
      remindAt += reminderEverySeconds;
    }
  }, 1000);
  if (isTerminal) process.stdout.write(`         …  ${label}`);
  const report = (text) => {
    const line = stripVTControlCharacters(text).trim().split("\n").pop() ?? "";
    latest = line.trim().slice(0, 90) || latest;
  };
  try {
    const note = await work(report);
    clearLine();
    say(`  ${elapsed().toFixed(1).padStart(6)} s  ${label}${note ? `: ${note}` : ""}`);
  } catch (error) {
    if (!muted) {
      clearLine();
      say(`  ${elapsed().toFixed(1).padStart(6)} s  ${label}: failed`);
    }
    throw error;
  } finally {
    clearInterval(timer);
  }
}
