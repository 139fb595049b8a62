import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { parseInput } from "@/lib/doors/fields";
import { newId } from "@/lib/ids";
import { correctPlace, findHoldings, moveInstrument } from "@/lib/instruments/holdings/service";
import { holdingChange, newHolding, stringInput, stringsInput } from "@/lib/instruments/schema";
import { getInstrument } from "@/lib/instruments/service";
import { findStrings, removeString, saveString, saveStrings } from "@/lib/instruments/strings/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner,
} from "../support/factories";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

const moved = (fields: Record<string, unknown>) => parseInput(newHolding, fields);
const corrected = (fields: Record<string, unknown>) => parseInput(holdingChange, fields);

async function pianoAtHome() {
  const shop = await makeShop();
  const seller = await makeCustomer(shop.shopId, "Seller");
  const buyer = await makeCustomer(shop.shopId, "Buyer");
  const home = await makeSite(shop.shopId, seller, "Old home");
  const flat = await makeSite(shop.shopId, buyer, "New flat");
  const id = await makeInstrument(shop.shopId, { siteId: home, ownerId: seller, since: "2021-05-01" });
  return { shop, seller, buyer, home, flat, id };
}

describe("an instrument's places", () => {
  it("closes the old place and opens the new one, once, and keeps the history", async () => {
    const { shop, seller, buyer, home, flat, id } = await pianoAtHome();
    const move = moved({ id: newId(), version: 1, siteId: flat, since: "2026-03-01" });
    const after = await moveInstrument(shop.office, id, move);
    expect(after.place).toMatchObject({ siteId: flat, ownerId: buyer, since: "2026-03-01", until: null });
    expect(after.version).toBe(2);
    expect(await moveInstrument(shop.office, id, move)).toEqual(after);
    expect((await findHoldings(shop.office, id)).items).toMatchObject([
      { siteId: flat, ownerId: buyer, since: "2026-03-01", until: null },
      { siteId: home, ownerId: seller, since: "2021-05-01", until: "2026-03-01" },
    ]);
  });

  it("takes the instrument out of the seller's sight and into the buyer's", async () => {
    const { shop, seller, buyer, flat, id } = await pianoAtHome();
    const [sold, bought] = [await shop.customer(seller), await shop.customer(buyer)];
    expect(await getInstrument(sold, id)).toMatchObject({ id });
    await moveInstrument(shop.office, id, moved({ version: 1, siteId: flat, since: "2026-03-01" }));
    await expect(getInstrument(sold, id)).rejects.toMatchObject({ code: "not-found" });
    expect(await getInstrument(bought, id)).toMatchObject({ place: { ownerId: buyer } });
    expect((await findHoldings(bought, id)).items).toHaveLength(1);
  });

  it("refuses a move before the instrument came, on that day, or in the future", async () => {
    const { shop, flat, id } = await pianoAtHome();
    for (const since of ["2020-01-01", "2021-05-01", "2199-01-01"]) {
      await expect(
        moveInstrument(shop.office, id, moved({ version: 1, siteId: flat, since })),
      ).rejects.toMatchObject({ code: "invalid", more: { fields: { since: expect.any(String) } } });
    }
    expect((await findHoldings(shop.office, id)).items).toHaveLength(1);
  });

  it("refuses to begin the present place before the last one ended", async () => {
    const { shop, flat, id } = await pianoAtHome();
    await moveInstrument(shop.office, id, moved({ version: 1, siteId: flat, since: "2026-03-01" }));
    await expect(
      correctPlace(shop.office, id, corrected({ version: 2, since: "2026-02-28" })),
    ).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { since: expect.stringContaining("1 Mar 2026") } },
    });
    const later = await correctPlace(shop.office, id, corrected({ version: 2, since: "2026-03-04" }));
    expect(later.place).toMatchObject({ since: "2026-03-04", siteId: flat });
  });

  it("lets the database refuse two places at one time, whatever the code says", async () => {
    const { shop, buyer, flat, id } = await pianoAtHome();
    await expect(
      owner()`insert into instrument_holding (shop_id, id, instrument_id, site_id, owner_id, since, until)
        values (${shop.shopId}, ${newId()}, ${id}, ${flat}, ${buyer}, '2022-01-01', '2023-01-01')`,
    ).rejects.toMatchObject({ code: "23P01", constraint_name: "instrument_holding_overlap" });
  });

  it("lets two moves at once end in one of them", async () => {
    const { shop, home, flat, id } = await pianoAtHome();
    const results = await Promise.allSettled([
      moveInstrument(shop.office, id, moved({ version: 1, siteId: flat, since: "2026-03-01" })),
      moveInstrument(shop.owner, id, moved({ version: 1, siteId: home, since: "2026-03-02" })),
    ]);
    expect(results.map((result) => result.status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(results.find((result) => result.status === "rejected")).toMatchObject({
      reason: { code: "stale" },
    });
    expect((await findHoldings(shop.office, id)).items).toHaveLength(2);
  });

  it("sets payer and booking contact, and takes them away again", async () => {
    const { shop, buyer, id } = await pianoAtHome();
    const set = await correctPlace(
      shop.office,
      id,
      corrected({ version: 1, payerId: buyer, bookingContactId: buyer }),
    );
    expect(set.place).toMatchObject({ payerName: "Buyer", bookingContactName: "Buyer" });
    const cleared = await correctPlace(shop.office, id, corrected({ version: 2, payerId: null }));
    expect(cleared.place).toMatchObject({ payerId: null, bookingContactId: buyer });
  });

  it("leaves places to owner and office", async () => {
    const { shop, home, flat, id } = await pianoAtHome();
    await makeVisit(shop.shopId, { siteId: home, instrumentId: id, memberId: shop.technician.memberId });
    const move = moved({ version: 1, siteId: flat, since: "2026-03-01" });
    await expect(moveInstrument(shop.technician, id, move)).rejects.toMatchObject({ code: "forbidden" });
    await expect(correctPlace(shop.technician, id, { version: 1, siteId: flat })).rejects.toMatchObject({
      code: "forbidden",
    });
  });

  it("finds no instrument and takes no site of another shop", async () => {
    const [here, there] = [await pianoAtHome(), await pianoAtHome()];
    await expect(
      moveInstrument(
        here.shop.owner,
        there.id,
        moved({ version: 1, siteId: here.flat, since: "2026-03-01" }),
      ),
    ).rejects.toMatchObject({ code: "not-found" });
    await expect(
      moveInstrument(
        here.shop.owner,
        here.id,
        moved({ version: 1, siteId: there.flat, since: "2026-03-01" }),
      ),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { siteId: expect.any(String) } } });
    await expect(findHoldings(here.shop.owner, there.id)).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("an instrument's strings", () => {
  const plain = parseInput(stringInput, { strings: 3, wound: false, speakingLengthMm: 402, diameterMm: 1 });

  it("keeps one row a note: saving again replaces it", async () => {
    const { shop, id } = await pianoAtHome();
    await saveString(shop.office, id, 69, plain);
    await saveString(shop.office, id, 69, parseInput(stringInput, { strings: 2, wound: false }));
    expect((await findStrings(shop.office, id)).items).toEqual([
      {
        midi: 69,
        strings: 2,
        wound: false,
        speakingLengthMm: null,
        diameterMm: null,
        outerDiameterMm: null,
        version: 2,
      },
    ]);
    await removeString(shop.office, id, 69);
    expect((await findStrings(shop.office, id)).items).toEqual([]);
    await expect(removeString(shop.office, id, 69)).rejects.toMatchObject({ code: "not-found" });
  });

  it("saves a pasted scale whole or not at all, and names the row that stops it", async () => {
    const { shop, id } = await pianoAtHome();
    const rows = [
      { midi: 40, values: plain },
      { midi: 109, values: plain },
    ];
    await expect(saveStrings(shop.office, id, parseInput(stringsInput, { rows }))).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { "rows.1.midi": expect.stringContaining("C#8") } },
    });
    expect((await findStrings(shop.office, id)).items).toEqual([]);
    const saved = await saveStrings(
      shop.office,
      id,
      parseInput(stringsInput, { rows: [rows[0], { midi: 41, values: plain }] }),
    );
    expect(saved.items.map((row) => row.midi)).toEqual([40, 41]);
  });

  it("answers a note that somebody else changed meanwhile with the note as it is now", async () => {
    const { shop, id } = await pianoAtHome();
    const seen = await saveString(shop.office, id, 69, { ...plain, version: 0 });
    await saveString(shop.owner, id, 69, { ...plain, strings: 2, version: seen.version });
    const current = { midis: [69], items: [expect.objectContaining({ midi: 69, strings: 2, version: 2 })] };
    for (const write of [
      () => saveString(shop.office, id, 69, { ...plain, diameterMm: 0.95, version: seen.version }),
      () => saveString(shop.office, id, 69, { ...plain, diameterMm: 0.95, version: 0 }),
      () => removeString(shop.office, id, 69, seen.version),
      () =>
        saveStrings(shop.office, id, {
          rows: [
            { midi: 70, values: { ...plain, version: 0 } },
            { midi: 69, values: { ...plain, version: seen.version } },
          ],
        }),
    ]) {
      await expect(write()).rejects.toMatchObject({ code: "stale", more: { current } });
    }
    // Nothing of the stale scale was written.
    expect((await findStrings(shop.office, id)).items.map(({ midi }) => midi)).toEqual([69]);
    // The same strings sent again, after an answer that was lost, are no conflict and no change.
    expect(await saveString(shop.owner, id, 69, { ...plain, strings: 2, version: 1 })).toMatchObject({
      version: 2,
    });
    await removeString(shop.office, id, 69, 2);
    await expect(saveString(shop.owner, id, 69, { ...plain, version: 2 })).rejects.toMatchObject({
      code: "stale",
      more: { current: { midis: [69], items: [] } },
    });
  });

  it("lets one of two writers of a new note win, and tells the other", async () => {
    const { shop, id } = await pianoAtHome();
    const written = await Promise.allSettled(
      [2, 3, 1, 4].map((strings) => saveString(shop.office, id, 69, { ...plain, strings, version: 0 })),
    );
    expect(written.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    expect((await findStrings(shop.office, id)).items[0]?.version).toBe(1);
  });

  it("names the field: a wrap needs a wound string, a core and more than the core's thickness", () => {
    const fields = (row: Record<string, unknown>) => {
      const result = stringInput.safeParse(row);
      return result.success ? [] : result.error.issues.map((issue) => issue.path.join("."));
    };
    expect(fields({ strings: 1, wound: true, diameterMm: 1.2, outerDiameterMm: 4.6 })).toEqual([]);
    expect(fields({ strings: 1, wound: false, diameterMm: 1.2, outerDiameterMm: 4.6 })).toEqual([
      "outerDiameterMm",
    ]);
    expect(fields({ strings: 1, wound: true, outerDiameterMm: 4.6 })).toEqual(["diameterMm"]);
    expect(fields({ strings: 1, wound: true, diameterMm: 1.2, outerDiameterMm: 1.2 })).toEqual([
      "outerDiameterMm",
    ]);
    expect(fields({ strings: 0, wound: true, speakingLengthMm: 0, diameterMm: 3 })).toEqual([
      "strings",
      "speakingLengthMm",
      "diameterMm",
    ]);
  });

  it("lets a technician of a visit write them, another only read them, and a customer read no other's", async () => {
    const { shop, seller, buyer, home, id } = await pianoAtHome();
    await makeVisit(shop.shopId, { siteId: home, instrumentId: id, memberId: shop.technician.memberId });
    await saveString(shop.technician, id, 69, plain);
    await expect(saveString(shop.otherTechnician, id, 69, plain)).rejects.toMatchObject({
      code: "forbidden",
    });
    expect((await findStrings(shop.otherTechnician, id)).items).toHaveLength(1);
    await expect(findStrings(await shop.customer(buyer), id)).rejects.toMatchObject({ code: "not-found" });
    await expect(saveString(await shop.customer(seller), id, 69, plain)).rejects.toMatchObject({
      code: "forbidden",
    });
  });
});
