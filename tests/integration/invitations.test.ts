import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { createCustomer } from "@/lib/customers/service";
import { newToken } from "@/lib/ids";
import {
  acceptAsNewPerson,
  acceptInvitation,
  invitationBehind,
  invite,
  listInvitations,
  resendInvitation,
  revokeInvitation,
} from "@/lib/people/invitations/service";
import { linkToken, type Mailbox, startMailbox } from "../support/mailbox";
import { goodPassword, newAddress, newBrowser, newPerson, newShop, ownerSql } from "../support/people";

let mailbox: Mailbox;
const sql = ownerSql();
beforeAll(async () => {
  mailbox = await startMailbox();
});
afterAll(async () => {
  await mailbox.stop();
  await sql.end();
  await closeDatabases();
});

type Shop = Awaited<ReturnType<typeof newShop>>;

async function invited(shop: Shop, email = newAddress()) {
  const { id } = await invite(shop.owner, { email, role: "technician" });
  return { id, email, token: linkToken(await mailbox.next(email)) };
}

async function signedIn(email: string) {
  const browser = newBrowser();
  await browser.signIn(email);
  return browser;
}

describe("an invitation", () => {
  it("makes a new person a member with the invited role and address", async () => {
    const shop = await newShop("Wren & Sons");
    const { email, token } = await invited(shop);
    expect(await invitationBehind(token)).toMatchObject({
      shopName: "Wren & Sons",
      email,
      role: "technician",
      state: "open",
      addressKnown: false,
    });
    await acceptAsNewPerson(new Headers(), { token, name: "Tove Reed", password: goodPassword });
    const actor = await (await signedIn(email)).actor();
    expect(actor).toMatchObject({ shopId: shop.shopId, role: "technician", name: "Tove Reed" });
    expect(await listInvitations(shop.owner)).toEqual([]);
  });

  it("brings a person of another shop into this one too", async () => {
    const [here, elsewhere] = [await newShop(), await newShop()];
    const { token } = await invited(here, elsewhere.person.email);
    expect(await invitationBehind(token)).toMatchObject({ addressKnown: true });
    await expect(
      acceptAsNewPerson(new Headers(), { token, name: "Somebody", password: goodPassword }),
    ).rejects.toMatchObject({ code: "conflict" });
    await acceptInvitation(elsewhere.person, token);
    const browser = await signedIn(elsewhere.person.email);
    // The earliest membership is the one that opens, until another is chosen.
    expect((await browser.actor()).shopId).toBe(elsewhere.shopId);
  });

  it("is for its own address only", async () => {
    const shop = await newShop();
    const { token } = await invited(shop);
    const other = await newPerson();
    await expect(acceptInvitation(other, token)).rejects.toMatchObject({ code: "forbidden" });
    expect(await invitationBehind(token)).toMatchObject({ state: "open" });
  });

  it("works once", async () => {
    const shop = await newShop();
    const person = await newPerson();
    const { token } = await invited(shop, person.email);
    await acceptInvitation(person, token);
    await expect(acceptInvitation(person, token)).rejects.toMatchObject({
      code: "conflict",
      message: expect.stringContaining("has been used"),
    });
  });

  it("accepted twice at once makes one member", async () => {
    const shop = await newShop();
    const person = await newPerson();
    const { token } = await invited(shop, person.email);
    const results = await Promise.allSettled([1, 2, 3].map(() => acceptInvitation(person, token)));
    expect(results.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    const rows =
      await sql`select 1 from member where shop_id = ${shop.shopId} and person_id = ${person.personId}`;
    expect(rows).toHaveLength(1);
  });

  it("expires", async () => {
    const shop = await newShop();
    const person = await newPerson();
    const { id, token } = await invited(shop, person.email);
    await sql`update invitation set expires_at = now() - interval '1 second' where id = ${id}`;
    expect(await invitationBehind(token)).toMatchObject({ state: "expired" });
    await expect(acceptInvitation(person, token)).rejects.toMatchObject({ code: "conflict" });
    expect(await listInvitations(shop.owner)).toMatchObject([{ id, expired: true }]);
  });

  it("is taken back by revoking it", async () => {
    const shop = await newShop();
    const person = await newPerson();
    const { id, token } = await invited(shop, person.email);
    await revokeInvitation(shop.owner, id);
    await expect(acceptInvitation(person, token)).rejects.toMatchObject({ code: "conflict" });
    await expect(revokeInvitation(shop.owner, id)).rejects.toMatchObject({ code: "not-found" });
    // The address may be invited anew.
    await invite(shop.owner, { email: person.email, role: "office" });
  });

  it("sent again works by the newest link only", async () => {
    const shop = await newShop();
    const person = await newPerson();
    const { id, token } = await invited(shop, person.email);
    await resendInvitation(shop.owner, id);
    const newest = linkToken(await mailbox.next(person.email, 1));
    await expect(acceptInvitation(person, token)).rejects.toMatchObject({ code: "not-found" });
    await acceptInvitation(person, newest);
  });

  it("cannot be guessed: an unknown token opens nothing", async () => {
    const { token } = newToken();
    expect(await invitationBehind(token)).toBeNull();
    await expect(acceptInvitation(await newPerson(), token)).rejects.toMatchObject({ code: "not-found" });
    expect(Buffer.from(token, "base64url")).toHaveLength(32);
  });

  it("keeps only a hash of its token in the database", async () => {
    const shop = await newShop();
    const { id, token } = await invited(shop);
    const [row] = await sql`select token_hash, invitation::text as whole from invitation where id = ${id}`;
    expect(row?.token_hash).toHaveLength(64);
    expect(row?.whole).not.toContain(token);
  });

  it("does not make a second member of somebody who belongs to the shop", async () => {
    const shop = await newShop();
    const person = await newPerson();
    await acceptInvitation(person, (await invited(shop, person.email)).token);
    await expect(invite(shop.owner, { email: person.email, role: "office" })).rejects.toMatchObject({
      more: { fields: { email: expect.any(String) } },
    });
  });

  it("stands once per address", async () => {
    const shop = await newShop();
    const { email } = await invited(shop);
    await expect(invite(shop.owner, { email, role: "office" })).rejects.toMatchObject({
      more: { fields: { email: expect.stringContaining("invited already") } },
    });
  });
});

describe("inviting", () => {
  it("is the owner's alone", async () => {
    const shop = await newShop();
    const person = await newPerson();
    await acceptInvitation(person, (await invited(shop, person.email)).token);
    const technician = await (await signedIn(person.email)).actor();
    await expect(invite(technician, { email: newAddress(), role: "owner" })).rejects.toMatchObject({
      code: "forbidden",
    });
    await expect(listInvitations(technician)).rejects.toMatchObject({ code: "forbidden" });
  });

  it("does not reach another shop's invitations", async () => {
    const [here, elsewhere] = [await newShop(), await newShop()];
    const { id } = await invited(elsewhere);
    await expect(revokeInvitation(here.owner, id)).rejects.toMatchObject({ code: "not-found" });
    await expect(resendInvitation(here.owner, id)).rejects.toMatchObject({ code: "not-found" });
    expect(await listInvitations(here.owner)).toEqual([]);
  });

  it("ties a customer's sign-in to a customer of this shop", async () => {
    const [here, elsewhere] = [await newShop(), await newShop()];
    const mine = await createCustomer(here.owner, { kind: "person", name: "M. Sandmark" });
    const theirs = await createCustomer(elsewhere.owner, { kind: "person", name: "O. Quill" });
    const email = newAddress();
    await expect(
      invite(here.owner, { email, role: "customer", customerId: theirs.id }),
    ).rejects.toMatchObject({ more: { fields: { customerId: expect.any(String) } } });
    await invite(here.owner, { email, role: "customer", customerId: mine.id });
    const token = linkToken(await mailbox.next(email));
    await acceptAsNewPerson(new Headers(), { token, name: "Mai Sandmark", password: goodPassword });
    expect(await (await signedIn(email)).actor()).toMatchObject({ role: "customer", customerId: mine.id });
  });

  it("puts a shop's name into the subject without letting it begin a header", async () => {
    const shop = await newShop("Larch\r\nBcc: everybody@example.org");
    const email = newAddress();
    await invite(
      { ...shop.owner, shopName: "Larch\r\nBcc: everybody@example.org" },
      { email, role: "office" },
    );
    const mail = await mailbox.next(email);
    expect(mail.subject).toContain("Larch Bcc: everybody@example.org");
    expect(mailbox.to("everybody@example.org")).toEqual([]);
  });

  it("leaves no invitation behind when the mail cannot be sent", async () => {
    const shop = await newShop();
    await expect(
      invite(shop.owner, { email: "a@example.org,b@example.org", role: "office" }),
    ).rejects.toMatchObject({ code: "invalid" });
    expect(await listInvitations(shop.owner)).toEqual([]);
  });
});
