import { randomUUID } from "node:crypto";
import path from "node:path";
import { type APIRequestContext, expect } from "@playwright/test";

/** The people of the demo, by what they may do. */
export const demoPeople = {
  owner: "owner@larchandwren.example",
  office: "office@larchandwren.example",
  technician: "tech@larchandwren.example",
  customer: "customer@example.org",
  stranger: "owner@harbourstreet.example",
} as const;

export type DemoPerson = keyof typeof demoPeople;

export const demoPassword = "port-averil-demo-2026";

/** Cookies of each, kept from one signing in for all the tests. */
export function signedInAs(person: DemoPerson): string {
  return path.join(import.meta.dirname, "..", "..", ".local", "browser-sign-ins", `${person}.json`);
}

export async function signInByRequest(request: APIRequestContext, email: string, password: string) {
  const answer = await request.post("/api/auth/sign-in/email", {
    data: { email, password },
    headers: { origin: ownOrigin() },
  });
  expect(answer.status(), `signing in as ${email}`).toBe(200);
}

export function newPerson(name: string) {
  return {
    name,
    email: `${name.toLowerCase().replace(/\W+/g, ".")}.${randomUUID().slice(0, 8)}@example.org`,
    password: "seven larches lean to the west",
  };
}

export function ownOrigin(): string {
  const { BASE_URL } = process.env;
  if (!BASE_URL) throw new Error("BASE_URL is not set");
  return new URL(BASE_URL).origin;
}
