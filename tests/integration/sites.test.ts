import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { parseInput } from "@/lib/doors/fields";
import { newId } from "@/lib/ids";
import { newSite, siteChange, siteListQuery } from "@/lib/sites/schema";
import { archiveSite, changeSite, createSite, findSites, getSite } from "@/lib/sites/service";
import { closeFactories, makeCustomer, makeInstrument, makeShop, makeSite } from "../support/factories";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

const asked = (query: Record<string, unknown> = {}) => parseInput(siteListQuery, query);
const given = (fields: Record<string, unknown>) => parseInput(newSite, fields);
const changed = (fields: Record<string, unknown>) => parseInput(siteChange, fields);

describe("sites", () => {
  it("makes one record of the same id sent twice, in the shop's own country and zone", async () => {
    const shop = await makeShop();
    const customerId = await makeCustomer(shop.shopId, "Averil Conservatory");
    const input = given({ id: newId(), customerId, name: "Main building", city: "Port Averil" });
    const first = await createSite(shop.office, input);
    expect(await createSite(shop.office, input)).toEqual(first);
    expect(first).toMatchObject({
      customerName: "Averil Conservatory",
      country: "IE",
      timeZone: "Europe/Dublin",
      street: "",
    });
    expect((await findSites(shop.office, asked())).items).toHaveLength(1);
  });

  it("names each field that is wrong, also between fields", async () => {
    expect(() =>
      given({ customerId: "nobody", name: "", country: "Ireland", timeZone: "Port Averil", latitude: 91 }),
    ).toThrow(
      expect.objectContaining({
        more: {
          fields: {
            customerId: "Choose the customer this site belongs to.",
            name: "Give the site a name.",
            country: "Two letters, such as IE.",
            timeZone: "Choose a time zone such as Europe/Dublin.",
            latitude: "Write degrees between −90 and 90.",
          },
        },
      }),
    );
    const shop = await makeShop();
    const customerId = await makeCustomer(shop.shopId);
    await expect(
      createSite(shop.office, given({ customerId, name: "Hall", latitude: 53.3 })),
    ).rejects.toMatchObject({ more: { fields: { longitude: expect.any(String) } } });
  });

  it("keeps half a position out when a change takes the other half away", async () => {
    const shop = await makeShop();
    const customerId = await makeCustomer(shop.shopId);
    const made = await createSite(
      shop.office,
      given({ customerId, name: "Hall", latitude: 53.3, longitude: -6.2 }),
    );
    await expect(
      changeSite(shop.office, made.id, changed({ version: 1, latitude: null })),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { latitude: expect.any(String) } } });
    const bare = await changeSite(
      shop.office,
      made.id,
      changed({ version: 1, latitude: null, longitude: null }),
    );
    expect(bare).toMatchObject({ latitude: null, longitude: null, name: "Hall", version: 2 });
  });

  it("answers a stale version with the record as it is now", async () => {
    const shop = await makeShop();
    const id = await makeSite(shop.shopId, await makeCustomer(shop.shopId), "Hall");
    await changeSite(shop.office, id, changed({ version: 1, city: "Port Averil" }));
    await expect(
      changeSite(shop.office, id, changed({ version: 1, name: "Great Hall" })),
    ).rejects.toMatchObject({
      code: "stale",
      more: { current: { name: "Hall", city: "Port Averil", version: 2 } },
    });
  });

  it("archives, and restores", async () => {
    const shop = await makeShop();
    const id = await makeSite(shop.shopId, await makeCustomer(shop.shopId), "Old chapel");
    const archived = await archiveSite(shop.office, id, { version: 1 });
    expect((await findSites(shop.office, asked())).items).toEqual([]);
    expect((await findSites(shop.office, asked({ archived: "only" }))).items).toMatchObject([{ id }]);
    await changeSite(shop.office, id, changed({ version: archived.version, archived: false }));
    expect((await findSites(shop.office, asked())).items).toMatchObject([{ id, archivedAt: null }]);
  });

  it("takes no customer of another shop, and shows no site of it", async () => {
    const [here, there] = [await makeShop(), await makeShop()];
    const theirCustomer = await makeCustomer(there.shopId);
    const theirSite = await makeSite(there.shopId, theirCustomer);
    await expect(
      createSite(here.owner, given({ customerId: theirCustomer, name: "Hall" })),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { customerId: expect.any(String) } } });
    await expect(getSite(here.owner, theirSite)).rejects.toMatchObject({ code: "not-found" });
    await expect(changeSite(here.owner, theirSite, { version: 1, name: "X" })).rejects.toMatchObject({
      code: "not-found",
    });
  });

  it("shows a customer its own sites only, without the shop's access notes", async () => {
    const shop = await makeShop();
    const [mine, other] = [await makeCustomer(shop.shopId, "Lynn"), await makeCustomer(shop.shopId, "Pryce")];
    const site = await createSite(
      shop.office,
      given({ customerId: mine, name: "Lynn", accessNotes: "The dog is friendly, the cat is not." }),
    );
    const theirs = await makeSite(shop.shopId, other, "Pryce");
    const me = await shop.customer(mine);
    expect(await getSite(me, site.id)).toMatchObject({ name: "Lynn", accessNotes: null });
    await expect(getSite(me, theirs)).rejects.toMatchObject({ code: "not-found" });
    expect((await findSites(me, asked())).items.map((row) => row.id)).toEqual([site.id]);
  });

  it("counts the instruments that stand there, and lists the sites of one customer", async () => {
    const shop = await makeShop();
    const [school, church] = [
      await makeCustomer(shop.shopId, "School"),
      await makeCustomer(shop.shopId, "Church"),
    ];
    const hall = await makeSite(shop.shopId, school, "Hall");
    await makeSite(shop.shopId, church, "Nave");
    await makeInstrument(shop.shopId, { siteId: hall, ownerId: school });
    await makeInstrument(shop.shopId, { siteId: hall, ownerId: church });
    const page = await findSites(shop.office, asked({ customerId: school, sort: "customer" }));
    expect(page.items).toMatchObject([{ id: hall, customerName: "School", instruments: 2 }]);
  });
});
