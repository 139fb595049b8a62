import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { personFrom } from "@/lib/auth/actor";
import { changePassword } from "@/lib/people/account/service";
import { requestPasswordReset, resetPassword, signIn } from "@/lib/people/sign-in/service";
import { beginTwoStep, confirmTwoStep, endTwoStep, newRecoveryCodes } from "@/lib/people/two-step/service";
import { linkToken, type Mailbox, startMailbox } from "../support/mailbox";
import { type Browser, goodPassword, newBrowser, newShop } from "../support/people";
import { fromBase32, totp } from "../support/totp";

let mailbox: Mailbox;
beforeAll(async () => {
  mailbox = await startMailbox();
});
afterAll(async () => {
  await mailbox.stop();
  await closeDatabases();
});

const now = () => Date.now() / 1000;

async function withTwoStep() {
  const shop = await newShop();
  const setup = await beginTwoStep(shop.owner, shop.browser.headers(), goodPassword);
  const secret = fromBase32(setup.secret);
  await confirmTwoStep(shop.owner, shop.browser.headers(), totp(secret, now()));
  return { ...shop, email: shop.person.email, secret, recoveryCodes: setup.recoveryCodes };
}

const signedInHere = async (browser: Browser) => Boolean(await personFrom(browser.headers()));

describe("the authenticator's code", () => {
  it("is RFC 6238's (appendix B, SHA-1, times 59 and 1111111109)", () => {
    const secret = Buffer.from("12345678901234567890");
    expect(totp(secret, 59, 8)).toBe("94287082");
    expect(totp(secret, 1_111_111_109, 8)).toBe("07081804");
  });
});

describe("turning two-step sign-in on", () => {
  it("changes nothing before a code has come back", async () => {
    const { owner, browser, person } = await newShop();
    await beginTwoStep(owner, browser.headers(), goodPassword);
    await expect(confirmTwoStep(owner, browser.headers(), "000000")).rejects.toMatchObject({
      more: { fields: { code: expect.any(String) } },
    });
    const later = newBrowser();
    await later.signIn(person.email);
    expect(await signedInHere(later)).toBe(true);
  });

  it("asks for the password", async () => {
    const { owner, browser } = await newShop();
    await expect(beginTwoStep(owner, browser.headers(), "not my password at all")).rejects.toMatchObject({
      more: { fields: { password: "This is not your password." } },
    });
  });

  it("hands over a secret that a QR code and the typed form agree on", async () => {
    const { owner, browser } = await newShop();
    const { secret, qr, recoveryCodes } = await beginTwoStep(owner, browser.headers(), goodPassword);
    expect(secret).toMatch(/^[A-Z2-7]{32,}$/);
    expect(qr.size).toBeGreaterThan(8 + 21);
    expect(qr.path.startsWith("M4 4h1v1h-1z")).toBe(true);
    expect(new Set(recoveryCodes).size).toBe(10);
  });
});

