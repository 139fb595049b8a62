import fs from "node:fs";

/** A process id together with when it began, because ids are used again. */
export function identify(pid) {
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, "utf8");
    const [state, ...rest] = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    return state === "Z" ? undefined : `${pid} ${rest[18]}`;
  } catch {
    return undefined;
  }
}

export function isAlive(identity) {
  return identity !== "" && identify(Number.parseInt(identity, 10)) === identity;
}
