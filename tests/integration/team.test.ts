import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { personFrom } from "@/lib/auth/actor";
import { changeName, switchShop } from "@/lib/people/account/service";
import { acceptInvitation, invite } from "@/lib/people/invitations/service";
import { changeMember, endMembership, listTeam } from "@/lib/people/service";
import { changeShop, getShop } from "@/lib/shop/service";
import { linkToken, type Mailbox, startMailbox } from "../support/mailbox";
import { newBrowser, newPerson, newShop, ownerSql } from "../support/people";

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

/** A second member, signed in. */
async function joined(shop: Shop, role: "owner" | "office" | "technician") {
  const person = await newPerson();
  await invite(shop.owner, { email: person.email, role });
  await acceptInvitation(person, linkToken(await mailbox.next(person.email)));
  const browser = newBrowser();
  await browser.signIn(person.email);
  const actor = await browser.actor();
  const member = (await listTeam(shop.owner)).find(({ id }) => id === actor.memberId);
  if (!member) throw new Error("The new member is not in the list");
  return { person, browser, actor, member };
}

async function ownRecord(shop: Shop) {
  const own = (await listTeam(shop.owner)).find(({ id }) => id === shop.owner.memberId);
  if (!own) throw new Error("The owner is not in the list");
  return own;
}

