import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import type { Actor } from "@/lib/auth/actor";
import { addDays, type Day, dayOf } from "@/lib/dates";
import { dueQuery } from "@/lib/diary/due/schema";
import { findDue } from "@/lib/diary/due/service";
import { addSiteEvent, findSiteEvents, removeSiteEvent } from "@/lib/diary/events/service";
import { servicePlanInput } from "@/lib/diary/service-plans/schema";
import { getServicePlan, removeServicePlan, saveServicePlan } from "@/lib/diary/service-plans/service";
import { newId } from "@/lib/ids";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner as sql,
} from "../support/factories";
import { refusal } from "../support/refusal";

afterAll(async () => {
  await closeFactories();
  await closeDatabases();
});

const today = dayOf(new Date(), "Europe/Dublin");

async function scene() {
  const shop = await makeShop();
  const { shopId } = shop;
  const customerId = await makeCustomer(shopId, "Averil Conservatory");
  const siteId = await makeSite(shopId, customerId, "Ropewalk 2", { city: "Port Averil" });
  const piano = (model: string) => makeInstrument(shopId, { siteId, ownerId: customerId }, { model });
  const visit = (instrumentId: string, day: Day, state: string) =>
    makeVisit(shopId, {
      siteId,
      instrumentId,
      memberId: shop.technician.memberId,
      starts: `${day} 09:00`,
      state,
    });
  return { ...shop, customerId, siteId, piano, visit };
}

const halfYearly = (more: Record<string, unknown> = {}) =>
  servicePlanInput.parse({ version: 0, rhythm: { kind: "interval", every: 6, unit: "month" }, ...more });

const due = (actor: Actor, query: Record<string, unknown> = {}) =>
  findDue(actor, dueQuery.parse({ state: "any", ...query }));

describe("a service plan", () => {
  it("is written, read back, changed on its version and removed", async () => {
    const { office, technician, piano } = await scene();
    const id = await piano("186");
    const input = halfYearly({
      technicianId: technician.memberId,
      weekdays: [2, 4],
      hours: { from: 540, until: 720 },
    });
    const first = await saveServicePlan(office, id, input);
    expect(first).toMatchObject({
      rhythm: { kind: "interval", every: 6, unit: "month" },
      startsOn: today,
      technicianName: technician.name,
      weekdays: [2, 4],
      hours: { from: 540, until: 720 },
      version: 1,
    });
    const second = await saveServicePlan(
      office,
      id,
      halfYearly({ version: 1, rhythm: { kind: "months", months: [10, 4] } }),
    );
    expect(second).toMatchObject({ rhythm: { kind: "months", months: [4, 10] }, hours: null, version: 2 });
    const late = await refusal(saveServicePlan(office, id, halfYearly({ version: 1 })));
    expect(late).toMatchObject({ code: "stale", more: { current: { version: 2 } } });
    await removeServicePlan(office, id, 2);
    expect(await getServicePlan(office, id)).toBeNull();
  });

  it("made twice at once is one: the second is told of the first", async () => {
    const { office, owner, piano } = await scene();
    const id = await piano("186");
    const results = await Promise.allSettled([
      saveServicePlan(office, id, halfYearly()),
      saveServicePlan(owner, id, halfYearly({ rhythm: { kind: "interval", every: 1, unit: "month" } })),
    ]);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
  });

  it("refuses a technician who does not go to visits, and days on the wrong side of today", async () => {
    const { office, piano } = await scene();
    const input = halfYearly({
      technicianId: office.memberId,
      servedBefore: addDays(today, 1),
      rests: true,
      restsUntil: today,
    });
    const fault = await refusal(saveServicePlan(office, await piano("186"), input));
    expect(Object.keys(fault.more.fields ?? {}).sort()).toEqual([
      "restsUntil",
      "servedBefore",
      "technicianId",
    ]);
  });

  it("cannot lack its figures, whoever writes it", async () => {
    const { shopId, piano } = await scene();
    const id = await piano("186");
    const write = (rhythm: string, months: number[] | null) =>
      sql()`insert into service_plan (shop_id, instrument_id, rhythm, months, starts_on)
        values (${shopId}, ${id}, ${rhythm}, ${months}, ${today})`;
    await expect(write("interval", null)).rejects.toThrow("service_plan_rhythm_whole");
    await expect(write("events", null)).rejects.toThrow("service_plan_rhythm_whole");
    await expect(write("months", [])).rejects.toThrow("service_plan_rhythm_whole");
    await expect(write("months", [13])).rejects.toThrow("service_plan_rhythm_whole");
  });

  it("belongs to one shop: to another the instrument does not exist", async () => {
    const here = await scene();
    const there = await scene();
    const id = await here.piano("186");
    await saveServicePlan(here.office, id, halfYearly());
    expect(await refusal(getServicePlan(there.office, id))).toMatchObject({ code: "not-found" });
    expect(await refusal(saveServicePlan(there.office, id, halfYearly()))).toMatchObject({
      code: "not-found",
    });
    expect((await due(there.office)).items).toEqual([]);
  });
});

