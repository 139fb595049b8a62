import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { personFrom } from "@/lib/auth/actor";
import { requestPasswordReset, resetLinkWorks, resetPassword, signIn } from "@/lib/people/sign-in/service";
import { linkToken, type Mailbox, startMailbox } from "../support/mailbox";
import { newAddress, newBrowser, newPerson, ownerSql } from "../support/people";

const sql = ownerSql();
let mailbox: Mailbox;
beforeAll(async () => {
  mailbox = await startMailbox();
});
afterAll(async () => {
  await mailbox.stop();
  await sql.end();
  await closeDatabases();
});

describe("signing in", () => {
  it("says the same for an unknown address and for a wrong password, over HTTP and in the form", async () => {
    const { email } = await newPerson();
    const wrong = await newBrowser().signIn(email, "another password of length");
    const unknown = await newBrowser().signIn(newAddress(), "another password of length");
    expect(wrong.status).toBe(401);
    expect(unknown).toEqual(wrong);

    const words = async (address: string) =>
      signIn(new Headers(), { email: address, password: "another password of length", stay: true }).then(
        () => "signed in",
        (error: Error) => error.message,
      );
    expect(await words(email)).toBe(await words(newAddress()));
  });

  it("takes about as long for an unknown address as for a wrong password", async () => {
    const { email } = await newPerson();
    const times = async (address: () => string) => {
      const taken: number[] = [];
      for (let round = 0; round < 5; round++) {
        const begun = performance.now();
        await newBrowser().signIn(address(), "another password of length");
        taken.push(performance.now() - begun);
      }
      return taken.sort((a, b) => a - b)[2] ?? 0;
    };
    const known = await times(() => email);
    const unknown = await times(newAddress);
    // Hashing takes tens of milliseconds; leaving it out would make the ratio several times smaller.
    expect(unknown / known).toBeGreaterThan(0.5);
    expect(unknown / known).toBeLessThan(2);
  });

  it("sets a cookie that scripts cannot read and other sites cannot send along with a write", async () => {
    const { email } = await newPerson();
    const { set } = await newBrowser().signIn(email);
    const cookie = set.find((line) => line.startsWith("agraffe.session_token="));
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
  });

  it("refuses a write from another site's page", async () => {
    const { email } = await newPerson();
    const browser = newBrowser({ origin: "https://elsewhere.example" });
    expect((await browser.signIn(email)).status).toBe(403);
    expect(browser.cookies.size).toBe(0);
  });

  it("answers 429 to one address that keeps trying", async () => {
    const browser = newBrowser();
    // Not an address at all, so no time goes into hashing.
    const nobody = newAddress().replace("@", "");
    const tries = async () => (await browser.signIn(nobody, "x")).status;
    for (let count = 0; count < 20; count++) expect(await tries()).toBe(400);
    expect(await tries()).toBe(429);
  });

  it("stops guesses at one account from many addresses, until a sign-in succeeds", async () => {
    const { email } = await newPerson();
    const guesses = async (count: number) => {
      const statuses: number[] = [];
      for (let tries = 0; tries < count; tries++)
        statuses.push((await newBrowser().signIn(email, "x")).status);
      return statuses;
    };
    expect(await guesses(12)).not.toContain(429);
    expect((await newBrowser().signIn(email)).status).toBe(200);
    expect(await guesses(20)).not.toContain(429);
    expect(await guesses(1)).toEqual([429]);
    expect((await newBrowser().signIn(email)).status).toBe(429);
  });

  it("stays open to a browser that signed in before while strangers have used up the common tries", async () => {
    const [owner, stranger] = [await newPerson(), await newPerson()];
    const browser = newBrowser();
    await browser.signIn(owner.email);
    for (let tries = 0; tries < 21; tries++) await newBrowser().signIn(owner.email, "x");
    expect((await newBrowser().signIn(owner.email)).status).toBe(429);
    expect((await browser.signIn(owner.email)).status).toBe(200);
    // Its success ends its own count only: strangers get no new tries by it.
    expect((await newBrowser().signIn(owner.email, "x")).status).toBe(429);

    const device = [...browser.cookies].find(([name]) => name.startsWith("agraffe.device."));
    if (!device) throw new Error("This browser carries no device cookie");
    const forged = newBrowser();
    await forged.signIn(stranger.email);
    const own = [...forged.cookies].find(([name]) => name.startsWith("agraffe.device."));
    // A cookie of another account under this one's name, and this one's with a letter of its value changed.
    forged.cookies.set(device[0], own?.[1] ?? "");
    expect((await forged.signIn(owner.email)).status).toBe(429);
    forged.cookies.set(
      device[0],
      device[1].replace(/^./, (letter) => (letter === "0" ? "1" : "0")),
    );
    expect((await forged.signIn(owner.email)).status).toBe(429);
    forged.cookies.set(...device);
    expect((await forged.signIn(owner.email)).status).toBe(200);
  });

  it("counts the wrong passwords of a browser that signed in before as well", async () => {
    const { email } = await newPerson();
    const browser = newBrowser();
    await browser.signIn(email);
    const known = () => {
      const same = newBrowser();
      for (const cookie of browser.cookies) same.cookies.set(...cookie);
      return same;
    };
    for (let tries = 0; tries < 20; tries++) expect((await known().signIn(email, "x")).status).toBe(401);
    expect((await known().signIn(email)).status).toBe(429);
    expect((await newBrowser().signIn(email)).status).toBe(200);
  });

  it("keeps the device cookie from scripts", async () => {
    const { email } = await newPerson();
    const { set } = await newBrowser().signIn(email);
    const cookie = set.find((line) => line.startsWith("agraffe.device."));
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).not.toContain(email);
  });

  it("leaves closed what the product does not use", async () => {
    const { email } = await newPerson();
    const browser = newBrowser();
    await browser.signIn(email);
    for (const path of ["/update-user", "/change-email", "/delete-user", "/two-factor/send-otp"])
      expect((await browser.post(path, { name: "x" })).status, path).toBe(404);
  });

  it("sends no mail", async () => {
    const { email } = await newPerson();
    await newBrowser().signIn(email);
    expect(mailbox.to(email)).toEqual([]);
  });
});