describe("the last owner", () => {
  it("cannot leave nor take another role, and is told why", async () => {
    const shop = await newShop();
    await joined(shop, "technician");
    const { id, version } = await ownRecord(shop);
    const refusal = { code: "last-owner", message: expect.stringContaining("last owner") };
    await expect(endMembership(shop.owner, { id, version })).rejects.toMatchObject(refusal);
    await expect(changeMember(shop.owner, { id, version, role: "office" })).rejects.toMatchObject(refusal);
    expect(await ownRecord(shop)).toMatchObject({ role: "owner", version });
  });

  it("is kept by the database at commit, whoever writes", async () => {
    const shop = await newShop();
    await expect(
      sql`update member set ended_at = now() where shop_id = ${shop.shopId} and role = 'owner'`,
    ).rejects.toMatchObject({ constraint_name: "shop_keeps_an_owner" });
  });

  it("stays when two owners step down at once", async () => {
    const shop = await newShop();
    const second = await joined(shop, "owner");
    const first = await ownRecord(shop);
    const results = await Promise.allSettled([
      changeMember(shop.owner, { id: first.id, version: first.version, role: "technician" }),
      changeMember(second.actor, {
        id: second.member.id,
        version: second.member.version,
        role: "technician",
      }),
    ]);
    expect(results.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    expect(results.find(({ status }) => status === "rejected")).toMatchObject({
      reason: { code: "last-owner" },
    });
  });

  it("may hand over to another owner", async () => {
    const shop = await newShop();
    const second = await joined(shop, "owner");
    const first = await ownRecord(shop);
    await changeMember(second.actor, { id: first.id, version: first.version, role: "office" });
    expect((await shop.browser.actor()).role).toBe("office");
  });
});

describe("a membership", () => {
  it("that ends shuts the shop to its sessions at once, and only this shop", async () => {
    const [shop, other] = [await newShop(), await newShop()];
    const person = other.person;
    await invite(shop.owner, { email: person.email, role: "technician" });
    await acceptInvitation(person, linkToken(await mailbox.next(person.email)));
    await switchShop(other.owner, shop.shopId);
    expect((await other.browser.actor()).shopId).toBe(shop.shopId);

    const member = (await listTeam(shop.owner)).find(({ email }) => email === person.email);
    await endMembership(shop.owner, { id: member?.id ?? "", version: member?.version ?? 0 });
    const after = await personFrom(other.browser.headers());
    expect(after?.memberships.map(({ shopId }) => shopId)).toEqual([other.shopId]);
    expect(after?.actor?.shopId).toBe(other.shopId);
  });

  it("can begin anew after it ended", async () => {
    const shop = await newShop();
    const { person, member } = await joined(shop, "office");
    await endMembership(shop.owner, { id: member.id, version: member.version });
    await invite(shop.owner, { email: person.email, role: "technician" });
    await acceptInvitation(person, linkToken(await mailbox.next(person.email, 1)));
    const browser = newBrowser();
    await browser.signIn(person.email);
    expect(await browser.actor()).toMatchObject({ role: "technician" });
  });

  it("of another shop does not exist for this one's owner", async () => {
    const [here, elsewhere] = [await newShop(), await newShop()];
    const { member } = await joined(elsewhere, "technician");
    const { id, version } = member;
    await expect(changeMember(here.owner, { id, version, role: "owner" })).rejects.toMatchObject({
      code: "not-found",
    });
    await expect(endMembership(here.owner, { id, version })).rejects.toMatchObject({ code: "not-found" });
    expect(await listTeam(here.owner)).toHaveLength(1);
  });

  it("is changed by owners only, and addresses are theirs to see", async () => {
    const shop = await newShop();
    const office = await joined(shop, "office");
    const technician = await joined(shop, "technician");
    for (const { actor, member } of [office, technician]) {
      await expect(
        changeMember(actor, { id: member.id, version: member.version, role: "owner" }),
      ).rejects.toMatchObject({ code: "forbidden" });
      expect((await listTeam(actor)).every(({ email }) => email === null)).toBe(true);
    }
  });

  it("answers a stale change with the record as it is now", async () => {
    const shop = await newShop();
    const { member } = await joined(shop, "technician");
    const { id, version } = member;
    await changeMember(shop.owner, { id, version, bookable: false });
    await expect(changeMember(shop.owner, { id, version, role: "office" })).rejects.toMatchObject({
      code: "stale",
      more: { current: { bookable: false, role: "technician", version: version + 1 } },
    });
  });
});

describe("a person in two shops", () => {
  it("changes between them, and cannot change to a third", async () => {
    const [here, elsewhere, third] = [await newShop(), await newShop(), await newShop()];
    await invite(here.owner, { email: elsewhere.person.email, role: "technician" });
    await acceptInvitation(elsewhere.person, linkToken(await mailbox.next(elsewhere.person.email)));
    await switchShop(elsewhere.owner, here.shopId);
    expect(await elsewhere.browser.actor()).toMatchObject({ shopId: here.shopId, role: "technician" });
    await expect(switchShop(elsewhere.owner, third.shopId)).rejects.toMatchObject({ code: "not-found" });
  });

  it("has one name in both", async () => {
    const [here, elsewhere] = [await newShop(), await newShop()];
    await invite(here.owner, { email: elsewhere.person.email, role: "technician" });
    await acceptInvitation(elsewhere.person, linkToken(await mailbox.next(elsewhere.person.email)));
    await changeName(elsewhere.owner, elsewhere.browser.headers(), "Ida Farrow-Reed");
    for (const owner of [here.owner, elsewhere.owner])
      expect((await listTeam(owner)).map(({ name }) => name)).toContain("Ida Farrow-Reed");
  });
});

describe("the shop's facts", () => {
  it("are read by all and changed by owners", async () => {
    const shop = await newShop();
    const technician = await joined(shop, "technician");
    const { version } = await getShop(technician.actor);
    await expect(changeShop(technician.actor, { version, name: "Mine now" })).rejects.toMatchObject({
      code: "forbidden",
    });
    const changed = await changeShop(shop.owner, { version, referenceHz: 442, currency: "EUR" });
    expect(changed).toMatchObject({ referenceHz: 442, version: version + 1 });
    await expect(changeShop(shop.owner, { version, name: "Too late" })).rejects.toMatchObject({
      code: "stale",
    });
  });

  it("take no style that is not there", async () => {
    const [shop, other] = [await newShop(), await newShop()];
    const { version } = await getShop(shop.owner);
    await expect(changeShop(shop.owner, { version, defaultStyle: other.shopId })).rejects.toMatchObject({
      more: { fields: { defaultStyle: expect.any(String) } },
    });
  });
});
