import fs from "node:fs";
import { childEnvironment } from "./environment.mjs";
import { Problem } from "./problem.mjs";
import { run } from "./processes.mjs";

/**
 * Installing Debian's server package would make and start a cluster called "main". Ours is separate, so the
 * package is told not to; a setting the machine already had is put back afterwards.
 */
const withoutDefaultCluster = `
conf=/etc/postgresql-common/createcluster.conf
mkdir -p /etc/postgresql-common
if [ -e "$conf" ]; then
  cp -p "$conf" "$conf.before-agraffe"
  trap 'mv -f "$conf.before-agraffe" "$conf"' EXIT
  sed -i '/^[[:space:]]*create_main_cluster/d' "$conf"
fi
echo 'create_main_cluster = false' >> "$conf"
`;

function installScript(packages, preamble) {
  const quiet = "-q -o DPkg::Lock::Timeout=300";
  return `set -e
export DEBIAN_FRONTEND=noninteractive
dpkg --configure -a
${preamble}
apt-get update ${quiet} || echo "The package lists could not be refreshed; trying with the ones at hand."
apt-get install -y --no-install-recommends ${quiet} -o Dpkg::Options::=--force-confold ${packages.join(" ")}
`;
}

async function canBecomeRoot() {
  try {
    await run("sudo", ["-n", "true"]);
    return true;
  } catch {
    return false;
  }
}

async function install(packages, { report, preamble = "", byHand }) {
  if (!["/usr/bin/apt-get", "/bin/apt-get"].some((file) => fs.existsSync(file)))
    throw new Problem(
      `${packages.join(" ")} is missing, and there is no apt-get here to install it with. Agraffe's local services need Debian or a relative of it.`,
    );
  const script = installScript(packages, preamble);
  const asRoot = process.getuid() === 0;
  if (!asRoot && !(await canBecomeRoot()))
    throw new Problem(
      `Debian's package ${packages.join(" ")} is missing, and installing it needs an administrator. Type:\n\n${byHand}\n\nand run the same command again.`,
    );
  await run(asRoot ? "sh" : "sudo", asRoot ? ["-c", script] : ["-n", "sh", "-c", script], {
    cwd: "/",
    env: childEnvironment(),
    log: `install-${packages[0]}`,
    title: `Installing ${packages.join(" ")}`,
    // A package manager cut short leaves a machine to repair.
    stopSignal: null,
    onOutput: report,
  });
}

export function installPostgres(report) {
  return install(["postgresql"], {
    report,
    preamble: withoutDefaultCluster,
    byHand: `  sudo mkdir -p /etc/postgresql-common
  echo 'create_main_cluster = false' | sudo tee -a /etc/postgresql-common/createcluster.conf
  sudo apt-get update && sudo apt-get install -y --no-install-recommends postgresql`,
  });
}

const chromiumPath = "/usr/bin/chromium";

export async function ensureChromium(report) {
  if (fs.existsSync(chromiumPath)) return "already installed";
  await install(["chromium"], {
    report,
    byHand: "  sudo apt-get update && sudo apt-get install -y --no-install-recommends chromium",
  });
  return "installed";
}
