import { readFileSync } from "node:fs";
import path from "node:path";
import type { DemoRecords } from "./demo-records";
import type { DemoPerson } from "./people";

type Visited = {
  as: DemoPerson | null;
  at: (records: DemoRecords) => string;
  /** Where the address leads, if elsewhere. */
  endsAt?: string;
};

const staff = (as: DemoPerson, at: Visited["at"]): Visited => ({ as, at });
const open = (address: string): Visited => ({ as: null, at: () => address });

/** Every page of the product, opened by somebody whom it serves. A page without a line here fails the test. */
export const allPages: Record<string, Visited> = {
  "/(auth)/confirm-address/page": open("/confirm-address?token=none"),
  "/(auth)/forgot-password/page": open("/forgot-password"),
  "/(auth)/invitation/[token]/page": open("/invitation/no-such-token"),
  "/(auth)/open-shop/page": staff("owner", () => "/open-shop"),
  "/(auth)/reset-password/page": open("/reset-password?token=none"),
  "/(auth)/second-step/page": open("/second-step"),
  "/(auth)/sign-in/page": open("/sign-in"),
  "/(auth)/sign-up/page": open("/sign-up"),
  "/(customer)/my/page": staff("customer", () => "/my"),
  "/(customer)/my/account/page": staff("customer", () => "/my/account"),
  "/(customer)/my/instruments/[id]/page": staff(
    "customer",
    ({ ownInstrumentId }) => `/my/instruments/${ownInstrumentId}`,
  ),
  "/(shop)/page": { ...staff("technician", () => "/"), endsAt: "/today" },
  "/(shop)/(reading)/instruments/[id]/sheets/[sheetId]/page": staff(
    "technician",
    ({ instrumentId, sheetId }) => `/instruments/${instrumentId}/sheets/${sheetId}`,
  ),
  "/(shop)/customers/(list)/page": staff("office", () => "/customers"),
  "/(shop)/customers/[id]/edit/page": staff("office", ({ customerId }) => `/customers/${customerId}/edit`),
  "/(shop)/customers/[id]/page": staff("office", ({ customerId }) => `/customers/${customerId}`),
  "/(shop)/customers/new/page": staff("office", () => "/customers/new"),
  "/(shop)/due/page": staff("office", () => "/due"),
  "/(shop)/find/page": staff("technician", () => "/find?q=averil"),
  "/(shop)/instruments/(list)/page": staff("office", () => "/instruments"),
  "/(shop)/instruments/[id]/compare/page": staff(
    "technician",
    ({ instrumentId }) => `/instruments/${instrumentId}/compare`,
  ),
  "/(shop)/instruments/[id]/page": staff("technician", ({ instrumentId }) => `/instruments/${instrumentId}`),
  "/(shop)/instruments/[id]/record/page": staff(
    "office",
    ({ instrumentId }) => `/instruments/${instrumentId}/record`,
  ),
  "/(shop)/instruments/[id]/sheets/[sheetId]/edit/page": staff(
    "owner",
    ({ instrumentId, sheetId }) => `/instruments/${instrumentId}/sheets/${sheetId}/edit`,
  ),
  "/(shop)/instruments/[id]/sheets/new/page": staff(
    "technician",
    ({ instrumentId }) => `/instruments/${instrumentId}/sheets/new`,
  ),
  "/(shop)/instruments/[id]/sheets/page": staff(
    "technician",
    ({ instrumentId }) => `/instruments/${instrumentId}/sheets`,
  ),
  "/(shop)/instruments/[id]/stretch/page": staff(
    "technician",
    ({ instrumentId }) => `/instruments/${instrumentId}/stretch`,
  ),
  "/(shop)/instruments/[id]/visits/page": staff(
    "technician",
    ({ instrumentId }) => `/instruments/${instrumentId}/visits`,
  ),
  "/(shop)/instruments/new/page": staff("office", () => "/instruments/new"),
  "/(shop)/shop/account/page": staff("technician", () => "/shop/account"),
  "/(shop)/shop/page": staff("owner", () => "/shop"),
  "/(shop)/shop/styles/[id]/page": staff("owner", ({ styleId }) => `/shop/styles/${styleId}`),
  "/(shop)/shop/styles/new/page": staff("owner", () => "/shop/styles/new"),
  "/(shop)/shop/styles/page": staff("owner", () => "/shop/styles"),
  "/(shop)/shop/team/page": staff("owner", () => "/shop/team"),
  "/(shop)/sites/(list)/page": staff("office", () => "/sites"),
  "/(shop)/sites/[id]/edit/page": staff("office", ({ siteId }) => `/sites/${siteId}/edit`),
  "/(shop)/sites/[id]/page": staff("office", ({ siteId }) => `/sites/${siteId}`),
  "/(shop)/sites/new/page": staff("office", () => "/sites/new"),
  "/(shop)/today/page": staff("technician", () => "/today"),
  "/(shop)/visits/(list)/page": staff("office", () => "/visits"),
  "/(shop)/visits/[id]/change/page": staff("office", ({ visitId }) => `/visits/${visitId}/change`),
  "/(shop)/visits/[id]/page": staff("technician", ({ visitId }) => `/visits/${visitId}`),
  "/(shop)/visits/new/page": staff("office", () => "/visits/new"),
  "/mailbox/page": open("/mailbox"),
};

/** Not pages of their own: the framework shows them when another page cannot be. */
const shownInstead = ["/_not-found/page", "/_global-error/page"];

export function builtPages(): string[] {
  const manifest = path.join(import.meta.dirname, "..", "..", ".next", "server", "app-paths-manifest.json");
  return Object.keys(JSON.parse(readFileSync(manifest, "utf8")) as Record<string, string>)
    .filter((name) => name.endsWith("/page") && !shownInstead.includes(name))
    .sort();
}
