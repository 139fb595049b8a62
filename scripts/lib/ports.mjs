import net from "node:net";

/** The number of a port that can be listened on now, or undefined. `port` 0 asks for any. */
export function probePort(port, host = "127.0.0.1") {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once("error", (error) => {
      if (error.code === "EADDRINUSE" || error.code === "EACCES") resolve(undefined);
      else reject(error);
    });
    server.listen({ port, host, exclusive: true }, () => {
      const found = server.address().port;
      server.close(() => resolve(found));
    });
  });
}

/** The preferred port, else the next free one above it, else any. */
export async function findFreePort(preferred, { host = "127.0.0.1", reach = 50 } = {}) {
  for (let port = preferred; port <= Math.min(preferred + reach, 65_535); port += 1) {
    if (await probePort(port, host)) return port;
  }
  return await probePort(0, host);
}
