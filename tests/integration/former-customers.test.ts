import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { newId } from "@/lib/ids";
import { getHistory } from "@/lib/instruments/history/service";
import { correctPlace, moveInstrument } from "@/lib/instruments/holdings/service";
import { getInstrument } from "@/lib/instruments/service";
import { changeSite } from "@/lib/sites/service";
import { moveVisit } from "@/lib/visits/moves/service";
import { visitListQuery } from "@/lib/visits/schema";
import { findVisits, getVisit } from "@/lib/visits/service";
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
  await closeFactories();
  await closeDatabases();
});

/** A house with its piano, tuned for the first customer in 2025 and sold to the second in 2026. */
async function soldHouse() {
  const shop = await makeShop();
  const [before, after] = [
    await makeCustomer(shop.shopId, "Mairead Lynn"),
    await makeCustomer(shop.shopId, "Owen Tark"),
  ];
  const siteId = await makeSite(shop.shopId, before, "Rope Walk 14");
  const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: before });
  const memberId = shop.technician.memberId;
  const tuned = (starts: string, state = "closed") =>
    makeVisit(shop.shopId, { siteId, instrumentId, memberId, starts, state });
  const old = await tuned("2025-11-26 09:00");
  await makeSheet(shop.shopId, instrumentId, old.jobId, "2025-11-26T09:10Z", -6.4);
  return {
    shop,
    siteId,
    instrumentId,
    old,
    tuned,
    after,
    former: await shop.customer(before),
    present: await shop.customer(after),
  };
}

async function makeSheet(
  shopId: string,
  instrumentId: string,
  jobId: string | null,
  at: string,
  cents: number,
) {
  const id = newId();
  await owner()`insert into reading_sheet (shop_id, id, instrument_id, job_id, stage, taken_at, reference_hz, humidity_percent)
    values (${shopId}, ${id}, ${instrumentId}, ${jobId}, 'as-found', ${at}, 440, 37)`;
  // Three middle notes off alike and one of the top, which the instrument's pitch leaves out.
  for (const [midi, off] of [
    [57, cents],
    [69, cents],
    [72, cents],
    [105, cents + 40],
  ] as const) {
    const hz = 440 * 2 ** ((midi - 69) / 12 + off / 1200);
    await owner()`insert into note_reading (shop_id, id, sheet_id, midi, partials, hz, sigma_cents, f1_hz, fit, fit_version)
      values (${shopId}, ${newId()}, ${id}, ${midi}, '{1}', ${[hz]}, '{null}', ${hz}, '{}', 1)`;
  }
}

const all = visitListQuery.parse({});

describe("a site given to another customer", () => {
  it("takes none of the former customer's visits with it, and leaves them with the former one", async () => {
    const at = await soldHouse();
    await changeSite(at.shop.office, at.siteId, { version: 1, customerId: at.after });
    const fresh = await at.tuned("2026-03-02 09:00", "confirmed");

    expect((await findVisits(at.present, all)).items.map(({ id }) => id)).toEqual([fresh.visitId]);
    await expect(getVisit(at.present, at.old.visitId)).rejects.toMatchObject({ code: "not-found" });

    expect((await findVisits(at.former, all)).items.map(({ id }) => id)).toEqual([at.old.visitId]);
    const own = await getVisit(at.former, at.old.visitId);
    expect(own).toMatchObject({ customer: { name: "Mairead Lynn" }, technicians: [expect.anything()] });
    // The address is somebody else's now.
    expect(own.site).toMatchObject({ name: "", street: "" });
    await expect(getVisit(at.former, fresh.visitId)).rejects.toMatchObject({ code: "not-found" });
  });

  it("shows the staff whose each visit was", async () => {
    const at = await soldHouse();
    await changeSite(at.shop.office, at.siteId, { version: 1, customerId: at.after });
    const fresh = await at.tuned("2026-03-02 09:00", "confirmed");
    const named = async (id: string) => (await getVisit(at.shop.office, id)).customer.name;
    expect(await named(at.old.visitId)).toBe("Mairead Lynn");
    expect(await named(fresh.visitId)).toBe("Owen Tark");
    const ofNew = await findVisits(at.shop.office, visitListQuery.parse({ customerId: at.after }));
    expect(ofNew.items.map(({ id, customerName }) => [id, customerName])).toEqual([
      [fresh.visitId, "Owen Tark"],
    ]);
  });

  it("keeps a visit that is moved with the customer it was booked for", async () => {
    const at = await soldHouse();
    const coming = await at.tuned("2030-03-04 09:00", "confirmed");
    await changeSite(at.shop.office, at.siteId, { version: 1, customerId: at.after });
    const { movedToId } = await moveVisit(at.shop.office, coming.visitId, {
      version: 1,
      reason: "Movers in the house",
      date: "2030-03-11",
      time: "09:00",
      confirmed: false,
    });
    expect(await getVisit(at.former, movedToId ?? "")).toMatchObject({ state: "offered" });
    await expect(getVisit(at.present, movedToId ?? "")).rejects.toMatchObject({ code: "not-found" });
  });
});

