import fs from "node:fs";
import path from "node:path";
import { installPostgres } from "./debian.mjs";
import { Problem } from "./problem.mjs";

const debianFolder = "/usr/lib/postgresql";
const needed = ["initdb", "postgres", "psql"];

/** The server versions installed here, newest first. They are not on the PATH. */
function installedVersions(folder = debianFolder) {
  if (!fs.existsSync(folder)) return [];
  return fs
    .readdirSync(folder)
    .filter((version) => needed.every((name) => fs.existsSync(path.join(folder, version, "bin", name))))
    .sort((a, b) => Number(b) - Number(a));
}

export async function ensurePostgres(report) {
  const [present] = installedVersions();
  if (present) return `version ${present}, already installed`;
  await installPostgres(report);
  const [version] = installedVersions();
  if (!version) throw new Problem(`Debian's postgresql package is installed, but ${debianFolder} is empty.`);
  return `version ${version} installed`;
}

/** A data folder can be served by its own major version only. */
export function binariesFor(dataFolder) {
  const versions = installedVersions();
  const versionFile = path.join(dataFolder, "PG_VERSION");
  const version = fs.existsSync(versionFile) ? fs.readFileSync(versionFile, "utf8").trim() : versions[0];
  if (!versions.includes(version))
    throw new Problem(
      `The data in ${dataFolder} was made by PostgreSQL ${version}, and this machine has ${versions.join(", ") || "none"}. Install postgresql-${version}, or move that folder away to begin with an empty book.`,
    );
  return path.join(debianFolder, version, "bin");
}
