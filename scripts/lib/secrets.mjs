import { createHmac, randomBytes } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import { Problem } from "./problem.mjs";

const names = ["superuser", "owner", "app", "auth", "authSecret"];

function newSecret() {
  return randomBytes(32).toString("base64url");
}

export function newSecrets() {
  return Object.fromEntries(names.map((name) => [name, newSecret()]));
}

/** Random once, then kept beside the data they open, readable by nobody else. */
export function keepSecrets(folder, dataFolder) {
  const file = path.join(folder, "secrets.json");
  if (fs.existsSync(file)) {
    const kept = JSON.parse(fs.readFileSync(file, "utf8"));
    const missing = names.filter((name) => typeof kept[name] !== "string");
    if (missing.length > 0) throw new Problem(`${file} lacks ${missing.join(", ")}.`);
    return kept;
  }
  if (fs.existsSync(dataFolder))
    throw new Problem(
      `${file} is gone, and without it the data in ${dataFolder} cannot be opened. Put it back, or move the data folder away to begin with an empty book.`,
    );
  const secrets = newSecrets();
  fs.writeFileSync(`${file}.new`, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  fs.renameSync(`${file}.new`, file);
  return secrets;
}

/** With somebody's own database there is no place for random passwords, so they follow from its secret. */
export function derivedPassword(secret, role) {
  return createHmac("sha256", secret).update(`agraffe database role ${role}`).digest("base64url");
}
