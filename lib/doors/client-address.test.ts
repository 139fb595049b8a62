import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import { afterEach, describe, expect, it } from "vitest";
import { addressOf, clientAddress, clientAddressHeader, noteClientAddresses } from "./client-address";

describe("the client's address", () => {
  it("is the socket's where no proxy is trusted, whatever the client says", () => {
    expect(addressOf("192.0.2.7", undefined, 0)).toBe("192.0.2.7");
    expect(addressOf("::ffff:192.0.2.7", "203.0.113.1", 0)).toBe("192.0.2.7");
    expect(addressOf("192.0.2.7", ["203.0.113.1", "203.0.113.2"], 0)).toBe("192.0.2.7");
  });

  it("is what the outermost trusted proxy saw, not what stands before that", () => {
    expect(addressOf("10.0.0.1", "203.0.113.9, 198.51.100.4", 1)).toBe("198.51.100.4");
    expect(addressOf("10.0.0.1", "203.0.113.9, 198.51.100.4, 10.0.0.2", 2)).toBe("198.51.100.4");
  });

  it("is the socket's where somebody comes round the proxy without the header", () => {
    expect(addressOf("192.0.2.7", undefined, 1)).toBe("192.0.2.7");
  });

  it("is one for all where it is not known", () => {
    expect(addressOf(undefined, "203.0.113.1", 0)).toBe("unknown");
    expect(clientAddress(new Headers({ "x-forwarded-for": "203.0.113.1" }))).toBe("unknown");
  });
});

describe("a running server", () => {
  const server = createServer((request, response) => response.end(request.headers[clientAddressHeader]));
  afterEach(() => server.close());

  it("writes the address itself over what the client sends", async () => {
    Object.assign(process.env, {
      APP_DATABASE_URL: "postgres://a@127.0.0.1/a",
      AUTH_DATABASE_URL: "postgres://a@127.0.0.1/a",
      AUTH_SECRET: "x".repeat(32),
    });
    noteClientAddresses();
    await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
    const { port } = server.address() as AddressInfo;
    const answer = await fetch(`http://127.0.0.1:${port}/`, {
      headers: { [clientAddressHeader]: "203.0.113.1", "x-forwarded-for": "203.0.113.2" },
    });
    expect(await answer.text()).toBe("127.0.0.1");
  });
});
