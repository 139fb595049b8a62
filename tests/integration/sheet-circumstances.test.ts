import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { equalTemperedHz, partialHzFromF1 } from "@/lib/acoustics";
import { parseInput } from "@/lib/doors/fields";
import { readingCents } from "@/lib/readings/rules";
import { newSheet, noteInput, sheetChange } from "@/lib/readings/schema";
import { changeSheet, createSheet, getSheet, saveNote } from "@/lib/readings/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
} from "../support/factories";

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

const A3 = 57;

async function furnished() {
  const shop = await makeShop();
  const ownerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, ownerId);
  const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId });
  const visit = await makeVisit(shop.shopId, { siteId, instrumentId, memberId: shop.technician.memberId });
  const sheet = await createSheet(
    shop.technician,
    instrumentId,
    parseInput(newSheet, {
      stage: "as-found",
      takenAt: "2026-03-02T09:10:00Z",
      referenceHz: 440,
      remarks: " Lid off. ",
    }),
  );
  const readings = [1, 2, 3, 4, 5].map((partial) => ({
    partial,
    hz: partialHzFromF1(partial, equalTemperedHz(A3), 2.5e-4),
  }));
  const note = await saveNote(shop.technician, sheet.id, A3, parseInput(noteInput, { readings }));
  return { shop, instrumentId, siteId, ...visit, sheet, note };
}

let here: Awaited<ReturnType<typeof furnished>>;
let elsewhere: Awaited<ReturnType<typeof furnished>>;
beforeAll(async () => {
  here = await furnished();
  elsewhere = await furnished();
});

const change = (place: typeof here, fields: Record<string, unknown>) =>
  changeSheet(place.shop.technician, place.sheet.id, parseInput(sheetChange, fields));

describe("the circumstances of a sheet", () => {
  it("are put right afterwards, and emptied again, each on the version that was seen", async () => {
    expect(here.sheet.remarks).toBe("Lid off.");
    const changed = await change(here, {
      version: 1,
      stage: "as-left",
      takenAt: "2026-03-02T11:40:00Z",
      humidityPercent: 47.5,
      temperatureC: 19,
      jobId: here.jobId,
      remarks: "Lid on.",
    });
    expect(changed).toMatchObject({
      version: 2,
      stage: "as-left",
      takenAt: "2026-03-02T11:40:00.000Z",
      humidityPercent: 47.5,
      temperatureC: 19,
      visitId: here.visitId,
      remarks: "Lid on.",
    });
    await expect(change(here, { version: 1, humidityPercent: 60 })).rejects.toMatchObject({
      code: "stale",
      more: { current: { version: 2, humidityPercent: 47.5 } },
    });
    expect(
      await change(here, { version: 2, humidityPercent: null, jobId: null, remarks: null }),
    ).toMatchObject({ humidityPercent: null, temperatureC: 19, visitId: null, remarks: null });
  });

  it("keep the frequencies under a new reference, unless the cents were what was read", async () => {
    const place = await furnished();
    const kept = await change(place, { version: 1, referenceHz: 442 });
    expect(kept.referenceHz).toBe(442);
    expect(kept.notes[0]?.readings).toEqual(place.note.readings);

    const moved = await change(place, { version: 2, referenceHz: 435, readingsKeep: "cents" });
    const note = moved.notes[0];
    for (const { partial, hz } of note?.readings ?? []) {
      const before = place.note.readings.find((reading) => reading.partial === partial)?.hz ?? 0;
      expect(readingCents(partial, hz, A3, 435)).toBeCloseTo(readingCents(partial, before, A3, 442), 8);
    }
    expect(note?.f1Hz).toBeCloseTo((place.note.f1Hz * 435) / 442, 8);
    expect(note?.b).toBeCloseTo(place.note.b ?? 0, 10);
    expect(note?.version).toBe(2);
  });

  it("leave the readings alone when the change came too late", async () => {
    const place = await furnished();
    await change(place, { version: 1, humidityPercent: 50 });
    await expect(
      change(place, { version: 1, referenceHz: 442, readingsKeep: "cents" }),
    ).rejects.toMatchObject({ code: "stale" });
    const { notes, referenceHz } = await getSheet(place.shop.office, place.sheet.id);
    expect([referenceHz, notes[0]?.readings]).toEqual([440, place.note.readings]);
  });

  it("are changed by those who may write the sheet, and to a visit of this instrument", async () => {
    const { shop, sheet } = elsewhere;
    const humid = parseInput(sheetChange, { version: 1, humidityPercent: 50 });
    for (const actor of [shop.office, shop.otherTechnician]) {
      await expect(changeSheet(actor, sheet.id, humid)).rejects.toMatchObject({ code: "forbidden" });
    }
    await expect(changeSheet(here.shop.owner, sheet.id, humid)).rejects.toMatchObject({ code: "not-found" });
    await expect(change(elsewhere, { version: 1, jobId: here.jobId })).rejects.toMatchObject({
      more: { fields: { jobId: expect.any(String) } },
    });
    expect(() => parseInput(sheetChange, { version: 1, referenceHz: 500 })).toThrow(
      expect.objectContaining({ more: { fields: { referenceHz: "Between 380 and 480 Hz." } } }),
    );
  });

  it("do not let a technician move a sheet to a visit of somebody else", async () => {
    const place = await furnished();
    const other = await makeVisit(place.shop.shopId, {
      siteId: place.siteId,
      instrumentId: place.instrumentId,
      memberId: place.shop.otherTechnician.memberId,
    });
    await expect(change(place, { version: 1, jobId: other.jobId })).rejects.toMatchObject({
      code: "forbidden",
    });
  });
});