describe("the due list", () => {
  it("tells due, overdue, booked, declined, resting and later from plan and visits alone", async () => {
    const { office, shopId, piano, visit } = await scene();
    const planned = async (model: string, more = {}) => {
      const id = await piano(model);
      await saveServicePlan(office, id, halfYearly(more));
      return id;
    };
    await visit(await planned("later"), addDays(today, -30), "closed");
    await visit(await planned("due"), addDays(today, -180), "done");
    await visit(await planned("overdue"), addDays(today, -400), "closed");
    const booked = await planned("booked");
    await visit(booked, addDays(today, -401), "closed");
    const { visitId } = await visit(booked, addDays(today, 6), "offered");
    const declined = await planned("declined");
    await visit(declined, addDays(today, -181), "closed");
    const no = await visit(declined, addDays(today, 4), "declined");
    await sql()`insert into visit_event (shop_id, id, visit_id, from_state, to_state)
      values (${shopId}, ${newId()}, ${no.visitId}, 'offered', 'declined')`;
    await planned("resting", { rests: true });
    await planned("brought along", { servedBefore: addDays(today, -400) });

    const { items, counts } = await due(office);
    const states = Object.fromEntries(items.map(({ instrument, state }) => [instrument, state]));
    expect(states).toEqual({
      "Castellan later": "later",
      "Castellan due": "due",
      "Castellan overdue": "overdue",
      "Castellan booked": "booked",
      "Castellan declined": "declined",
      "Castellan resting": "resting",
      "Castellan brought along": "overdue",
    });
    expect(counts).toEqual({ due: 1, overdue: 2, booked: 1, declined: 1, resting: 1, later: 1 });
    expect(items.find(({ state }) => state === "booked")).toMatchObject({
      bookedOn: addDays(today, 6),
      bookedVisitId: visitId,
    });
    const toBook = await due(office, { state: "to-book" });
    expect(toBook.items.map(({ state }) => state)).toEqual(["overdue", "overdue", "due"]);
  });

  it("counts a hall's instrument as due before its next event only", async () => {
    const { office, shopId, siteId, piano } = await scene();
    await saveServicePlan(
      office,
      await piano("274"),
      halfYearly({ rhythm: { kind: "events", daysBefore: 3 } }),
    );
    expect((await due(office)).items).toMatchObject([{ state: "later", window: null }]);
    const concert = { day: addDays(today, 20), name: "Concert" };
    const { id } = await addSiteEvent(office, siteId, concert);
    await sql()`insert into site_event (shop_id, id, site_id, day, name)
      values (${shopId}, ${newId()}, ${siteId}, ${addDays(today, -5)}, 'Concert of last week')`;
    expect((await due(office)).items).toMatchObject([
      { state: "due", window: { from: addDays(today, 17), until: addDays(today, 20) } },
    ]);
    expect((await findSiteEvents(office, siteId)).items).toEqual([{ ...concert, id, siteId }]);
    await removeSiteEvent(office, siteId, id);
    expect((await due(office)).items).toMatchObject([{ state: "later", window: null }]);
  });

  it("takes an event sent twice for one, and none on a day that is over or at a site of another shop", async () => {
    const here = await scene();
    const there = await scene();
    const event = { id: newId(), day: addDays(today, 3), name: "Recital" };
    await addSiteEvent(here.office, here.siteId, event);
    await addSiteEvent(here.office, here.siteId, event);
    expect((await findSiteEvents(here.office, here.siteId)).items).toHaveLength(1);
    const over = await refusal(
      addSiteEvent(here.office, here.siteId, { ...event, id: newId(), day: addDays(today, -1) }),
    );
    expect(over.more.fields).toHaveProperty("day");
    for (const run of [
      () => addSiteEvent(there.office, here.siteId, event),
      () => removeSiteEvent(there.office, here.siteId, event.id),
      () => findSiteEvents(there.office, here.siteId),
    ]) {
      expect(await refusal(run())).toMatchObject({ code: "not-found" });
    }
  });

  it("leaves out instruments put away", async () => {
    const { office, shopId, piano } = await scene();
    const id = await piano("186");
    await saveServicePlan(office, id, halfYearly());
    await sql()`update instrument set archived_at = now() where shop_id = ${shopId} and id = ${id}`;
    expect((await due(office)).items).toEqual([]);
  });

  it("is narrowed by words, kind, technician and town, and turns its pages without loss", async () => {
    const { office, technician, piano } = await scene();
    for (let index = 0; index < 7; index += 1) {
      await saveServicePlan(
        office,
        await piano(`No ${index}`),
        halfYearly({
          servedBefore: addDays(today, -300 - index),
          ...(index < 2 ? { technicianId: technician.memberId } : {}),
        }),
      );
    }
    const seen: string[] = [];
    let cursor: string | null | undefined;
    do {
      const page = await due(office, { most: 3, ...(cursor ? { cursor } : {}) });
      seen.push(...page.items.map(({ instrument }) => instrument));
      cursor = page.next;
    } while (cursor);
    expect(seen).toEqual([6, 5, 4, 3, 2, 1, 0].map((index) => `Castellan No ${index}`));
    expect((await due(office, { q: "averil no 3" })).items).toHaveLength(1);
    expect((await due(office, { technicianId: technician.memberId })).items).toHaveLength(2);
    expect((await due(office, { city: "port averil" })).items).toHaveLength(7);
    expect((await due(office, { kind: "upright" })).items).toEqual([]);
    expect(await refusal(due(office, { cursor: "nonsense" }))).toMatchObject({ code: "invalid" });
  });
});
