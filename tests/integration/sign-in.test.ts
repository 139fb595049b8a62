import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { personFrom } from "@/lib/auth/actor";
import { newId } from "@/lib/ids";
import { openShop } from "@/lib/people/opening/service";
import { requestPasswordReset, resetPassword, signIn, signUpWithShop } from "@/lib/people/sign-in/service";
import { linkToken, type Mailbox, startMailbox } from "../support/mailbox";
import { goodPassword, newAddress, newBrowser, newPerson, newShop } from "../support/people";

let mailbox: Mailbox;
beforeAll(async () => {
  mailbox = await startMailbox();
});
afterAll(async () => {
  await mailbox.stop();
  await closeDatabases();
});

const shopOf = (shopId = newId()) => ({
  shopId,
  shopName: "Harbour Street Pianos",
  country: "GB",
  timeZone: "Europe/London",
  locale: "en-GB",
});

describe("signing up", () => {
  it("makes a person who owns a shop, with the country's currency", async () => {
    const email = newAddress();
    const { shopOpened } = await signUpWithShop(new Headers(), {
      ...shopOf(),
      name: "Ida Farrow",
      email,
      password: goodPassword,
    });
    expect(shopOpened).toBe(true);
    const browser = newBrowser();
    await browser.signIn(email);
    const actor = await browser.actor();
    expect(actor).toMatchObject({ role: "owner", name: "Ida Farrow", shopName: "Harbour Street Pianos" });
  });

  it("leaves a person without a shop signed in to none, until one is opened", async () => {
    const person = await newPerson();
    const browser = newBrowser();
    await browser.signIn(person.email);
    expect((await personFrom(browser.headers()))?.actor).toBeNull();
    await openShop(person, shopOf());
    expect((await personFrom(browser.headers()))?.actor?.role).toBe("owner");
  });

  it("opens one shop when the form is sent twice at once", async () => {
    const person = await newPerson();
    const form = shopOf();
    const [first, second] = await Promise.all([openShop(person, form), openShop(person, form)]);
    expect(first).toEqual(second);
    const browser = newBrowser();
    await browser.signIn(person.email);
    expect((await personFrom(browser.headers()))?.memberships).toHaveLength(1);
  });

  it("does not make an owner of whoever names another's shop", async () => {
    const { shopId } = await newShop();
    const stranger = await newPerson();
    await expect(openShop(stranger, shopOf(shopId))).rejects.toMatchObject({ code: "id-in-use" });
    const browser = newBrowser();
    await browser.signIn(stranger.email);
    expect((await personFrom(browser.headers()))?.memberships).toEqual([]);
  });

  it("refuses an address that signs in already, at its field", async () => {
    const { email } = await newPerson();
    await expect(newPerson(email.toUpperCase())).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { email: expect.stringContaining("already") } },
    });
  });

  it("keeps a name to one line, so that it cannot begin a line of its own in a mail", async () => {
    const browser = newBrowser();
    const email = newAddress();
    const answer = await browser.post("/sign-up/email", {
      name: "Ida\r\nBcc: all@example.org",
      email,
      password: goodPassword,
      image: "https://example.org/track.png",
    });
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ user: { name: "Ida Bcc: all@example.org", image: null } });
  });
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
    const tries = async () => (await browser.signIn("nobody", "x")).status;
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

  it("stops mailing after five requests in an hour", async () => {
    const { email } = await newPerson();
    for (let tries = 0; tries < 7; tries++) await requestPasswordReset(email);
    await mailbox.next(email, 4);
    expect(mailbox.to(email)).toHaveLength(5);
  });
});
