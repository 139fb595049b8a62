import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { closeDatabases } from "@/db/client";
import type { Role } from "@/lib/auth/access";
import { env } from "@/lib/env";
import { newId } from "@/lib/ids";
import { allActions, allRoutes, builtDoors, type FoundAction, type FoundRoute } from "../support/doors";
import { closeFactories } from "../support/factories";
import { type Browser, newBrowser } from "../support/people";
import { signedInRoles } from "../support/signed-in-roles";

/**
 * Who may knock at which door, written by hand from the roles of the product, not read from the code's table.
 * A door without a row here fails; so does a row without a door. What "own" means within an allowed door is
 * tested with its subject.
 */
const staff: Role[] = ["owner", "office", "technician"];
const everybody: Role[] = [...staff, "customer"];
const desk: Role[] = ["owner", "office"];
const workshop: Role[] = ["owner", "technician"];
const ownerOnly: Role[] = ["owner"];

const routeRows: Record<string, readonly Role[] | "anyone"> = {
  "GET /[[...nothing]]": "anyone",
  "POST /[[...nothing]]": "anyone",
  "PUT /[[...nothing]]": "anyone",
  "PATCH /[[...nothing]]": "anyone",
  "DELETE /[[...nothing]]": "anyone",
  "GET /customers": everybody,
  "POST /customers": desk,
  "GET /customers/{id}": everybody,
  "PATCH /customers/{id}": desk,
  "DELETE /customers/{id}": desk,
  "GET /sites": everybody,
  "POST /sites": desk,
  "GET /sites/{id}": everybody,
  "PATCH /sites/{id}": desk,
  "DELETE /sites/{id}": desk,
  "GET /due": staff,
  "GET /instruments": everybody,
  "POST /instruments": desk,
  "GET /instruments/{id}": everybody,
  "PATCH /instruments/{id}": staff,
  "DELETE /instruments/{id}": desk,
  "GET /instruments/{id}/advice": staff,
  "GET /instruments/{id}/compare": staff,
  "GET /instruments/{id}/holdings": everybody,
  "POST /instruments/{id}/holdings": desk,
  "PATCH /instruments/{id}/place": desk,
  "GET /instruments/{id}/service-plan": staff,
  "PUT /instruments/{id}/service-plan": desk,
  "DELETE /instruments/{id}/service-plan": desk,
  "GET /instruments/{id}/sheets": staff,
  "POST /instruments/{id}/sheets": workshop,
  "GET /instruments/{id}/strings": everybody,
  "PUT /instruments/{id}/strings": staff,
  "PUT /instruments/{id}/strings/{midi}": staff,
  "DELETE /instruments/{id}/strings/{midi}": staff,
  "GET /me": everybody,
  "GET /members": staff,
  "GET /plans/{id}": staff,
  "GET /plans/{id}/export": staff,
  "GET /search": staff,
  "GET /sheets/{id}": staff,
  "PATCH /sheets/{id}": workshop,
  "DELETE /sheets/{id}": workshop,
  "GET /sheets/{id}/analysis": staff,
  "GET /sheets/{id}/export": staff,
  "PUT /sheets/{id}/notes": workshop,
  "GET /sheets/{id}/notes/{midi}": staff,
  "PUT /sheets/{id}/notes/{midi}": workshop,
  "DELETE /sheets/{id}/notes/{midi}": workshop,
  "GET /sheets/{id}/plans": staff,
  "POST /sheets/{id}/plans": workshop,
  "GET /sites/{id}/events": staff,
  "POST /sites/{id}/events": desk,
  "DELETE /sites/{id}/events/{eventId}": desk,
  "GET /styles": staff,
  "POST /styles": ownerOnly,
  "PATCH /styles/{id}": ownerOnly,
  "GET /visits": everybody,
  "POST /visits": staff,
  "GET /visits/{id}": everybody,
  "PATCH /visits/{id}": staff,
  "DELETE /visits/{id}": staff,
  "POST /visits/{id}/transitions": staff,
};

const actionRows: Record<string, readonly Role[] | "anyone" | "signed-in"> = {
  "account.begin-two-step": everybody,
  "account.change-name": everybody,
  "account.change-password": everybody,
  "account.confirm-two-step": everybody,
  "account.end-other-sessions": everybody,
  "account.end-session": everybody,
  "account.end-two-step": everybody,
  "account.new-recovery-codes": everybody,
  "account.switch-shop": everybody,
  "customers.change": desk,
  "customers.create": desk,
  "instruments.archive": desk,
  "instruments.change": staff,
  "instruments.correct-place": desk,
  "instruments.create": desk,
  "instruments.move": desk,
  "instruments.remove-string": staff,
  "instruments.save-string": staff,
  "instruments.save-strings": staff,
  "invitations.accept": "signed-in",
  "invitations.accept-as-new": "anyone",
  "service-plans.remove": desk,
  "service-plans.save": desk,
  "sheets.change": workshop,
  "sheets.create": workshop,
  "shop.change": ownerOnly,
  "shop.open": "signed-in",
  "sign-in.code": "anyone",
  "sign-in.confirm-address": "anyone",
  "sign-in.password": "anyone",
  "sign-in.recovery-code": "anyone",
  "sign-in.request-reset": "anyone",
  "sign-in.reset-password": "anyone",
  "sign-in.send-confirmation": "anyone",
  "sign-in.sign-out": "anyone",
  "sign-in.sign-up": "anyone",
  "sites.add-event": desk,
  "sites.change": desk,
  "sites.create": desk,
  "sites.remove-event": desk,
  "styles.change": ownerOnly,
  "styles.create": ownerOnly,
  "team.change-member": ownerOnly,
  "team.end-membership": ownerOnly,
  "team.invite": ownerOnly,
  "team.resend-invitation": ownerOnly,
  "team.revoke-invitation": ownerOnly,
  "visits.book": staff,
  "visits.change": staff,
  "visits.move": staff,
  "visits.step": staff,
};

