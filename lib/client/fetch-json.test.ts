import { afterEach, describe, expect, it, vi } from "vitest";
import { makeQueryClient } from "@/components/providers";
import { fetchJson, NetworkError, ProblemError } from "./fetch-json";

function answerWith(status: number, body: string, type = "application/json") {
  const spy = vi.fn(async () => new Response(body || null, { status, headers: { "content-type": type } }));
  vi.stubGlobal("fetch", spy);
  return spy;
}

afterEach(() => vi.unstubAllGlobals());

describe("fetchJson", () => {
  it("gives the parsed answer and sends a body as JSON", async () => {
    const spy = answerWith(201, '{"id":"1"}');
    expect(await fetchJson("/api/v1/customers", { body: { name: "Moravec" } })).toEqual({ id: "1" });
    expect(spy).toHaveBeenCalledWith(
      "/api/v1/customers",
      expect.objectContaining({ method: "POST", body: '{"name":"Moravec"}', credentials: "same-origin" }),
    );
  });

  it("leaves empty query values out and escapes the others", async () => {
    const spy = answerWith(200, "{}");
    await fetchJson("/api/v1/instruments", { query: { q: "a&b", state: "", cursor: null, limit: 50 } });
    expect(spy).toHaveBeenCalledWith("/api/v1/instruments?q=a%26b&limit=50", expect.anything());
  });

  it("throws the problem with its field errors and the current record", async () => {
    answerWith(
      409,
      JSON.stringify({
        type: "/problems/stale-version",
        title: "Somebody else changed this.",
        status: 409,
        errors: [{ path: "name", message: "Taken." }],
        current: { version: 4 },
      }),
      "application/problem+json",
    );
    const error = await fetchJson("/api/v1/x").catch((reason: unknown) => reason);
    expect(error).toBeInstanceOf(ProblemError);
    expect((error as ProblemError).problem).toMatchObject({
      type: "/problems/stale-version",
      status: 409,
      errors: [{ path: "name", message: "Taken." }],
      current: { version: 4 },
    });
  });

  it("believes the status line rather than a page that says something else", async () => {
    answerWith(502, "<html>Bad gateway</html>", "text/html");
    const error = await fetchJson("/api/v1/x").catch((reason: unknown) => reason);
    expect(error).toBeInstanceOf(ProblemError);
    expect((error as ProblemError).status).toBe(502);
  });

  it("does not take an HTML page answered with 200 for data", async () => {
    answerWith(200, "<html>Sign in</html>", "text/html");
    await expect(fetchJson("/api/v1/x")).rejects.toBeInstanceOf(ProblemError);
  });

  it("tells a missing network from a refusal, and an abort from both", async () => {
    vi.stubGlobal("fetch", async () => {
      throw new TypeError("Failed to fetch");
    });
    await expect(fetchJson("/api/v1/x")).rejects.toBeInstanceOf(NetworkError);

    const stop = new AbortController();
    vi.stubGlobal("fetch", async () => {
      stop.abort();
      throw new DOMException("stopped", "AbortError");
    });
    await expect(fetchJson("/api/v1/x", { signal: stop.signal })).rejects.toMatchObject({
      name: "AbortError",
    });
  });

  it("accepts an empty answer only where the status allows one", async () => {
    answerWith(204, "");
    expect(await fetchJson("/api/v1/x", { method: "DELETE" })).toBeUndefined();
    answerWith(200, "");
    await expect(fetchJson("/api/v1/x")).rejects.toBeInstanceOf(ProblemError);
  });
});

describe("asking again", () => {
  const problem = (status: number) => new ProblemError({ type: "about:blank", title: "x", status });
  const retry = makeQueryClient().getDefaultOptions().queries?.retry;

  it.each([
    ["a refusal", problem(404), 0, false],
    ["a server error", problem(503), 0, true],
    ["no answer", new NetworkError(null), 1, true],
    ["no answer for the third time", new NetworkError(null), 2, false],
  ])("after %s", (_, error, failures, again) => {
    if (typeof retry !== "function") throw new Error("the defaults must decide by the error");
    expect(retry(failures, error)).toBe(again);
  });
});