describe("a forgotten password", () => {
  it("is set anew by the mailed link, once, and ends every session", async () => {
    const { email } = await newPerson();
    const browser = newBrowser();
    await browser.signIn(email);
    await requestPasswordReset(email);
    const token = linkToken(await mailbox.next(email));

    await resetPassword({ token, password: "a wholly different phrase" });
    expect(await personFrom(browser.headers())).toBeNull();
    expect((await browser.signIn(email)).status).toBe(401);
    expect((await browser.signIn(email, "a wholly different phrase")).status).toBe(200);
    await expect(resetPassword({ token, password: "and yet another phrase" })).rejects.toMatchObject({
      code: "invalid",
      message: expect.stringContaining("has been used"),
    });
  });

  it("works for one of two who press at once", async () => {
    const { email } = await newPerson();
    await requestPasswordReset(email);
    const token = linkToken(await mailbox.next(email));
    const results = await Promise.allSettled([
      resetPassword({ token, password: "the first of two phrases" }),
      resetPassword({ token, password: "the second of two phrases" }),
    ]);
    expect(results.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
  });

  it("keeps the link when the new password is refused", async () => {
    const { email } = await newPerson();
    await requestPasswordReset(email);
    const token = linkToken(await mailbox.next(email));
    await expect(resetPassword({ token, password: "short" })).rejects.toMatchObject({
      more: { fields: { password: expect.stringContaining("15") } },
    });
    await resetPassword({ token, password: "long enough this time" });
  });

  it("answers the same for an address nobody has, and sends nothing there", async () => {
    const unknown = newAddress();
    const { email } = await newPerson();
    expect(await requestPasswordReset(unknown)).toEqual(await requestPasswordReset(email));
    const browser = newBrowser();
    const known = await browser.post("/request-password-reset", { email });
    expect(await browser.post("/request-password-reset", { email: unknown })).toEqual(known);
    await mailbox.next(email);
    expect(mailbox.to(unknown)).toEqual([]);
  });

  it("stops mailing after five requests in an hour, by the form and over HTTP from any address", async () => {
    const { email } = await newPerson();
    const answers = new Set<string>();
    for (let tries = 0; tries < 4; tries++) {
      await requestPasswordReset(email);
      const { status, body } = await newBrowser().post("/request-password-reset", { email });
      answers.add(JSON.stringify({ status, body }));
    }
    expect(answers.size).toBe(1);
    await mailbox.next(email, 4);
    await new Promise((resolve) => setTimeout(resolve, 300));
    expect(mailbox.to(email)).toHaveLength(5);
  });

  it("has a link that says so once it is used, expired or never was", async () => {
    const { email } = await newPerson();
    await requestPasswordReset(email);
    const token = linkToken(await mailbox.next(email));
    expect(await resetLinkWorks(token)).toBe(true);
    expect(await resetLinkWorks("never-was")).toBe(false);
    await resetPassword({ token, password: "a wholly different phrase" });
    expect(await resetLinkWorks(token)).toBe(false);

    await requestPasswordReset(email);
    const late = linkToken(await mailbox.next(email, 1));
    await sql`update auth.verification set expires_at = now() - interval '1 second'
      where identifier = ${`reset-password:${late}`}`;
    expect(await resetLinkWorks(late)).toBe(false);
  });
});