// Actions read the request's headers through Next; here they are the browser's in hand.
let current = new Headers();
vi.mock("next/headers", () => ({
  headers: async () => current,
  cookies: async () => ({ get: () => undefined, set: () => {}, delete: () => {}, getAll: () => [] }),
}));
vi.mock("next/cache", () => ({ revalidatePath: () => {}, revalidateTag: () => {}, refresh: () => {} }));

let browsers: Record<Role, Browser>;
let actions: FoundAction[];
const routes = allRoutes();

function knock(route: FoundRoute, browser: Browser | null): Promise<Response> {
  const url = `${env().APP_URL}/api/v1${route.path.replace("{id}", newId()).replace("{midi}", "69").replace("{eventId}", newId())}?version=1`;
  const headers = browser ? browser.headers() : new Headers({ origin: env().APP_URL });
  if (route.method !== "GET") headers.set("content-type", "application/json");
  const hasBody = route.method !== "GET" && route.method !== "DELETE";
  const request = new Request(url, { method: route.method, headers, ...(hasBody ? { body: "{}" } : {}) });
  return route.handler(request, { params: Promise.resolve({ id: newId(), midi: "69" }) });
}

beforeAll(async () => {
  ({ browsers } = await signedInRoles());
  actions = await allActions();
});

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

/** Doors without a row and rows without a door. */
function unmatched(doors: readonly { key: string }[], rows: Record<string, unknown>): string[] {
  const keys = new Set(doors.map(({ key }) => key));
  return [
    ...[...keys].filter((key) => !(key in rows)),
    ...Object.keys(rows).filter((key) => !keys.has(key)),
  ].sort();
}

describe("routes", () => {
  it("have a row each in the matrix, and the matrix no row without a route", () => {
    expect(unmatched(routes, routeRows)).toEqual([]);
  });

  it("are missed when one is planted without a row, or a row is left behind", () => {
    expect(unmatched([...routes, { key: "GET /planted" }], routeRows)).toEqual(["GET /planted"]);
    expect(unmatched(routes, { ...routeRows, "GET /gone": staff })).toEqual(["GET /gone"]);
  });

  it.each(routes)("$key answers the roles it is for and refuses the others", async (route) => {
    const row = routeRows[route.key] ?? [];
    const allowed = row === "anyone" ? everybody : row;
    for (const role of everybody) {
      const { status } = await knock(route, browsers[role]);
      if (allowed.includes(role))
        expect([200, 201, 204, 404, 409, 422], `${role}: ${status}`).toContain(status);
      else expect(status, role).toBe(403);
    }
    expect((await knock(route, null)).status, "signed out").toBe(row === "anyone" ? 404 : 401);
  });

  it("answer an address that is none with a problem, signed in or not", async () => {
    const nowhere = routes.filter(({ path }) => path === "/[[...nothing]]");
    expect(nowhere.map(({ method }) => method).sort()).toEqual(["DELETE", "GET", "PATCH", "POST", "PUT"]);
    for (const route of nowhere) {
      for (const browser of [browsers.technician, null]) {
        const answer = await knock(route, browser);
        expect(answer.status).toBe(404);
        expect(answer.headers.get("content-type")).toBe("application/problem+json");
        expect(await answer.json()).toMatchObject({ code: "not-found", status: 404 });
      }
    }
  });

  it("refuse a write from another site's page", async () => {
    const write = routes.find(({ key }) => key === "POST /customers");
    if (!write) throw new Error("POST /customers is gone");
    const foreign = newBrowser({ origin: "https://elsewhere.example" });
    for (const [name, value] of browsers.owner.cookies) foreign.cookies.set(name, value);
    expect((await knock(write, foreign)).status).toBe(403);
  });

  it("are all of those that the build serves", () => {
    const described = routes.map(({ path }) => `/api/v1${path.replace(/\{(\w+)\}/g, "[$1]")}/route`);
    const known = new Set([
      ...described,
      "/api/auth/[...all]/route",
      "/api/health/live/route",
      "/api/health/ready/route",
      "/api/v1/openapi.json/route",
    ]);
    const unknown = builtDoors().routes.filter(
      (name) => !known.has(name) && !/icon|manifest|robots|sitemap/.test(name),
    );
    expect(unknown).toEqual([]);
  });
});

describe("actions", () => {
  it("have a row each in the matrix, and the matrix no row without an action", () => {
    expect(unmatched(actions, actionRows)).toEqual([]);
  });

  it("are as many as the build serves", () => {
    expect(actions.length).toBe(builtDoors().actions);
  });

  it("answer the roles they are for and refuse the others", async () => {
    for (const action of actions) {
      const allowed = actionRows[action.key];
      if (allowed === "anyone" || allowed === "signed-in" || !allowed) {
        expect(action.permission, action.key).toBe(allowed);
        continue;
      }
      for (const role of everybody) {
        current = browsers[role].headers();
        const result = await action.act({ nothing: "of use" });
        const code = result.ok ? "ok" : result.error.code;
        if (allowed.includes(role))
          expect(["forbidden", "signed-out"], `${action.key} as ${role}: ${code}`).not.toContain(code);
        else expect(code, `${action.key} as ${role}`).toBe("forbidden");
      }
      current = new Headers();
      const result = await action.act({ nothing: "of use" });
      expect(result.ok ? "ok" : result.error.code, `${action.key} signed out`).toBe("signed-out");
    }
  });
});
