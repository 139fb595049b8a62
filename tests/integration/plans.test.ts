import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { equalTemperedHz, partialHzFromF1, registerStyles } from "@/lib/acoustics";
import type { Actor } from "@/lib/auth/actor";
import { exportPlan, exportSheet } from "@/lib/exports/service";
import { newId } from "@/lib/ids";
import { compareSheets } from "@/lib/plans/compare/service";
import { findPlans, getAdvice, getAnalysis, getPlan, savePlan } from "@/lib/plans/service";
import { changeStyle, createStyle, getStyles, previewInstruments } from "@/lib/plans/styles/service";
import { createSheet, saveNotes } from "@/lib/readings/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner,
  type TestShop,
} from "../support/factories";
import { seededRandom } from "../support/simulated-instrument";

let shop: TestShop;
let other: TestShop;
let instrumentId: string;
let jobId: string;

/** B of an invented grand, rising by the treble asymptote (Rigaud, David & Daudet 2013, from memory). */
const treble = (midi: number) => Math.exp(0.0926 * midi - 13.64) + Math.exp(-0.0847 * midi - 5.82);
const keysRead = [33, 40, 45, 50, 57, 62, 69, 74, 81, 88, 93];

function rows(seed: number, change: (midi: number) => number = () => 1) {
  const { normal } = seededRandom(seed);
  return keysRead.map((midi) => ({
    midi,
    string: "all" as const,
    take: 1,
    kept: [],
    dropped: [],
    confirmed: [],
    readings: Array.from({ length: midi > 85 ? 6 : 8 }, (_, index) => ({
      partial: index + 1,
      hz:
        partialHzFromF1(index + 1, equalTemperedHz(midi), treble(midi) * change(midi)) *
        2 ** ((0.2 * normal()) / 1200),
    })),
  }));
}

async function sheetWith(
  actor: Actor,
  seed: number,
  change?: (midi: number) => number,
  takenAt = "2026-05-14T09:12:00Z",
) {
  const sheet = await createSheet(actor, instrumentId, {
    jobId,
    stage: "as-found",
    takenAt,
    referenceHz: 440,
  });
  await saveNotes(actor, sheet.id, { notes: rows(seed, change) });
  return sheet.id;
}

beforeAll(async () => {
  shop = await makeShop();
  other = await makeShop();
  const customerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, customerId);
  instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
  ({ jobId } = await makeVisit(shop.shopId, { siteId, instrumentId, memberId: shop.technician.memberId }));
});

afterAll(async () => {
  await closeDatabases();
  await closeFactories();
});

describe("analysis of a sheet", () => {
  it("gives B of every key, a plan with its band through the anchor, and what to measure next", async () => {
    const sheetId = await sheetWith(shop.technician, 1);
    const analysis = await getAnalysis(shop.office, sheetId, {});
    expect(analysis.keys).toHaveLength(88);
    expect(analysis.keys.filter((key) => key.source === "measured").map((key) => key.midi)).toEqual(keysRead);
    for (const key of analysis.keys.filter(({ midi }) => keysRead.includes(midi))) {
      expect(key.bLow).toBeLessThan(treble(key.midi));
      expect(key.bHigh).toBeGreaterThan(treble(key.midi));
    }
    const anchor = analysis.notes.find((note) => note.midi === 69);
    expect(anchor?.targetHz).toBeCloseTo(440, 6);
    expect(analysis.notes.every((note) => note.bandCents !== null && note.bandCents >= 0)).toBe(true);
    expect(analysis.advice.next.length).toBe(88 - keysRead.length);
    expect(analysis.beats.length).toBeGreaterThan(500);
  });

  it("follows the chosen style, temperament and reference", async () => {
    const sheetId = await sheetWith(shop.technician, 2);
    const even = await getAnalysis(shop.owner, sheetId, { style: "even" });
    const wide = await getAnalysis(shop.owner, sheetId, { style: "wide" });
    const top = (analysis: typeof even) => analysis.notes.at(-1)?.stretchCents ?? 0;
    expect(top(wide)).toBeGreaterThan(top(even));
    const pitched = await getAnalysis(shop.owner, sheetId, { referenceHz: 442 });
    expect(pitched.notes.find((note) => note.midi === 69)?.targetHz).toBeCloseTo(442, 6);
    const vallotti = await getAnalysis(shop.owner, sheetId, { temperament: "vallotti" });
    // Vallotti's C stands 5.87 cents above equal with A at zero (tests/reference/checks.json, temperament.Vallotti).
    const c4 = (analysis: typeof even) => analysis.notes.find((note) => note.midi === 60)?.stretchCents ?? 0;
    expect(c4(vallotti) - c4(even)).toBeCloseTo(5.87, 0);
    await expect(getAnalysis(shop.owner, sheetId, { style: newId() })).rejects.toMatchObject({
      code: "invalid",
    });
  });

  it("begins from what pianos are like when nothing is read", async () => {
    const sheet = await createSheet(shop.technician, instrumentId, {
      jobId,
      stage: "as-left",
      takenAt: new Date(Date.now() + 3_600_000).toISOString(),
      referenceHz: 440,
    });
    expect((await getAnalysis(shop.owner, sheet.id, {})).priorOnly).toBe(true);
    expect((await getAdvice(shop.owner, instrumentId)).sheetId).toBe(sheet.id);
  });
});

