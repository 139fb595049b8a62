import "./lib/require-node.mjs";
import { copyBuildFor } from "./lib/build.mjs";
import { databaseUrls, ensureDatabase, ensureOwner, migrate, seed } from "./lib/databases.mjs";
import { startLocalCluster } from "./lib/local-cluster.mjs";
import { acquire } from "./lib/lock.mjs";
import { complain, say, step } from "./lib/output.mjs";
import { findFreePort, probePort } from "./lib/ports.mjs";
import { buildPages, prepare } from "./lib/prepare.mjs";
import { CommandFailed, explain, Problem } from "./lib/problem.mjs";
import { startMailbox, startWeb } from "./lib/services.mjs";
import { addressOf, isLoopback, readSettings } from "./lib/settings.mjs";
import { endOnSignals, isEnding, shutDown } from "./lib/shutdown.mjs";

const databaseName = "agraffe";

async function beTheOnlyOne() {
  const { lock, holder } = await acquire("start", (other) => other.state === "stopping");
  if (lock) return lock;
  const where = holder.url ? `at ${holder.url}` : "and is still starting";
  throw new Problem(
    `Agraffe is already running from this folder ${where} (process ${holder.pid}). Open that address, or stop it with Ctrl-C where it was started.`,
  );
}

async function choosePort({ port, portIsChosen, host }) {
  if (await probePort(port, host)) return port;
  if (portIsChosen)
    throw new Problem(
      `Port ${port} on ${host} is taken by another program. Choose another, for example: PORT=${port + 1} npm start`,
    );
  const free = await findFreePort(port + 1, { host });
  say(`Port ${port} is taken by another program, so this is port ${free}. PORT=… chooses another.`);
  return free;
}

/** Our own cluster with its demo shops, or somebody's own database, where nothing is invented. */
async function openDatabase(settings) {
  if (settings.database) return { urls: settings.database, authSecret: settings.authSecret, isLocal: false };
  let urls;
  let authSecret;
  await step("Database cluster", async () => {
    const { cluster, secrets, dataFolder } = await startLocalCluster();
    await ensureOwner(cluster, secrets);
    await ensureDatabase(cluster, databaseName);
    urls = databaseUrls(cluster, secrets, databaseName);
    authSecret = settings.authSecret ?? secrets.authSecret;
    processes.push({ name: "PostgreSQL", child: cluster.server });
    return `127.0.0.1:${cluster.port}, data in ${dataFolder}`;
  });
  return { urls, authSecret, isLocal: true };
}

async function openMail(settings, isLocal) {
  if (settings.smtpUrl) return { smtpUrl: settings.smtpUrl };
  if (!isLocal) return {};
  let mailbox;
  await step("Mailbox", async () => {
    mailbox = await startMailbox();
    processes.push({ name: "The mailbox", child: mailbox.child });
  });
  return mailbox;
}

function webEnvironment({ settings, appUrl, database, mail }) {
  return {
    APP_URL: appUrl,
    APP_DATABASE_URL: database.urls.app,
    AUTH_DATABASE_URL: database.urls.auth,
    AUTH_SECRET: database.authSecret,
    LOG_LEVEL: settings.logLevel,
    ...(mail.smtpUrl ? { SMTP_URL: mail.smtpUrl } : {}),
    ...(mail.mailboxUrl ? { MAILBOX_URL: mail.mailboxUrl } : {}),
    ...(database.isLocal ? { LOCAL_SERVICES: "1" } : {}),
  };
}

function greet({ appUrl, settings, database, mail }) {
  say();
  say(`Agraffe is at ${appUrl}`);
  if (database.isLocal) {
    say();
    say("Demo sign-ins, all with the password port-averil-demo-2026:");
    say("  owner@larchandwren.example       the owner of the demo shop");
    say("  office@larchandwren.example      its office");
    say("  tech@, tech2@, tech3@larchandwren.example   its technicians");
    say("  customer@example.org             one of its customers");
    say("  owner@harbourstreet.example      the owner of another shop");
  }
  if (mail.mailboxUrl) say(`Mail it sends stays here: ${appUrl}/mailbox`);
  else if (!mail.smtpUrl) say("SMTP_URL is not set, so no mail is sent.");
  if (database.isLocal && !isLoopback(settings.host))
    say(
      `Take care: HOST is ${settings.host}, so anybody who can reach this machine can sign in with the passwords above.`,
    );
  say();
  say("Ctrl-C stops everything.");
}

/** The first of them to end takes the others with it: half a product helps nobody. */
function endTogether() {
  for (const { name, child } of processes) {
    child.exited.then(({ code, signal }) => {
      if (isEnding()) return;
      const failure = new CommandFailed(`${name} ended by itself (${signal ?? `code ${code}`}).`, {
        output: child.output(),
        logFile: child.logFile,
      });
      complain(`\n${explain(failure)}`);
      lock.publish({ state: "stopping" });
      shutDown(1);
    });
  }
}

/** Everything that has to stay up, in the order of starting. */
const processes = [];
let lock;

async function start() {
  const settings = readSettings(process.env);
  lock = await beTheOnlyOne();
  endOnSignals({
    codeFor: () => 0,
    announce() {
      lock.publish({ state: "stopping" });
      say("\nStopping …");
    },
  });
  const port = await choosePort(settings);
  await prepare({ postgres: !settings.database, chromium: false });
  let distDir;
  await step("Pages", async (report) => {
    const built = await buildPages(report, () => copyBuildFor("start"));
    distDir = built.distDir;
    return built.note;
  });

  const address = addressOf(settings.host, port);
  const appUrl = settings.appUrl ?? address;
  const database = await openDatabase(settings);
  await step("Migrations", async () => {
    await migrate(database.urls);
  });
  const mail = await openMail(settings, database.isLocal);
  const environment = webEnvironment({ settings, appUrl, database, mail });
  if (database.isLocal)
    await step("Demo shops", async () => {
      await seed(database.urls, environment);
    });
  await step("Web server", async () => {
    const web = await startWeb({ host: settings.host, port, address, distDir, environment });
    processes.push({ name: "The web server", child: web.child });
  });
  lock.publish({ url: appUrl, state: "running" });
  endTogether();
  greet({ appUrl, settings, database, mail });
}

try {
  await start();
} catch (error) {
  if (!isEnding()) {
    complain(`\n${explain(error)}`);
    lock?.publish({ state: "stopping" });
    await shutDown(1);
  }
}
