import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { equalTemperedHz, partialHzFromF1, raiseByCents } from "@/lib/acoustics";
import type { Actor } from "@/lib/auth/actor";
import { savePlan } from "@/lib/plans/service";
import { createSheet, saveNotes } from "@/lib/readings/service";
import { getVisitWork } from "@/lib/visits/progress/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner,
} from "../support/factories";
import { seededRandom } from "../support/simulated-instrument";

afterAll(async () => {
  await closeFactories();
  await closeDatabases();
});

/** B of an invented grand, rising by the treble asymptote (Rigaud, David & Daudet 2013, from memory). */
const gradual = (midi: number) => Math.exp(0.0926 * midi - 13.64) + Math.exp(-0.0847 * midi - 5.82);
const keysRead = [45, 50, 54, 57, 62, 66, 69, 74, 78, 81, 85, 88];

async function scene(state = "in-progress") {
  const shop = await makeShop();
  const customerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, customerId);
  const piano = (model: string) =>
    makeInstrument(shop.shopId, { siteId, ownerId: customerId }, { maker: "Castellan", model });
  const first = await piano("186");
  const second = await piano("112");
  const { visitId, jobId } = await makeVisit(shop.shopId, {
    siteId,
    instrumentId: first,
    memberId: shop.technician.memberId,
    state,
  });
  const [row] = await owner()`insert into job (shop_id, id, visit_id, instrument_id, position)
    values (${shop.shopId}, gen_random_uuid(), ${visitId}, ${second}, 1) returning id`;
  await owner()`update instrument set standing_note = 'Lid key hangs inside the left arm.' where id = ${first}`;
  return { ...shop, customerId, visitId, first, second, jobId, otherJobId: String(row?.id) };
}

/** Readings of a whole sheet, flat by so many cents; `odd` is a key whose B is half as much again. */
async function readSheet(
  actor: Actor,
  instrumentId: string,
  what: { jobId: string; stage?: "as-found" | "as-left"; flatBy?: number; odd?: number; keys?: number[] },
) {
  const sheet = await createSheet(actor, instrumentId, {
    jobId: what.jobId,
    stage: what.stage ?? "as-found",
    takenAt: what.stage === "as-left" ? "2026-03-02T10:50:00.000Z" : "2026-03-02T09:12:00.000Z",
    referenceHz: 440,
    humidityPercent: 58,
    temperatureC: 21.4,
  });
  const { normal } = seededRandom(7);
  await saveNotes(actor, sheet.id, {
    notes: (what.keys ?? keysRead).map((midi) => ({
      midi,
      string: "all" as const,
      take: 1,
      kept: [],
      dropped: [],
      confirmed: [],
      readings: Array.from({ length: midi > 80 ? 6 : 8 }, (_, index) => {
        const partial = index + 1;
        const f1 = raiseByCents(equalTemperedHz(midi, 440), -(what.flatBy ?? 0));
        const b = gradual(midi) * (midi === what.odd ? 1.5 : 1);
        return { partial, hz: raiseByCents(partialHzFromF1(partial, f1, b), 0.15 * normal()) };
      }),
    })),
  });
  return sheet;
}

describe("how far the work of a visit is", () => {
  it("tells of each job what was read and kept on it, and never of another", async () => {
    const at = await scene();
    const sheet = await readSheet(at.technician, at.first, { jobId: at.jobId, flatBy: 26 });
    await savePlan(at.technician, sheet.id, { style: "even", jobId: at.jobId });

    const work = await getVisitWork(at.technician, at.visitId);
    const [first, second] = work.jobs;
    expect(first?.progress.found).toMatchObject({ sheetId: sheet.id, notes: 12, humidityPercent: 58 });
    expect(first?.progress.found?.a4Cents).toBeCloseTo(-26, 0);
    expect(first?.progress.readings).toMatchObject({ sheetId: sheet.id, notes: 12 });
    expect(first?.progress.plan).toMatchObject({ sheetId: sheet.id, temperament: "equal", referenceHz: 440 });
    expect(first?.progress.left).toBeNull();
    expect(second?.progress).toEqual({
      found: null,
      raised: null,
      readings: null,
      plan: null,
      left: null,
      otherSheets: [],
    });
    expect(work.opened).toMatchObject({
      jobId: at.jobId,
      strangers: [],
      next: "left",
      standingNote: "Lid key hangs inside the left arm.",
    });
    expect(work.opened?.history[0]).toMatchObject({ id: at.jobId, humidityPercent: 58, asLeftCents: null });
  });

  it("names the note that does not belong as the next thing", async () => {
    const at = await scene();
    await readSheet(at.technician, at.first, { jobId: at.jobId, odd: 78 });
    const { opened } = await getVisitWork(at.technician, at.visitId);
    expect(opened?.strangers.map(({ midi }) => midi)).toEqual([78]);
    expect(opened?.next).toBe("look");
  });

  it("opens the next instrument once one is read as left, or the one asked for", async () => {
    const at = await scene();
    await readSheet(at.technician, at.first, { jobId: at.jobId, stage: "as-left", keys: [57, 69] });
    expect((await getVisitWork(at.technician, at.visitId)).opened).toMatchObject({
      jobId: at.otherJobId,
      next: "found",
      standingNote: null,
    });
    expect((await getVisitWork(at.technician, at.visitId, at.jobId)).opened).toMatchObject({
      jobId: at.jobId,
      next: null,
    });
  });

  it("puts nothing in hand before the work begins, nor for those who take no readings here", async () => {
    const coming = await scene("confirmed");
    const before = await getVisitWork(coming.technician, coming.visitId);
    expect(before).toMatchObject({ canRecord: true, opened: { next: null } });

    const at = await scene();
    for (const actor of [at.otherTechnician, at.office]) {
      expect(await getVisitWork(actor, at.visitId)).toMatchObject({
        canRecord: false,
        opened: { next: null },
      });
    }
  });

  it("is not for customers, and not for another shop", async () => {
    const at = await scene();
    const customer = await at.customer(at.customerId);
    await expect(getVisitWork(customer, at.visitId)).rejects.toMatchObject({ code: "forbidden" });
    const elsewhere = await makeShop();
    await expect(getVisitWork(elsewhere.owner, at.visitId)).rejects.toMatchObject({ code: "not-found" });
  });
});
