import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { parseInput } from "@/lib/doors/fields";
import { newId } from "@/lib/ids";
import { getHistory } from "@/lib/instruments/history/service";
import { instrumentChange, instrumentListQuery, newInstrument } from "@/lib/instruments/schema";
import {
  archiveInstrument,
  changeInstrument,
  createInstrument,
  findInstruments,
  getInstrument,
} from "@/lib/instruments/service";
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

const asked = (query: Record<string, unknown> = {}) => parseInput(instrumentListQuery, query);
const given = (fields: Record<string, unknown>) => parseInput(newInstrument, fields);
const changed = (fields: Record<string, unknown>) => parseInput(instrumentChange, fields);

async function shopWithHall() {
  const shop = await makeShop();
  const customerId = await makeCustomer(shop.shopId, "Averil Conservatory");
  const siteId = await makeSite(shop.shopId, customerId, "Main building", { city: "Port Averil" });
  return { shop, customerId, siteId };
}

describe("instruments", () => {
  it("makes one record with one place of the same id sent twice", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const input = given({ id: newId(), siteId, maker: "Castellan", model: "186", kind: "grand" });
    const first = await createInstrument(shop.office, input);
    expect(await createInstrument(shop.office, input)).toEqual(first);
    expect(first).toMatchObject({
      name: "Castellan 186",
      firstMidi: 21,
      lastMidi: 108,
      breakMidi: null,
      referenceHz: 440,
      temperament: "equal",
      place: { siteId, ownerId: customerId, ownerName: "Averil Conservatory", payerId: null, until: null },
    });
    expect((await findInstruments(shop.office, asked())).items).toHaveLength(1);
  });

  it("answers a stale version with the record as it is now", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const id = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    await changeInstrument(shop.office, id, changed({ version: 1, room: "Room 12" }));
    await expect(
      changeInstrument(shop.office, id, changed({ version: 1, serial: "48 213" })),
    ).rejects.toMatchObject({
      code: "stale",
      more: { current: { id, room: "Room 12", serial: "", version: 2 } },
    });
  });

  it("leaves what a change does not mention as it was", async () => {
    const { shop, siteId } = await shopWithHall();
    const made = await createInstrument(
      shop.office,
      given({
        siteId,
        maker: "Osterby",
        kind: "upright",
        lastMidi: 105,
        breakMidi: 41,
        referenceHz: 442,
        temperament: "vallotti",
        standingNote: "Keep it round above C6.",
      }),
    );
    const after = await changeInstrument(shop.office, made.id, changed({ version: 1, year: 1931 }));
    expect(after).toMatchObject({
      year: 1931,
      kind: "upright",
      lastMidi: 105,
      breakMidi: 41,
      referenceHz: 442,
      temperament: "vallotti",
      standingNote: "Keep it round above C6.",
    });
  });

  it("keeps an own temperament of twelve offsets, and refuses eleven", async () => {
    const { shop, siteId } = await shopWithHall();
    const own = [5.9, 3.9, 2, 3.9, -2, 7.8, 2, 3.9, 3.9, 0, 5.9, 0];
    const made = await createInstrument(
      shop.office,
      given({ siteId, maker: "Osterby", kind: "other", temperament: own }),
    );
    expect(made.temperament).toEqual(own);
    expect(() => given({ siteId, maker: "Osterby", kind: "other", temperament: own.slice(1) })).toThrow(
      expect.objectContaining({ more: { fields: { temperament: expect.stringContaining("twelve") } } }),
    );
  });

  it("refuses a break outside the keys, also when the keys change under it", async () => {
    const { shop, siteId } = await shopWithHall();
    const base = { siteId, maker: "Brightwater", kind: "grand" };
    for (const breakMidi of [21, 109]) {
      await expect(createInstrument(shop.office, given({ ...base, breakMidi }))).rejects.toMatchObject({
        code: "invalid",
        more: { fields: { breakMidi: expect.stringContaining("A0") } },
      });
    }
    const made = await createInstrument(shop.office, given({ ...base, breakMidi: 22 }));
    await expect(
      changeInstrument(shop.office, made.id, changed({ version: 1, firstMidi: 29 })),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { breakMidi: expect.any(String) } } });
    await expect(
      createInstrument(shop.office, given({ ...base, firstMidi: 61, lastMidi: 71 })),
    ).rejects.toMatchObject({
      more: { fields: { firstMidi: expect.any(String), lastMidi: expect.any(String) } },
    });
  });

  it("names each field that is wrong", () => {
    expect(() => given({ siteId: "", maker: "", kind: "harp", year: 31, referenceHz: "440" })).toThrow(
      expect.objectContaining({
        more: {
          fields: {
            siteId: "Choose where the instrument stands.",
            maker: "Give the maker's name.",
            kind: "Choose the kind of instrument.",
            year: "A year from 1700 on.",
            referenceHz: "Write the pitch of A4 in hertz.",
          },
        },
      }),
    );
  });

  it("archives and restores; only owner and office may", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const id = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    await makeVisit(shop.shopId, { siteId, instrumentId: id, memberId: shop.technician.memberId });
    await expect(archiveInstrument(shop.technician, id, { version: 1 })).rejects.toMatchObject({
      code: "forbidden",
    });
    const archived = await archiveInstrument(shop.office, id, { version: 1, confirm: true });
    expect((await findInstruments(shop.office, asked())).items).toEqual([]);
    expect(
      (await findInstruments(shop.office, asked({ archived: "only", q: "castellan" }))).items,
    ).toMatchObject([{ id }]);
    await changeInstrument(shop.office, id, changed({ version: archived.version, archived: false }));
    expect((await findInstruments(shop.office, asked())).items).toMatchObject([{ id, archivedAt: null }]);
  });

  it("lets a technician change instruments of own visits and no other", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const mine = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    const other = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    await makeVisit(shop.shopId, { siteId, instrumentId: mine, memberId: shop.technician.memberId });
    expect(await getInstrument(shop.technician, mine)).toMatchObject({ canChange: true });
    expect(await getInstrument(shop.technician, other)).toMatchObject({ canChange: false });
    expect(
      await changeInstrument(shop.technician, mine, changed({ version: 1, breakMidi: 41 })),
    ).toMatchObject({
      breakMidi: 41,
    });
    await expect(
      changeInstrument(shop.technician, other, changed({ version: 1, breakMidi: 41 })),
    ).rejects.toMatchObject({ code: "forbidden" });
    await expect(
      changeInstrument(shop.otherTechnician, mine, changed({ version: 2, breakMidi: 42 })),
    ).rejects.toMatchObject({ code: "forbidden" });
    await expect(
      createInstrument(shop.technician, given({ siteId, maker: "Castellan", kind: "grand" })),
    ).rejects.toMatchObject({ code: "forbidden" });
  });

  it("does not show or take records of another shop", async () => {
    const [here, there] = [await shopWithHall(), await shopWithHall()];
    const id = await makeInstrument(there.shop.shopId, { siteId: there.siteId, ownerId: there.customerId });
    await expect(getInstrument(here.shop.owner, id)).rejects.toMatchObject({ code: "not-found" });
    await expect(
      changeInstrument(here.shop.owner, id, changed({ version: 1, room: "x" })),
    ).rejects.toMatchObject({ code: "not-found" });
    await expect(archiveInstrument(here.shop.owner, id, { version: 1 })).rejects.toMatchObject({
      code: "not-found",
    });
    await expect(getHistory(here.shop.owner, id)).rejects.toMatchObject({ code: "not-found" });
    await expect(
      createInstrument(here.shop.owner, given({ siteId: there.siteId, maker: "Castellan", kind: "grand" })),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { siteId: expect.any(String) } } });
    await expect(
      createInstrument(
        here.shop.owner,
        given({ siteId: here.siteId, ownerId: there.customerId, maker: "Castellan", kind: "grand" }),
      ),
    ).rejects.toMatchObject({ code: "invalid", more: { fields: { ownerId: expect.any(String) } } });
  });

  it("shows a customer the instruments it owns, not those of the next customer", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const neighbour = await makeCustomer(shop.shopId, "Lodger");
    const mine = await makeInstrument(shop.shopId, { siteId, ownerId: customerId }, { maker: "Castellan" });
    const lodged = await makeInstrument(shop.shopId, { siteId, ownerId: neighbour }, { maker: "Osterby" });
    const me = await shop.customer(customerId);
    expect((await findInstruments(me, asked())).items.map((row) => row.id)).toEqual([mine]);
    expect((await findInstruments(me, asked({ q: "osterby" }))).items).toEqual([]);
    expect((await findInstruments(me, asked({ q: "castel port averil" }))).items).toHaveLength(1);
    await expect(getInstrument(me, lodged)).rejects.toMatchObject({ code: "not-found" });
    const lodger = await shop.customer(neighbour);
    expect(await getInstrument(lodger, lodged)).toMatchObject({
      canChange: false,
      place: { siteName: "", ownerName: "Lodger" },
    });
    await expect(changeInstrument(me, mine, changed({ version: 1, room: "x" }))).rejects.toMatchObject({
      code: "forbidden",
    });
  });

  it("sorts by name, place and owner, and filters by site, owner and kind", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const other = await makeCustomer(shop.shopId, "Adeyemi-Roth");
    const home = await makeSite(shop.shopId, other, "Home");
    await makeInstrument(shop.shopId, { siteId, ownerId: customerId }, { maker: "Osterby", model: "" });
    await makeInstrument(
      shop.shopId,
      { siteId: home, ownerId: other },
      { maker: "Brightwater", model: "U1" },
    );
    await makeInstrument(shop.shopId, { siteId, ownerId: other }, { maker: "Castellan" });
    const names = async (query: Record<string, unknown>) =>
      (await findInstruments(shop.office, asked(query))).items.map((row) => row.maker);
    expect(await names({})).toEqual(["Brightwater", "Castellan", "Osterby"]);
    expect((await names({ sort: "place" })).at(0)).toBe("Brightwater");
    expect((await names({ sort: "owner" })).at(-1)).toBe("Osterby");
    expect((await names({ siteId })).sort()).toEqual(["Castellan", "Osterby"]);
    expect((await names({ ownerId: other })).sort()).toEqual(["Brightwater", "Castellan"]);
    expect(await names({ kind: "upright" })).toEqual([]);
  });

  it("tells the pitch as last found, and the history of found and left", async () => {
    const { shop, customerId, siteId } = await shopWithHall();
    const id = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    const { jobId, visitId } = await makeVisit(shop.shopId, {
      siteId,
      instrumentId: id,
      memberId: shop.technician.memberId,
      starts: "2025-11-26 09:00",
      state: "closed",
    });
    await makeSheet(shop.shopId, id, { jobId, stage: "as-found", takenAt: "2025-11-26T09:10Z", cents: -6.4 });
    await makeSheet(shop.shopId, id, { jobId, stage: "as-left", takenAt: "2025-11-26T10:40Z", cents: 0.1 });
    const [row] = (await findInstruments(shop.office, asked())).items;
    expect(row?.lastFoundCents).toBeCloseTo(-6.4, 6);
    expect(row?.lastSheetAt).toBe("2025-11-26T10:40:00.000Z");
    const history = await getHistory(shop.technician, id);
    expect(history).toMatchObject([{ day: "2025-11-26", work: "Tuning", visitId, humidityPercent: 37 }]);
    expect(history[0]?.asFoundCents).toBeCloseTo(-6.4, 6);
    expect(history[0]?.asLeftCents).toBeCloseTo(0.1, 6);
  });
});

type SheetFacts = { jobId: string; stage: string; takenAt: string; cents: number };

/** Three middle notes off by the same cents, and one in the high treble that does not count. */
async function makeSheet(shopId: string, instrumentId: string, { jobId, stage, takenAt, cents }: SheetFacts) {
  const sheetId = newId();
  await owner()`insert into reading_sheet (shop_id, id, instrument_id, job_id, stage, taken_at, reference_hz,
    humidity_percent) values (${shopId}, ${sheetId}, ${instrumentId}, ${jobId}, ${stage}, ${takenAt}, 440, 37)`;
  for (const [midi, off] of [
    [57, cents],
    [69, cents],
    [72, cents],
    [105, cents + 40],
  ] as const) {
    const hz = 440 * 2 ** ((midi - 69) / 12 + off / 1200);
    await owner()`insert into note_reading (shop_id, id, sheet_id, midi, partials, hz, sigma_cents, f1_hz, fit,
      fit_version) values (${shopId}, ${newId()}, ${sheetId}, ${midi}, '{1}', ${[hz]}, '{null}', ${hz}, '{}', 1)`;
  }
}
