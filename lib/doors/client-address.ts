import { subscribe } from "node:diagnostics_channel";
import type { IncomingMessage } from "node:http";
import { env } from "@/lib/env";

/** Written by this server over whatever the client sent under this name, so it can be believed. */
export const clientAddressHeader = "x-client-address";

/** What limits before sign-in are counted by. */
export function clientAddress(headers: Headers): string {
  return headers.get(clientAddressHeader) ?? "unknown";
}

/**
 * The client's address as the outermost proxy of our own saw it. X-Forwarded-For is a list to which each proxy
 * adds who asked it; what stands left of our own proxies' entries is the client's claim about itself.
 */
export function addressOf(
  socketAddress: string | undefined,
  forwardedFor: string | string[] | undefined,
  trustedProxies: number,
): string {
  const forwarded = [forwardedFor ?? []]
    .flat()
    .join(",")
    .split(",")
    .map((entry) => entry.trim())
    .filter(Boolean);
  // A socket that takes both kinds of address writes the older kind in the newer one's form.
  const hops = [...forwarded, socketAddress?.replace(/^::ffff:(?=[\d.]+$)/i, "") ?? "unknown"];
  return hops.at(-1 - trustedProxies) ?? hops[0] ?? "unknown";
}

/** Before the framework reads a request: it keeps no hold of the socket, and believes the client's header. */
export function noteClientAddresses(): void {
  subscribe("http.server.request.start", (message) => {
    const { request } = message as { request: IncomingMessage };
    request.headers[clientAddressHeader] = addressOf(
      request.socket.remoteAddress,
      request.headers["x-forwarded-for"],
      env().TRUSTED_PROXIES,
    );
  });
}
