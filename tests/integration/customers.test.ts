import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { customerChange, customerListQuery, newCustomer } from "@/lib/customers/schema";
import {
  archiveCustomer,
  changeCustomer,
  createCustomer,
  findCustomers,
  getCustomer,
} from "@/lib/customers/service";
import { parseInput } from "@/lib/doors/fields";
import { newId } from "@/lib/ids";
import { closeFactories, makeCustomer, makeShop } from "../support/factories";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

const asked = (query: Record<string, unknown> = {}) => parseInput(customerListQuery, query);
const given = (fields: Record<string, unknown>) => parseInput(newCustomer, fields);
const changed = (fields: Record<string, unknown>) => parseInput(customerChange, fields);

describe("customers", () => {
  it("makes one record of the same id sent twice", async () => {
    const shop = await makeShop();
    const id = newId();
    const first = await createCustomer(shop.office, given({ id, name: "Averil Conservatory" }));
    const second = await createCustomer(shop.office, given({ id, name: "Averil Conservatory" }));
    expect(second).toEqual(first);
    expect((await findCustomers(shop.office, asked())).items).toHaveLength(1);
  });

  it("answers a stale version with the record as it is now", async () => {
    const shop = await makeShop();
    const made = await createCustomer(shop.office, given({ name: "Moravec" }));
    await changeCustomer(shop.office, made.id, changed({ version: 1, phone: "+353 1 555 0100" }));
    await expect(
      changeCustomer(shop.office, made.id, changed({ version: 1, name: "Moravec and Daughter" })),
    ).rejects.toMatchObject({
      code: "stale",
      more: { current: { id: made.id, name: "Moravec", phone: "+353 1 555 0100", version: 2 } },
    });
  });

  it("leaves what a change does not mention as it was", async () => {
    const shop = await makeShop();
    const made = await createCustomer(
      shop.office,
      given({
        kind: "organisation",
        name: "Harbour Hall",
        email: "hall@example.org",
        notes: "Ask for the stage door.",
      }),
    );
    const after = await changeCustomer(
      shop.office,
      made.id,
      changed({ version: 1, name: "The Harbour Hall" }),
    );
    expect(after).toMatchObject({
      kind: "organisation",
      name: "The Harbour Hall",
      email: "hall@example.org",
      notes: "Ask for the stage door.",
    });
    const cleared = await changeCustomer(shop.office, made.id, changed({ version: 2, email: "" }));
    expect(cleared.email).toBeNull();
  });

  it("takes an archived record out of the list and puts it back", async () => {
    const shop = await makeShop();
    const made = await createCustomer(shop.office, given({ name: "Sandmark" }));
    const archived = await archiveCustomer(shop.office, made.id, { version: made.version });
    expect(archived.archivedAt).not.toBeNull();
    expect((await findCustomers(shop.office, asked())).items).toEqual([]);
    expect((await findCustomers(shop.office, asked({ archived: "only", q: "sandm" }))).items).toMatchObject([
      { name: "Sandmark" },
    ]);
    await changeCustomer(shop.office, made.id, changed({ version: archived.version, archived: false }));
    expect((await findCustomers(shop.office, asked())).items).toMatchObject([
      { name: "Sandmark", archivedAt: null },
    ]);
  });

  it("names each field that is wrong", () => {
    expect(() => given({ name: "  ", email: "not an address", phone: "1".repeat(61) })).toThrow(
      expect.objectContaining({
        code: "invalid",
        more: {
          fields: {
            name: "Give the customer a name.",
            email: "Write an address like anna@example.org.",
            phone: "At most 60 characters.",
          },
        },
      }),
    );
  });

  it("does not show or change another shop's record", async () => {
    const [here, there] = [await makeShop(), await makeShop()];
    const id = await makeCustomer(there.shopId);
    await expect(getCustomer(here.owner, id)).rejects.toMatchObject({ code: "not-found" });
    await expect(changeCustomer(here.owner, id, { version: 1, name: "Mine" })).rejects.toMatchObject({
      code: "not-found",
    });
    await expect(archiveCustomer(here.owner, id, { version: 1 })).rejects.toMatchObject({
      code: "not-found",
    });
  });

  it("shows a customer's sign-in its own record, without the shop's notes, and nobody else's", async () => {
    const shop = await makeShop();
    const mine = await createCustomer(shop.office, given({ name: "Ruiz-Ashe", notes: "Pays late." }));
    const other = await makeCustomer(shop.shopId, "Pryce");
    const me = await shop.customer(mine.id);
    expect(await getCustomer(me, mine.id)).toMatchObject({ name: "Ruiz-Ashe", notes: null });
    await expect(getCustomer(me, other)).rejects.toMatchObject({ code: "not-found" });
    expect((await findCustomers(me, asked())).items.map((row) => row.id)).toEqual([mine.id]);
    expect((await findCustomers(me, asked({ q: "pryce" }))).items).toEqual([]);
    expect((await findCustomers(me, asked({ q: "ruiz" }))).items).toHaveLength(1);
    await expect(changeCustomer(me, mine.id, { version: 1, name: "X" })).rejects.toMatchObject({
      code: "forbidden",
    });
  });

  it("lets a technician read but not change", async () => {
    const shop = await makeShop();
    const id = await makeCustomer(shop.shopId);
    expect(await getCustomer(shop.technician, id)).toMatchObject({ id });
    await expect(createCustomer(shop.technician, given({ name: "New" }))).rejects.toMatchObject({
      code: "forbidden",
    });
    await expect(changeCustomer(shop.technician, id, { version: 1, name: "X" })).rejects.toMatchObject({
      code: "forbidden",
    });
  });

  it("pages through every record once, in the order people read names, both ways and by change", async () => {
    const shop = await makeShop();
    const names = ["Ábel", "abbot", "Zoltan", "Émile", "Eve", "zoe", "Ölander", "Otto", "Otto", "de Wit"];
    for (const name of names) await makeCustomer(shop.shopId, name);
    const walk = async (query: Record<string, unknown>) => {
      const seen: string[] = [];
      let cursor: string | null = null;
      do {
        const page = await findCustomers(
          shop.office,
          asked({ ...query, most: 3, ...(cursor ? { cursor } : {}) }),
        );
        seen.push(...page.items.map((row) => row.name));
        cursor = page.next;
      } while (cursor);
      return seen;
    };
    const ascending = ["abbot", "Ábel", "de Wit", "Émile", "Eve", "Ölander", "Otto", "Otto", "zoe", "Zoltan"];
    expect(await walk({})).toEqual(ascending);
    expect(await walk({ direction: "desc" })).toEqual([...ascending].reverse());
    expect((await walk({ sort: "updated" })).sort()).toEqual([...names].sort());
  });

  it("refuses a cursor that is not one of the list's", async () => {
    const shop = await makeShop();
    const forged = [
      ["a", "b"],
      [1, newId()],
      ["yesterday", newId()],
    ].map((key) => Buffer.from(JSON.stringify(key)).toString("base64url"));
    for (const cursor of ["bm90IGEgY3Vyc29y", forged[0], forged[1]]) {
      await expect(findCustomers(shop.office, asked({ cursor }))).rejects.toMatchObject({
        code: "invalid",
        more: { fields: { cursor: "Not a cursor of this list." } },
      });
    }
    await expect(
      findCustomers(shop.office, asked({ sort: "updated", cursor: forged[2] })),
    ).rejects.toMatchObject({ code: "invalid" });
  });
});
