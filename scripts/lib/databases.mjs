import { childEnvironment } from "./environment.mjs";
import { runScript } from "./processes.mjs";
import { inProject } from "./project.mjs";

const ownerRole = "agraffe_owner";
export const appRole = "agraffe_app";
export const authRole = "agraffe_auth";

/**
 * The owner migrates. It may make roles and databases, and passes row-level security because the listed
 * SECURITY DEFINER functions run as it; it is no superuser, as on a managed server.
 */
export async function ensureOwner(cluster, secrets) {
  await cluster.sql(`
    SELECT 'CREATE ROLE ${ownerRole}' WHERE NOT EXISTS (SELECT FROM pg_roles WHERE rolname = '${ownerRole}') \\gexec
    ALTER ROLE ${ownerRole} LOGIN CREATEROLE CREATEDB BYPASSRLS PASSWORD '${secrets.owner}';
  `);
}

export async function ensureDatabase(cluster, name, { template = "template0" } = {}) {
  await cluster.sql(`
    SELECT 'CREATE DATABASE ${name} OWNER ${ownerRole} TEMPLATE ${template}'
     WHERE NOT EXISTS (SELECT FROM pg_database WHERE datname = '${name}') \\gexec
  `);
}

/** The three doors into one database of our own cluster. */
export function databaseUrls(cluster, secrets, database) {
  return {
    owner: cluster.url({ role: ownerRole, secret: secrets.owner, database }),
    app: cluster.url({ role: appRole, secret: secrets.app, database }),
    auth: cluster.url({ role: authRole, secret: secrets.auth, database }),
  };
}

export function migrate(urls, log = "migrate") {
  return runScript(inProject("scripts", "migrate.ts"), ownerEnvironment(urls), {
    log,
    title: "Migrating the database",
  });
}

export function seed(urls, appEnvironment, log = "seed") {
  return runScript(inProject("scripts", "seed.ts"), ownerEnvironment(urls, appEnvironment), {
    log,
    title: "Seeding the demo shops",
  });
}

function ownerEnvironment(urls, extra = {}) {
  return childEnvironment({
    ...extra,
    DATABASE_URL: urls.owner,
    APP_DATABASE_URL: urls.app,
    AUTH_DATABASE_URL: urls.auth,
  });
}
