import net from "node:net";
import { setTimeout as sleep } from "node:timers/promises";
import { projectHash } from "./project.mjs";

/**
 * A lock that the kernel drops with its holder, however that ends: an abstract socket, which has no file to
 * go stale. Whoever connects is told what the holder has published.
 */
const address = (name) => `\0agraffe-${projectHash}-${name}`;

function tryToHold(name) {
  let published = { pid: process.pid };
  const server = net.createServer((socket) => {
    socket.on("error", () => {});
    socket.end(JSON.stringify(published));
  });
  return new Promise((resolve, reject) => {
    server.once("error", (error) => (error.code === "EADDRINUSE" ? resolve(undefined) : reject(error)));
    server.listen({ path: address(name) }, () => {
      server.unref();
      resolve({
        publish(values) {
          published = { ...published, ...values };
        },
        release: () => new Promise((done) => server.close(done)),
      });
    });
  });
}

/** What the holder has published, or undefined when nobody holds the lock. */
export function askHolder(name) {
  return new Promise((resolve) => {
    let text = "";
    const socket = net.connect({ path: address(name) });
    socket.setEncoding("utf8").setTimeout(2000, () => socket.destroy());
    socket.on("data", (part) => {
      text += part;
    });
    socket.on("error", () => {});
    socket.on("close", () => {
      try {
        resolve(JSON.parse(text));
      } catch {
        resolve(undefined);
      }
    });
  });
}

/** Either `{ lock }` or `{ holder }`, after waiting for as long as `worthWaiting(holder)` says so. */
export async function acquire(name, worthWaiting = () => false) {
  for (;;) {
    const lock = await tryToHold(name);
    if (lock) return { lock };
    const holder = await askHolder(name);
    if (holder && !worthWaiting(holder)) return { holder };
    await sleep(250);
  }
}