describe("a compass corrected after notes were read", () => {
  it("leaves the notes outside it out, and plans the keys there are", async () => {
    const sheetId = await sheetWith(shop.technician, 13);
    await owner()`update instrument set first_midi = 40, last_midi = 80 where shop_id = ${shop.shopId} and id = ${instrumentId}`;
    try {
      const analysis = await getAnalysis(shop.owner, sheetId, {});
      expect(analysis.keys).toHaveLength(41);
      expect(analysis.keys.filter((key) => key.source === "measured").map((key) => key.midi)).toEqual(
        keysRead.filter((midi) => midi >= 40 && midi <= 80),
      );
    } finally {
      await owner()`update instrument set first_midi = 21, last_midi = 108 where shop_id = ${shop.shopId} and id = ${instrumentId}`;
    }
  });
});

describe("a sheet's time", () => {
  it("is not in the future: a wrong year would head every list", async () => {
    const begun = createSheet(shop.technician, instrumentId, {
      jobId,
      stage: "as-found",
      takenAt: "2096-12-01T10:00:00Z",
      referenceHz: 440,
    });
    await expect(begun).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { takenAt: expect.any(String) } },
    });
  });
});

describe("kept plans", () => {
  it("are computed on the server, kept once under one id, and step back for a newer one of the job", async () => {
    const sheetId = await sheetWith(shop.technician, 3);
    const id = newId();
    const first = await savePlan(shop.technician, sheetId, { id, style: "even", jobId });
    const again = await savePlan(shop.technician, sheetId, { id, style: "wide", jobId });
    expect(again).toEqual(first);
    const second = await savePlan(shop.technician, sheetId, { style: "close", jobId });
    const kept = await findPlans(shop.office, sheetId);
    expect(kept.items.map((plan) => [plan.id, plan.supersededAt === null])).toEqual([
      [second.id, true],
      [first.id, false],
    ]);
    expect((await getPlan(shop.office, first.id)).notes).toEqual(first.notes);
  });

  it("leave one plan of the job when two are saved at once", async () => {
    const sheetId = await sheetWith(shop.technician, 4);
    await Promise.all(
      ["even", "wide", "close"].map((style) => savePlan(shop.technician, sheetId, { style, jobId })),
    );
    const kept = await findPlans(shop.owner, sheetId);
    expect(kept.items).toHaveLength(3);
    expect(kept.items.filter((plan) => plan.supersededAt === null)).toHaveLength(1);
  });

  it("are made by owners and the visit's technicians only", async () => {
    const sheetId = await sheetWith(shop.technician, 5);
    await expect(savePlan(shop.otherTechnician, sheetId, {})).rejects.toMatchObject({ code: "forbidden" });
    await expect(savePlan(shop.office, sheetId, {})).rejects.toMatchObject({ code: "forbidden" });
    const plan = await savePlan(shop.owner, sheetId, {});
    expect((await getPlan(shop.otherTechnician, plan.id)).id).toBe(plan.id);
    await expect(getPlan(other.owner, plan.id)).rejects.toMatchObject({ code: "not-found" });
    await expect(getAnalysis(other.owner, sheetId, {})).rejects.toMatchObject({ code: "not-found" });
    await expect(savePlan(other.owner, sheetId, {})).rejects.toMatchObject({ code: "not-found" });
  });

  it("refuse the job of another instrument", async () => {
    const sheetId = await sheetWith(shop.technician, 6);
    await expect(savePlan(shop.owner, sheetId, { jobId: newId() })).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { jobId: expect.any(String) } },
    });
  });
});

describe("two sheets compared", () => {
  it("name the string that was replaced by wire two sizes off, and no other", async () => {
    const before = await sheetWith(shop.technician, 7, undefined, "2025-05-14T09:00:00Z");
    const after = await sheetWith(
      shop.technician,
      8,
      (midi) => (midi === 88 ? 1.24 : 1),
      "2025-11-14T09:00:00Z",
    );
    const result = await compareSheets(shop.office, instrumentId, [after, before]);
    expect(result.before.sheetId).toBe(before);
    expect(result.notes.filter((note) => note.verdict === "changed").map((note) => note.midi)).toEqual([88]);
    expect(result.notes.find((note) => note.midi === 69)?.verdict).toBe("unchanged");
  });

  it("refuse a sheet with itself, an empty sheet, and another shop's", async () => {
    const sheetId = await sheetWith(shop.technician, 9);
    const empty = await createSheet(shop.technician, instrumentId, {
      jobId,
      stage: "as-found",
      takenAt: "2026-05-15T09:12:00Z",
      referenceHz: 440,
    });
    await expect(compareSheets(shop.office, instrumentId, [sheetId, sheetId])).rejects.toMatchObject({
      code: "invalid",
    });
    await expect(compareSheets(shop.office, instrumentId, [sheetId, empty.id])).rejects.toMatchObject({
      code: "invalid",
    });
    await expect(compareSheets(other.owner, instrumentId, [sheetId, empty.id])).rejects.toMatchObject({
      code: "not-found",
    });
  });
});

