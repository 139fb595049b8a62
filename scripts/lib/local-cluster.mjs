import fs from "node:fs";
import path from "node:path";
import { startCluster } from "./postgres-cluster.mjs";
import { canKeepDataIn, databaseUser } from "./postgres-user.mjs";
import { Problem } from "./problem.mjs";
import { localFolder, projectHash, projectRoot } from "./project.mjs";
import { keepSecrets } from "./secrets.mjs";

/** Inside the project, or, where PostgreSQL's user cannot get in, one folder per project elsewhere. */
function possibleHomes() {
  return [
    path.join(localFolder, "cluster"),
    path.join("/var/lib", `agraffe-${path.basename(projectRoot)}-${projectHash}`),
  ];
}

async function chooseHome() {
  const homes = possibleHomes();
  const withData = homes.filter((home) => fs.existsSync(path.join(home, "data")));
  for (const home of [...withData, ...homes]) {
    const user = databaseUser(path.join(home, "data"));
    if (await canKeepDataIn(home, user)) return { home, user };
  }
  throw new Problem(`PostgreSQL's data can be kept in none of these folders: ${homes.join(", ")}.`);
}

/** Away from 5432, and spread out so that two checkouts seldom want the same one. */
const preferredPort = 5440 + (Number.parseInt(projectHash.slice(0, 6), 16) % 50);

/** The lasting cluster of `npm start`. */
export async function startLocalCluster() {
  const { home, user } = await chooseHome();
  const dataFolder = path.join(home, "data");
  const secrets = keepSecrets(home, dataFolder);
  const cluster = await startCluster({
    dataFolder,
    user,
    password: secrets.superuser,
    preferredPort,
    durable: true,
    log: "postgres",
  });
  return { cluster, secrets, dataFolder };
}
