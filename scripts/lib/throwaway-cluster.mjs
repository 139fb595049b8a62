import fs from "node:fs";
import path from "node:path";
import { databaseUrls, ensureDatabase, ensureOwner, migrate } from "./databases.mjs";
import { temporaryFolders } from "./environment.mjs";
import { startCluster } from "./postgres-cluster.mjs";
import { clearLeftovers } from "./postgres-leftovers.mjs";
import { canKeepDataIn, databaseUser } from "./postgres-user.mjs";
import { Problem } from "./problem.mjs";
import { identify, isAlive } from "./process-identity.mjs";
import { projectHash } from "./project.mjs";
import { newSecrets } from "./secrets.mjs";

const prefix = `agraffe-test-${projectHash}-`;
export const templateDatabase = "agraffe_template";
const firstPort = 5500;

/** Removes what test runs left behind that were killed before they could tidy up. */
async function sweepThrowAways() {
  let swept = 0;
  for (const parent of temporaryFolders()) {
    for (const name of fs.readdirSync(parent).filter((entry) => entry.startsWith(prefix))) {
      const folder = path.join(parent, name);
      const ownerFile = path.join(folder, "owner");
      const owner = fs.existsSync(ownerFile) ? fs.readFileSync(ownerFile, "utf8") : "";
      if (isAlive(owner)) continue;
      await clearLeftovers(path.join(folder, "data"));
      fs.rmSync(folder, { recursive: true, force: true });
      swept += 1;
    }
  }
  return swept;
}

async function makeFolder(user) {
  const parents = temporaryFolders();
  for (const parent of parents) {
    const folder = fs.mkdtempSync(path.join(parent, prefix));
    fs.writeFileSync(path.join(folder, "owner"), identify(process.pid) ?? "");
    if (await canKeepDataIn(folder, user)) return folder;
    fs.rmSync(folder, { recursive: true, force: true });
  }
  throw new Problem(
    `PostgreSQL's throw-away data can be kept in none of these folders: ${parents.join(", ")}.`,
  );
}

/** A cluster for tests: fast, forgetful, on a free port; `dispose` leaves nothing behind. */
export async function startThrowAwayCluster() {
  await sweepThrowAways();
  const user = databaseUser();
  const folder = await makeFolder(user);
  const secrets = newSecrets();
  const remove = () => fs.rmSync(folder, { recursive: true, force: true });
  try {
    const cluster = await startCluster({
      dataFolder: path.join(folder, "data"),
      user,
      password: secrets.superuser,
      preferredPort: firstPort,
      durable: false,
      log: "postgres-test",
    });
    await ensureOwner(cluster, secrets);
    return {
      cluster,
      secrets,
      folder,
      remove,
      async dispose() {
        await cluster.stop();
        remove();
      },
    };
  } catch (error) {
    remove();
    throw error;
  }
}

/** Migrated once; the databases of the steps are copies of it. */
export async function makeTemplate({ cluster, secrets }) {
  await ensureDatabase(cluster, templateDatabase);
  await migrate(databaseUrls(cluster, secrets, templateDatabase), "migrate-test");
}

/** Grants on a database itself do not travel with a copy, so the copy is migrated too. */
export async function copyTemplate({ cluster, secrets }, name) {
  await ensureDatabase(cluster, name, { template: templateDatabase });
  const urls = databaseUrls(cluster, secrets, name);
  await migrate(urls, "migrate-test");
  return urls;
}
