import { ensureBuild } from "./build.mjs";
import { ensureChromium } from "./debian.mjs";
import { acquire } from "./lock.mjs";
import { say, step } from "./output.mjs";
import { ensurePackages } from "./packages.mjs";
import { ensurePostgres } from "./postgres-binaries.mjs";

/** One command at a time changes node_modules, the build or the machine's packages; the other waits. */
export async function alone(work) {
  let told = false;
  const { lock } = await acquire("prepare", (holder) => {
    if (!told) say(`Waiting for process ${holder.pid}, which is preparing this folder too …`);
    told = true;
    return true;
  });
  try {
    return await work();
  } finally {
    await lock.release();
  }
}

export function prepare({ postgres, chromium }) {
  return alone(async () => {
    await step("npm packages", ensurePackages);
    if (postgres) await step("PostgreSQL", ensurePostgres);
    if (chromium) await step("Chromium", ensureChromium);
  });
}

/** Builds what changed, and takes this command's copy before anybody else can build again. */
export function buildPages(report, copyFor) {
  return alone(async () => {
    const note = await ensureBuild(report);
    return { note, distDir: copyFor() };
  });
}