describe("house styles", () => {
  const wide = {
    name: "Harbour",
    ...registerStyles.wide,
    intervals: [...registerStyles.wide.intervals],
    toleranceCents: 2,
  };

  it("are the owner's to make, and everybody's on the staff to plan with", async () => {
    await expect(createStyle(shop.technician, wide)).rejects.toMatchObject({ code: "forbidden" });
    const style = await createStyle(shop.owner, wide);
    const sheetId = await sheetWith(shop.technician, 10);
    const own = await getAnalysis(shop.technician, sheetId, { style: style.id });
    const builtIn = await getAnalysis(shop.technician, sheetId, { style: "wide" });
    expect(own.notes.map((note) => note.stretchCents)).toEqual(
      builtIn.notes.map((note) => note.stretchCents),
    );
    expect(own.style.name).toBe("Harbour");
    expect((await getStyles(other.owner)).house).toEqual([]);
  });

  it("are tried on the instrument with the most readings, by its fullest sheet", async () => {
    const place = await makeShop();
    expect(await previewInstruments(place.owner)).toEqual([]);
    const customerId = await makeCustomer(place.shopId);
    const siteId = await makeSite(place.shopId, customerId);
    const [few, many] = [
      await makeInstrument(place.shopId, { siteId, ownerId: customerId }),
      await makeInstrument(place.shopId, { siteId, ownerId: customerId }),
    ];
    for (const [instrument, most] of [
      [few, 3],
      [many, 5],
      [many, 8],
    ] as const) {
      const sheet = await createSheet(place.owner, instrument, {
        stage: "as-found",
        takenAt: "2026-05-14T09:12:00Z",
        referenceHz: 440,
      });
      await saveNotes(place.owner, sheet.id, { notes: rows(13).slice(0, most) });
    }
    const found = await previewInstruments(place.office);
    expect(found.map(({ instrumentId, notesRead }) => [instrumentId, notesRead])).toEqual([
      [many, 8],
      [few, 3],
    ]);
    expect(found[0]?.observations.map(({ midi }) => midi)).toEqual(keysRead.slice(0, 8));
    expect((await previewInstruments(other.owner)).map(({ instrumentId }) => instrumentId)).not.toContain(
      many,
    );
  });

  it("keep a name once, and answer a stale change with the newer style", async () => {
    const style = await createStyle(shop.owner, { ...wide, name: "Quay" });
    await expect(createStyle(shop.owner, { ...wide, name: "quay" })).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { name: expect.any(String) } },
    });
    await changeStyle(shop.owner, style.id, { version: 1, smoothness: 40 });
    await expect(changeStyle(shop.owner, style.id, { version: 1, smoothness: 50 })).rejects.toMatchObject({
      code: "stale",
      more: { current: { smoothness: 40, version: 2 } },
    });
    await changeStyle(shop.owner, style.id, { version: 2, archived: true });
    expect((await getStyles(shop.owner)).house.map(({ name }) => name)).not.toContain("Quay");
    await createStyle(shop.owner, { ...wide, name: "Quay" });
  });
});

describe("exports", () => {
  it("carry every reading with its residual, and neutralise text a spreadsheet would run", async () => {
    const sheetId = await sheetWith(shop.technician, 11);
    const { text, type } = await exportSheet(shop.office, sheetId, { format: "csv", what: "readings" });
    expect(type).toContain("text/csv");
    const lines = text.trim().split("\r\n");
    expect(lines).toHaveLength(1 + rows(11).reduce((sum, row) => sum + row.readings.length, 0));
    expect(lines[0]).toContain("midi,note,string,take,partial,hz,cents,referenceHz");
    const json = JSON.parse((await exportSheet(shop.office, sheetId, { format: "json", what: "fits" })).text);
    expect(json.map((row: { midi: number }) => row.midi)).toEqual(keysRead);
    expect(Object.keys(json[0])).toEqual(expect.arrayContaining(["f1Hz", "bSigma", "bLow", "bHigh"]));
    const names = [lines[0]?.replace("\uFEFF", "").split(",") ?? [], Object.keys(json[0])].flat();
    expect(names.filter((name) => !/^[a-z][a-zA-Z0-9]*$/.test(name))).toEqual([]);
  });

  it("carry a plan's every key, and are nobody else's", async () => {
    const sheetId = await sheetWith(shop.technician, 12);
    const plan = await savePlan(shop.technician, sheetId, {
      style: "wide",
      temperament: "vallotti",
      referenceHz: 442,
    });
    const { text } = await exportPlan(shop.technician, plan.id, "csv");
    const lines = text.trim().split("\r\n");
    expect(lines).toHaveLength(89);
    expect(lines[0]).toMatch(/,style,temperament,referenceHz$/);
    for (const line of lines.slice(1)) expect(line).toMatch(/,Wide,vallotti,442$/);
    await expect(exportPlan(other.owner, plan.id, "csv")).rejects.toMatchObject({ code: "not-found" });
  });
});