describe("an instrument's history, to a customer", () => {
  it("tells the pitch as the staff see it, without any sheet to read", async () => {
    const at = await soldHouse();
    const [entry] = await getHistory(at.former, at.instrumentId);
    expect(entry).toMatchObject({ day: "2025-11-26", work: "Tuning", humidityPercent: 37 });
    expect(entry?.asFoundCents).toBeCloseTo(-6.4, 6);
    expect(entry).toEqual((await getHistory(at.shop.office, at.instrumentId))[0]);
  });

  it("begins for the buyer on the day of the sale, and is gone for the seller", async () => {
    const at = await soldHouse();
    await changeSite(at.shop.office, at.siteId, { version: 1, customerId: at.after });
    await moveInstrument(at.shop.office, at.instrumentId, {
      version: 1,
      siteId: at.siteId,
      ownerId: at.after,
      since: "2026-02-01",
    });
    const fresh = await at.tuned("2026-03-02 09:00");
    await makeSheet(at.shop.shopId, at.instrumentId, fresh.jobId, "2026-03-02T09:10Z", 1.5);
    // Readings between visits belong to whoever owned it that day.
    await makeSheet(at.shop.shopId, at.instrumentId, null, "2026-01-20T09:10Z", -9);

    expect((await getHistory(at.present, at.instrumentId)).map(({ day }) => day)).toEqual(["2026-03-02"]);
    await expect(getHistory(at.former, at.instrumentId)).rejects.toMatchObject({ code: "not-found" });
    await expect(getInstrument(at.former, at.instrumentId)).rejects.toMatchObject({ code: "not-found" });
    expect(await getHistory(at.shop.office, at.instrumentId)).toHaveLength(3);
  });

  it("keeps the former customer's readings back even where the owner was put right instead of sold", async () => {
    const at = await soldHouse();
    await changeSite(at.shop.office, at.siteId, { version: 1, customerId: at.after });
    await correctPlace(at.shop.office, at.instrumentId, { version: 1, ownerId: at.after });
    expect(await getHistory(at.present, at.instrumentId)).toEqual([]);
  });

  it("hides from a hall the work on a lodger's instrument that it bought later", async () => {
    const shop = await makeShop();
    const [hall, lodger] = [
      await makeCustomer(shop.shopId, "Hall"),
      await makeCustomer(shop.shopId, "Lodger"),
    ];
    const siteId = await makeSite(shop.shopId, hall, "Stage");
    const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: lodger });
    const { visitId } = await makeVisit(shop.shopId, {
      siteId,
      instrumentId,
      memberId: shop.technician.memberId,
      starts: "2025-03-02 09:00",
      state: "closed",
    });
    await moveInstrument(shop.office, instrumentId, { version: 1, siteId, since: "2026-02-01" });
    const me = await shop.customer(hall);
    expect((await getVisit(me, visitId)).jobs).toEqual([]);
    expect(await getHistory(me, instrumentId)).toEqual([]);
    expect((await getVisit(shop.office, visitId)).jobs).toHaveLength(1);
  });

  it("goes on through a move of its own, and reaches back before the day it was written down", async () => {
    const at = await soldHouse();
    await owner()`update instrument_holding set since = '2025-12-01' where shop_id = ${at.shop.shopId}`;
    const next = await makeSite(at.shop.shopId, at.former.customerId ?? "", "New house");
    await moveInstrument(at.shop.office, at.instrumentId, { version: 1, siteId: next, since: "2026-02-01" });
    expect((await getHistory(at.former, at.instrumentId)).map(({ day }) => day)).toEqual(["2025-11-26"]);
  });
});
