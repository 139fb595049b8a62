import assert from "node:assert/strict";
import fs from "node:fs";
import net from "node:net";
import os from "node:os";
import path from "node:path";
import { after, test } from "node:test";
import { childEnvironment } from "../../scripts/lib/environment.mjs";
import { isInstalled } from "../../scripts/lib/packages.mjs";
import { findFreePort, probePort } from "../../scripts/lib/ports.mjs";
import { keepSecrets } from "../../scripts/lib/secrets.mjs";
import { hashSources } from "../../scripts/lib/sources.mjs";

const folder = fs.mkdtempSync(path.join(os.tmpdir(), "agraffe-preparation-"));
after(() => fs.rmSync(folder, { recursive: true, force: true }));

function write(file, content) {
  const target = path.join(folder, file);
  fs.mkdirSync(path.dirname(target), { recursive: true });
  fs.writeFileSync(target, typeof content === "string" ? content : JSON.stringify(content));
}

function occupy(port = 0) {
  return new Promise((resolve) => {
    const server = net.createServer().listen(port, "127.0.0.1", () => resolve(server));
  });
}

test("a taken port is seen, and the next free one is found", async () => {
  const server = await occupy();
  const { port } = server.address();
  assert.equal(await probePort(port), undefined);
  const found = await findFreePort(port);
  assert.notEqual(found, port);
  assert.equal(await probePort(found), found);
  await new Promise((resolve) => server.close(resolve));
  assert.equal(await findFreePort(port), port);
});

test("packages count as installed only when they are those of the lock file", () => {
  const root = path.join(folder, "packages");
  const lock = (version) => ({
    packages: {
      "": { name: "x" },
      "node_modules/a": { version, integrity: `sha512-${version}` },
      "node_modules/other-machine": { version: "1.0.0", integrity: "sha512-o", optional: true },
    },
  });
  const present = { packages: { "node_modules/a": { version: "1.0.0", integrity: "sha512-1.0.0" } } };
  write("packages/package-lock.json", lock("1.0.0"));
  assert.equal(isInstalled(root), false, "nothing there");
  write("packages/node_modules/.package-lock.json", present);
  assert.equal(isInstalled(root), false, "the folder of a package is missing");
  write("packages/node_modules/a/package.json", {});
  assert.equal(isInstalled(root), true);
  write("packages/package-lock.json", lock("1.0.1"));
  assert.equal(isInstalled(root), false, "the lock file moved on");
  write("packages/package-lock.json", { packages: { "": {} } });
  assert.equal(isInstalled(root), false, "a package that is no longer wanted");
});

test("a build is called for by a changed, new or removed source, not by a test", () => {
  const root = path.join(folder, "sources");
  write("sources/app/page.tsx", "one");
  write("sources/lib/money.ts", "two");
  write("sources/package.json", "{}");
  const first = hashSources(root);
  write("sources/lib/money.test.ts", "test");
  write("sources/tests/anything.ts", "test");
  write("sources/vitest.config.ts", "test");
  assert.equal(hashSources(root), first);
  write("sources/app/new.tsx", "");
  const second = hashSources(root);
  assert.notEqual(second, first);
  fs.rmSync(path.join(root, "app/new.tsx"));
  assert.equal(hashSources(root), first);
  write("sources/app/page.tsx", "ona");
  assert.notEqual(hashSources(root), first);
});

test("secrets are made once, readable by their owner alone, and never made anew beside existing data", () => {
  const home = path.join(folder, "home");
  fs.mkdirSync(home);
  const data = path.join(home, "data");
  const secrets = keepSecrets(home, data);
  const file = path.join(home, "secrets.json");
  assert.equal(fs.statSync(file).mode & 0o777, 0o600);
  assert.deepEqual(keepSecrets(home, data), secrets);
  fs.mkdirSync(data);
  fs.rmSync(file);
  assert.throws(() => keepSecrets(home, data), /secrets.json is gone/);
});

test("a missing, empty or closed home folder is replaced, with npm's cache", () => {
  for (const HOME of [undefined, "", "/nonexistent", "relative"]) {
    const env = childEnvironment({}, { HOME, npm_config_cache: "/nonexistent/.npm", PATH: "/bin" });
    fs.accessSync(env.HOME, fs.constants.W_OK);
    assert.notEqual(env.npm_config_cache, "/nonexistent/.npm");
  }
  assert.equal(childEnvironment({}, { HOME: folder }).HOME, folder);
});

test("settings of the caller's shell do not leak into children", () => {
  const env = childEnvironment(
    { LOG_LEVEL: "warn" },
    { HOME: folder, DATABASE_URL: "postgres://real", SMTP_URL: "smtp://real", LOG_LEVEL: "trace" },
  );
  assert.equal("DATABASE_URL" in env, false);
  assert.equal("SMTP_URL" in env, false);
  assert.equal(env.LOG_LEVEL, "warn");
});
