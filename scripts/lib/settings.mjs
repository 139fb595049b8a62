import { appRole, authRole } from "./databases.mjs";
import { Problem } from "./problem.mjs";
import { derivedPassword } from "./secrets.mjs";

const preferredPort = 3000;
const shortestSecret = 32;

function parseUrl(name, value, protocols) {
  let url;
  try {
    url = new URL(value);
  } catch {
    throw new Problem(
      `${name} is not a URL. It has to begin with ${protocols.map((p) => `${p}//`).join(" or ")}.`,
    );
  }
  if (!protocols.includes(url.protocol))
    throw new Problem(`${name} has to begin with ${protocols.map((p) => `${p}//`).join(" or ")}.`);
  return url;
}

function readPort(text) {
  if (!text) return { port: preferredPort, portIsChosen: false };
  const port = Number(text);
  if (!/^\d+$/.test(text) || port < 1 || port > 65_535)
    throw new Problem(`PORT is "${text}", but a port is a whole number from 1 to 65535.`);
  return { port, portIsChosen: true };
}

function asRole(ownerUrl, role, secret) {
  const url = new URL(ownerUrl);
  url.username = role;
  url.password = derivedPassword(secret, role);
  return url.href;
}

function readDatabase(env) {
  if (!env.DATABASE_URL) return undefined;
  parseUrl("DATABASE_URL", env.DATABASE_URL, ["postgres:", "postgresql:"]);
  if (!env.AUTH_SECRET)
    throw new Problem(
      "DATABASE_URL is set, so AUTH_SECRET has to be set too: a random text of at least 32 characters that stays the same from start to start. One can be made with: openssl rand -base64 33",
    );
  return {
    owner: env.DATABASE_URL,
    app: env.APP_DATABASE_URL || asRole(env.DATABASE_URL, appRole, env.AUTH_SECRET),
    auth: env.AUTH_DATABASE_URL || asRole(env.DATABASE_URL, authRole, env.AUTH_SECRET),
  };
}

export function isLoopback(host) {
  return host === "localhost" || host === "::1" || /^127\./.test(host);
}

/** What the caller's environment asks for. `database` is undefined where our own cluster is to be used. */
export function readSettings(env) {
  if (env.AUTH_SECRET && env.AUTH_SECRET.length < shortestSecret)
    throw new Problem(`AUTH_SECRET has to be at least ${shortestSecret} characters long.`);
  if (env.SMTP_URL) parseUrl("SMTP_URL", env.SMTP_URL, ["smtp:", "smtps:"]);
  if (env.APP_URL) parseUrl("APP_URL", env.APP_URL, ["http:", "https:"]);
  return {
    ...readPort(env.PORT),
    host: env.HOST || "127.0.0.1",
    appUrl: env.APP_URL?.replace(/\/+$/, "") || undefined,
    database: readDatabase(env),
    smtpUrl: env.SMTP_URL || undefined,
    authSecret: env.AUTH_SECRET || undefined,
    logLevel: env.LOG_LEVEL || "info",
  };
}

/** Where a browser on this machine finds a server listening on that host and port. */
export function addressOf(host, port) {
  const everywhere = host === "0.0.0.0" || host === "::";
  const name = everywhere ? "127.0.0.1" : host.includes(":") ? `[${host}]` : host;
  return `http://${name}:${port}`;
}