describe("signing in with two steps", () => {
  it("stops after the password, and goes on with the code", async () => {
    const { email, secret, shopId } = await withTwoStep();
    const browser = newBrowser();
    const answer = await browser.signIn(email);
    expect(answer.body).toMatchObject({ twoFactorRedirect: true });
    expect(answer.set.some((line) => /session_token=[^;]+;/.test(line) && !/max-age=0/i.test(line))).toBe(
      false,
    );
    expect(await signedInHere(browser)).toBe(false);
    expect(await signIn(new Headers(), { email, password: goodPassword, stay: true })).toEqual({
      secondStep: true,
    });

    const code = totp(secret, now() + 30);
    expect((await browser.post("/two-factor/verify-totp", { code })).status).toBe(200);
    expect((await browser.actor()).shopId).toBe(shopId);
  });

  it("does not open for a code without the password", async () => {
    const { secret } = await withTwoStep();
    const browser = newBrowser();
    const code = totp(secret, now());
    expect((await browser.post("/two-factor/verify-totp", { code })).status).toBe(401);
    expect(await signedInHere(browser)).toBe(false);
  });

  it("takes a code once", async () => {
    const { email, secret } = await withTwoStep();
    const code = totp(secret, now() + 30);
    const [first, second] = [newBrowser(), newBrowser()];
    await first.signIn(email);
    expect((await first.post("/two-factor/verify-totp", { code })).status).toBe(200);
    await second.signIn(email);
    const again = await second.post("/two-factor/verify-totp", { code });
    expect(again).toMatchObject({ status: 401, body: { code: "CODE_USED" } });
    expect(await signedInHere(second)).toBe(false);
  });

  it("does not let a device off the second step", async () => {
    const { email, secret } = await withTwoStep();
    const browser = newBrowser();
    await browser.signIn(email);
    const code = totp(secret, now() + 30);
    expect((await browser.post("/two-factor/verify-totp", { code, trustDevice: true })).status).toBe(400);
  });

  it("ends the attempt after five wrong codes", async () => {
    const { email, secret } = await withTwoStep();
    const browser = newBrowser();
    await browser.signIn(email);
    for (let tries = 0; tries < 5; tries++)
      await browser.post("/two-factor/verify-totp", { code: `00000${tries}` });
    await browser.post("/two-factor/verify-totp", { code: "000009" });
    const right = await browser.post("/two-factor/verify-totp", { code: totp(secret, now() + 30) });
    expect(right.status).toBe(401);
    expect(await signedInHere(browser)).toBe(false);
  });

  it("takes each recovery code once", async () => {
    const { email, recoveryCodes } = await withTwoStep();
    const [code] = recoveryCodes;
    const [first, second] = [newBrowser(), newBrowser()];
    await first.signIn(email);
    expect((await first.post("/two-factor/verify-backup-code", { code })).status).toBe(200);
    expect(await signedInHere(first)).toBe(true);
    await second.signIn(email);
    expect((await second.post("/two-factor/verify-backup-code", { code })).status).toBe(401);
    expect(await signedInHere(second)).toBe(false);
  });

  it("is still asked after the password was reset", async () => {
    const { email } = await withTwoStep();
    await requestPasswordReset(email);
    await resetPassword({ token: linkToken(await mailbox.next(email)), password: "reset to this phrase" });
    const browser = newBrowser();
    expect((await browser.signIn(email, "reset to this phrase")).body).toMatchObject({
      twoFactorRedirect: true,
    });
    expect(await signedInHere(browser)).toBe(false);
  });
});

describe("with the second step on", () => {
  async function inside() {
    const made = await withTwoStep();
    const browser = newBrowser();
    await browser.signIn(made.email);
    await browser.post("/two-factor/verify-totp", { code: totp(made.secret, now() + 30) });
    return { ...made, browser, owner: await browser.actor() };
  }

  it("a password of 8 characters will do, but then the step cannot be turned off", async () => {
    const { owner, browser, email, recoveryCodes } = await inside();
    await changePassword(owner, browser.headers(), {
      currentPassword: goodPassword,
      newPassword: "Kiln&9vq",
    });
    const again = newBrowser();
    await again.signIn(email, "Kiln&9vq");
    await again.post("/two-factor/verify-backup-code", { code: recoveryCodes[1] });
    const actor = await again.actor();
    await expect(endTwoStep(actor, again.headers(), "Kiln&9vq")).rejects.toMatchObject({
      message: expect.stringContaining("15"),
    });
    expect((await again.post("/two-factor/disable", { password: "Kiln&9vq" })).status).toBe(422);
    expect((await personFrom(again.headers()))?.secondStep).toBe(true);
  });

  it("turning it off takes the password, and the next sign-in is one step", async () => {
    const { owner, browser, email } = await inside();
    await expect(endTwoStep(owner, browser.headers(), "not my password at all")).rejects.toMatchObject({
      more: { fields: { password: "This is not your password." } },
    });
    await endTwoStep(owner, browser.headers(), goodPassword);
    const later = newBrowser();
    await later.signIn(email);
    expect(await signedInHere(later)).toBe(true);
  });

  it("new recovery codes replace the old ones", async () => {
    const { owner, browser, email, recoveryCodes } = await inside();
    const fresh = await newRecoveryCodes(owner, browser.headers(), goodPassword);
    expect(fresh.filter((code) => recoveryCodes.includes(code))).toEqual([]);
    const later = newBrowser();
    await later.signIn(email);
    expect((await later.post("/two-factor/verify-backup-code", { code: recoveryCodes[2] })).status).toBe(401);
    expect((await later.post("/two-factor/verify-backup-code", { code: fresh[0] })).status).toBe(200);
  });
});
