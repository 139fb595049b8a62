import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { localFolder } from "./project.mjs";

function isWritableFolder(folder) {
  if (!folder || !path.isAbsolute(folder)) return false;
  try {
    fs.accessSync(folder, fs.constants.W_OK | fs.constants.X_OK);
    return fs.statSync(folder).isDirectory();
  } catch {
    return false;
  }
}

/** What the commands take as settings; a child gets these only from whoever starts it. */
const settings = [
  "DATABASE_URL",
  "APP_DATABASE_URL",
  "AUTH_DATABASE_URL",
  "TEST_DATABASE_URL",
  "AUTH_SECRET",
  "APP_URL",
  "SMTP_URL",
  "MAILBOX_URL",
  "LOCAL_SERVICES",
  "LOG_LEVEL",
  "PORT",
  "HOST",
  "NODE_ENV",
  "NODE_OPTIONS",
  "NEXT_DIST_DIR",
];

/**
 * The environment of every child: the caller's, without settings that could point a child at the wrong
 * service, with telemetry off, and with a home folder and an npm cache that can be written to.
 */
export function childEnvironment(extra = {}, caller = process.env) {
  const env = { ...caller };
  for (const name of settings) delete env[name];
  if (!isWritableFolder(env.HOME)) {
    env.HOME = path.join(localFolder, "home");
    fs.mkdirSync(env.HOME, { recursive: true });
    delete env.XDG_CONFIG_HOME;
    delete env.XDG_CACHE_HOME;
    for (const name of Object.keys(env)) if (name.toLowerCase() === "npm_config_cache") delete env[name];
    env.npm_config_cache = path.join(localFolder, "npm-cache");
  }
  // What children print goes to log files.
  delete env.FORCE_COLOR;
  if (env.TMPDIR && !isWritableFolder(env.TMPDIR)) delete env.TMPDIR;
  return { ...env, NO_COLOR: "1", NEXT_TELEMETRY_DISABLED: "1", BETTER_AUTH_TELEMETRY: "0", ...extra };
}

/** Folders for throw-away data, best first. */
export function temporaryFolders() {
  return [...new Set([os.tmpdir(), "/tmp", "/var/tmp"])].filter(isWritableFolder);
}
