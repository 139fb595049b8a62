import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { personFrom } from "@/lib/auth/actor";
import { changePassword, endOtherSessions, endSession, listSessions } from "@/lib/people/account/service";
import { goodPassword, newAddress, newBrowser, newPerson, newShop, ownerSql } from "../support/people";

const sql = ownerSql();
afterAll(async () => {
  await sql.end();
  await closeDatabases();
});

const signedIn = async (browser: ReturnType<typeof newBrowser>) =>
  Boolean(await personFrom(browser.headers()));

describe("a password", () => {
  it("that is too short or too plain is refused over HTTP as in the form, with the reason", async () => {
    for (const password of ["fourteen chars", "passwordpassword1", "aaaaaaaaaaaaaaaaaa"]) {
      const answer = await newBrowser().post("/sign-up/email", {
        name: "Ida",
        email: newAddress(),
        password,
      });
      expect(answer, password).toMatchObject({ status: 422, body: { code: "WEAK_PASSWORD" } });
    }
  });

  it("made of the person's own name or address is refused", async () => {
    const refusal = { more: { fields: { password: expect.stringContaining("your name") } } };
    await expect(
      newPerson("x@example.org", "Wilhelmina Oakenfold", "Wilhelmina Oakenfold1"),
    ).rejects.toMatchObject(refusal);
    await expect(
      newPerson("wilhelminaoakenfold@example.org", "W. O.", "wilhelminaoakenfold22"),
    ).rejects.toMatchObject(refusal);
  });

  it("typed on another keyboard is the same password", async () => {
    // é as one code point and as two, ﬁ as a ligature and as letters: alike after NFKC.
    const { email } = await newPerson(newAddress(), "Ida Farrow", "caf\u00e9 \ufb01ne and a long walk");
    expect((await newBrowser().signIn(email, "cafe\u0301 fine and a long walk")).status).toBe(200);
  });

  it("may have 256 characters and spaces at both ends", async () => {
    const long = ` ${"larch wren ".repeat(23)}`.slice(0, 255).concat(" ");
    const { email } = await newPerson(newAddress(), "Ida Farrow", long);
    expect((await newBrowser().signIn(email, long)).status).toBe(200);
    expect((await newBrowser().signIn(email, long.trim())).status).toBe(401);
  });

  it("is stored as a hash with a salt of its own", async () => {
    const [one, two] = [await newPerson(), await newPerson()];
    const rows =
      await sql`select password from auth.account where person_id in (${one.personId}, ${two.personId})`;
    expect(rows[0]?.password).not.toContain(goodPassword);
    expect(rows[0]?.password).not.toBe(rows[1]?.password);
  });

  it("changes with the present one only, and ends every other session", async () => {
    const { person, browser, owner } = await newShop();
    const other = newBrowser();
    await other.signIn(person.email);
    const newPassword = "an entirely new phrase";
    await expect(
      changePassword(owner, browser.headers(), { currentPassword: "not the present one", newPassword }),
    ).rejects.toMatchObject({ more: { fields: { currentPassword: "This is not your password." } } });
    await expect(
      changePassword(owner, browser.headers(), { currentPassword: goodPassword, newPassword: "too short" }),
    ).rejects.toMatchObject({ more: { fields: { newPassword: expect.stringContaining("15") } } });
    expect(await signedIn(other)).toBe(true);

    await changePassword(owner, browser.headers(), { currentPassword: goodPassword, newPassword });
    expect(await signedIn(other)).toBe(false);
    expect((await newBrowser().signIn(person.email)).status).toBe(401);
    const again = newBrowser();
    await again.signIn(person.email, newPassword);
    expect(await signedIn(again)).toBe(true);
  });
});

describe("sessions", () => {
  it("are listed without their tokens and ended one by one or all but this one", async () => {
    const { person, browser, owner } = await newShop();
    const [second, third] = [newBrowser(), newBrowser()];
    await second.signIn(person.email);
    await third.signIn(person.email);
    const sessions = await listSessions(owner, browser.headers());
    // The one that signing up began, and three since.
    expect(sessions).toHaveLength(4);
    expect(sessions[0]).toMatchObject({ current: true, id: owner.sessionId });
    expect(Object.keys(sessions[0] ?? {})).not.toContain("token");

    const secondId = (await second.actor()).sessionId;
    await endSession(owner, browser.headers(), secondId);
    expect(await signedIn(second)).toBe(false);
    expect(await signedIn(third)).toBe(true);
    await endOtherSessions(owner, browser.headers());
    expect(await signedIn(third)).toBe(false);
    expect(await signedIn(browser)).toBe(true);
  });

  it("of somebody else cannot be ended", async () => {
    const [one, two] = [await newShop(), await newShop()];
    await expect(endSession(one.owner, one.browser.headers(), two.owner.sessionId)).rejects.toMatchObject({
      code: "not-found",
    });
    expect(await signedIn(two.browser)).toBe(true);
  });

  it("without 'stay signed in' ends with the browser, and in a day at the latest", async () => {
    const { email, personId } = await newPerson();
    const answer = await newBrowser().post("/sign-in/email", {
      email,
      password: goodPassword,
      rememberMe: false,
    });
    const cookie = answer.set.find((line) => line.startsWith("agraffe.session_token="));
    expect(cookie).not.toMatch(/max-age|expires/i);
    const [row] = await sql`select expires_at - now() < interval '25 hours' as soon from auth.session
      where person_id = ${personId} order by created_at desc limit 1`;
    expect(row?.soon).toBe(true);
  });
});
