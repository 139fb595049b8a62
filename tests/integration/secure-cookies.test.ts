import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { signUpCookie } from "@/lib/people/sign-up/kept-sign-up";
import { newAddress, newBrowser, newPerson } from "../support/people";

// Read once, on first use: this file is a server of its own, reached by https and without a mail server.
const { APP_URL, SMTP_URL } = process.env;
process.env.APP_URL = "https://book.example";
delete process.env.SMTP_URL;

afterAll(async () => {
  delete process.env.APP_URL;
  Object.assign(process.env, APP_URL ? { APP_URL } : {}, SMTP_URL ? { SMTP_URL } : {});
  await closeDatabases();
});

describe("a server that is reached by https", () => {
  it("sets no cookie that would travel without it, or that a page without it could have set", async () => {
    const { email } = await newPerson();
    const { status, set } = await newBrowser().signIn(email);
    expect(status).toBe(200);
    expect(set.some((line) => line.startsWith("__Secure-agraffe.session_token="))).toBe(true);
    expect(set.some((line) => line.startsWith("__Secure-agraffe.device."))).toBe(true);
    for (const line of set) {
      expect(line).toMatch(/^__Secure-/);
      expect(line).toMatch(/; Secure/i);
    }
    expect(await signUpCookie()).toMatchObject({
      name: "__Secure-agraffe.sign_up",
      options: { secure: true, httpOnly: true, sameSite: "lax" },
    });
  });
});

describe("a server without a mail server", () => {
  it("signs up nobody whose address it cannot confirm, and says so", async () => {
    const email = newAddress();
    const answer = await newBrowser().post("/sign-up/email", {
      name: "Ida Farrow",
      email,
      password: "seven larches lean west",
    });
    expect(answer).toMatchObject({ status: 503, body: { code: "NO_MAIL" } });
    expect((await newBrowser().signIn(email)).body).toMatchObject({ code: "INVALID_EMAIL_OR_PASSWORD" });
  });
});
