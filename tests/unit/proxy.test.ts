import { NextRequest } from "next/server";
import { describe, expect, it } from "vitest";
import { proxy } from "@/proxy";

const own = "https://book.example";

function send(method: string, path: string, headers: Record<string, string>) {
  return proxy(new NextRequest(`${own}${path}`, { method, headers: { host: "book.example", ...headers } }));
}

const action = { "next-action": "40c0ffee", cookie: "__Secure-agraffe.session_token=x" };

describe("a server action from another site's page", () => {
  it.each([
    ["another host", { origin: "https://elsewhere.example" }],
    ["an origin that is hidden", { origin: "null" }],
    ["another port of this host", { origin: "https://book.example:8443" }],
    ["no origin, but told to be cross-site", { "sec-fetch-site": "cross-site" }],
  ])("is refused with 403 and a problem: %s", async (_what, headers) => {
    const answer = send("POST", "/customers/new", { ...action, ...headers });
    expect(answer.status).toBe(403);
    expect(answer.headers.get("content-type")).toBe("application/problem+json");
    expect(await answer.json()).toMatchObject({ code: "forbidden", status: 403 });
  });

  it.each([
    ["its own page", { origin: own }],
    [
      "its own page behind a proxy",
      { origin: own, host: "10.0.0.2:3000", "x-forwarded-host": "book.example" },
    ],
    ["a program without an origin", {}],
  ])("is not confused with %s", (_what, headers) => {
    expect(send("POST", "/customers/new", { ...action, ...headers }).status).toBe(200);
  });

  it("leaves reading alone, and routes to their own check", () => {
    const foreign = { ...action, origin: "https://elsewhere.example" };
    expect(send("GET", "/customers", foreign).status).toBe(200);
    expect(send("POST", "/api/v1/customers", foreign).status).toBe(200);
  });
});
