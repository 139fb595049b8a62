import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { parseInput } from "@/lib/doors/fields";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { archiveInstrument, findInstruments } from "@/lib/instruments/service";
import { searchQuery } from "@/lib/search/schema";
import { search } from "@/lib/search/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  owner,
} from "../support/factories";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

async function portAveril() {
  const shop = await makeShop();
  const conservatory = await makeCustomer(shop.shopId, "Averil Conservatory");
  const lindqvist = await makeCustomer(shop.shopId, "Signe Lindqvist");
  await owner()`update customer set phone = '+353 (0)71 555-0142' where shop_id = ${shop.shopId} and id = ${lindqvist}`;
  const main = await makeSite(shop.shopId, conservatory, "Main building", {
    street: "14 Rope Walk",
    postalCode: "F91 X2Y4",
    city: "Port Averil",
  });
  const home = await makeSite(shop.shopId, lindqvist, "Lindqvist, home", { street: "3 Gallow Green" });
  const grand = await makeInstrument(
    shop.shopId,
    { siteId: main, ownerId: conservatory },
    { maker: "Castellan", model: "186", serial: "48 213" },
  );
  const upright = await makeInstrument(
    shop.shopId,
    { siteId: home, ownerId: lindqvist },
    { maker: "Halden & Pike", model: "U1", serial: "HP-90177" },
  );
  const found = async (q: string) =>
    (await search(shop.technician, parseInput(searchQuery, { q }))).items.map((item) => item.id);
  return { shop, conservatory, lindqvist, main, home, grand, upright, found };
}

describe("search", () => {
  it("finds a serial number as it is stamped, without its spaces, and by its end", async () => {
    const { grand, upright, found } = await portAveril();
    for (const q of ["48 213", "48213", "213", " 48  213 "]) expect(await found(q)).toContain(grand);
    for (const q of ["HP-90177", "hp90177", "HP 90177", "90177", "0177"])
      expect(await found(q)).toContain(upright);
    expect(await found("48213")).toEqual([grand]);
  });

  it("finds by parts of names and addresses, in any order and case", async () => {
    const { conservatory, lindqvist, main, home, grand, upright, found } = await portAveril();
    expect(await found("conserv")).toEqual(expect.arrayContaining([conservatory, main, grand]));
    expect(await found("rope walk")).toEqual(expect.arrayContaining([main, grand]));
    expect(await found("WALK rope")).toContain(main);
    expect(await found("f91")).toContain(main);
    expect(await found("castellan averil")).toEqual([grand]);
    expect(await found("lindq pike")).toEqual([upright]);
    expect(await found("green lindqvist")).toEqual(expect.arrayContaining([home]));
    expect(await found("signe")).toContain(lindqvist);
  });

  it("finds a telephone number however it is spaced", async () => {
    const { lindqvist, found } = await portAveril();
    for (const q of ["0142", "5550142", "555-0142", "(0)71"]) expect(await found(q)).toContain(lindqvist);
  });

  it("finds misspelt words only where nothing has them as typed, and says so", async () => {
    const { shop, lindqvist } = await portAveril();
    const near = await search(shop.technician, parseInput(searchQuery, { q: "Lindkvist" }));
    expect(near.nearly).toBe(true);
    expect(near.items.map((item) => item.id)).toContain(lindqvist);
    const exact = await search(shop.technician, parseInput(searchQuery, { q: "Lindqvist" }));
    expect(exact.nearly).toBe(false);
  });

  it("takes wildcards and quotes of a query as plain characters", async () => {
    const { upright, found } = await portAveril();
    for (const q of ["%", "_", "\\", "'", "%%%"]) expect(await found(q)).toEqual([]);
    expect(await found("&")).toContain(upright);
  });

  it("finds nothing of another shop, and answers no customer's sign-in", async () => {
    const [here, there] = [await portAveril(), await makeShop()];
    const answer = await search(there.owner, parseInput(searchQuery, { q: "castellan" }));
    expect(answer.items).toEqual([]);
    await expect(
      search(await here.shop.customer(here.lindqvist), parseInput(searchQuery, { q: "castellan" })),
    ).rejects.toMatchObject({ code: "forbidden" });
  });

  it("leaves archived records to the archived list", async () => {
    const { shop, grand, found } = await portAveril();
    await archiveInstrument(shop.office, grand, { version: 1 });
    expect(await found("48213")).toEqual([]);
    const list = await findInstruments(
      shop.office,
      parseInput(instrumentListQuery, { q: "48213", archived: "only" }),
    );
    expect(list.items.map((row) => row.id)).toEqual([grand]);
  });

  it("says what each find is and where it stands", async () => {
    const { shop } = await portAveril();
    const answer = await search(shop.technician, parseInput(searchQuery, { q: "48213" }));
    expect(answer.items).toEqual([
      expect.objectContaining({
        kind: "instrument",
        title: "Castellan 186",
        subtitle: "no. 48 213, Main building, Port Averil, Averil Conservatory",
      }),
    ]);
  });
});
