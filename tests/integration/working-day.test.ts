import { afterAll, describe, expect, it } from "vitest";
import { closeDatabases } from "@/db/client";
import { addDays } from "@/lib/dates";
import { newId } from "@/lib/ids";
import { correctionChoices, planVisit } from "@/lib/visits/booking/service";
import { workDay } from "@/lib/visits/day/service";
import { cancelVisit, moveVisit } from "@/lib/visits/moves/service";
import { firstStep } from "@/lib/visits/rules";
import { visitMovePlan, visitPlan } from "@/lib/visits/schema";
import { createVisit, getVisit } from "@/lib/visits/service";
import { closeFactories, makeCustomer, makeInstrument, makeShop, makeSite } from "../support/factories";

afterAll(async () => {
  await closeFactories();
  await closeDatabases();
});

async function scene() {
  const shop = await makeShop();
  const customerId = await makeCustomer(shop.shopId);
  const siteId = await makeSite(shop.shopId, customerId);
  const instrumentId = await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
  const { today } = await workDay(shop.office);
  const book = (who: typeof shop.technician, date: string, time: string, state = "confirmed") =>
    planVisit(
      shop.office,
      visitPlan.parse({
        siteId,
        technicianIds: [who.memberId],
        date,
        time,
        minutes: 60,
        state,
        jobs: [{ instrumentId }],
        confirm: true,
      }),
    );
  return { ...shop, siteId, instrumentId, today, book };
}

describe("a working day", () => {
  it("is a technician's own, in order of time; the office sees everybody's", async () => {
    const at = await scene();
    const later = await at.book(at.technician, at.today, "14:00");
    const early = await at.book(at.technician, at.today, "09:00");
    const other = await at.book(at.otherTechnician, at.today, "10:00");
    await at.book(at.technician, addDays(at.today, 2), "09:00");
    await at.book(at.technician, addDays(at.today, 2), "11:00", "offered");

    const own = await workDay(at.technician);
    expect(own.reach).toBe("own");
    expect(own.visits.map(({ id }) => id)).toEqual([early.id, later.id]);
    expect(own.next).toEqual({ day: addDays(at.today, 2), visits: 2 });
    expect(own.unanswered).toEqual([]);

    const all = await workDay(at.office);
    expect(all.visits.map(({ id }) => id)).toEqual([early.id, other.id, later.id]);
    expect(all.unanswered).toHaveLength(1);
  });

  it("keeps the cancelled in sight, and leaves out what moved to another day", async () => {
    const at = await scene();
    const cancelled = await at.book(at.technician, at.today, "09:00");
    await cancelVisit(at.office, cancelled.id, { version: 1, reason: "Flooded" });
    const moved = await at.book(at.technician, at.today, "11:00");
    const day = addDays(at.today, 1);
    await moveVisit(at.office, moved.id, {
      version: 1,
      reason: "Caretaker away",
      date: day,
      time: "11:00",
      confirmed: false,
    });
    const today = await workDay(at.technician);
    expect(today.visits.map(({ id, state }) => [id, state])).toEqual([[cancelled.id, "cancelled"]]);
    expect((await workDay(at.technician, day)).visits).toHaveLength(1);
  });

  it("begins an empty book with a step that works: customer, site, instrument, and then nothing more", async () => {
    const shop = await makeShop();
    const step = async () => {
      const { beginning } = await workDay(shop.office);
      return beginning && firstStep(beginning);
    };
    expect(await step()).toBe("customer");
    const customerId = await makeCustomer(shop.shopId);
    expect(await step()).toBe("site");
    const siteId = await makeSite(shop.shopId, customerId);
    expect(await step()).toBe("instrument");
    expect((await workDay(shop.technician)).beginning).toEqual({ customerId, siteId, instruments: false });
    await makeInstrument(shop.shopId, { siteId, ownerId: customerId });
    expect(await step()).toBeNull();
  });

  it("names visits of past days that nobody has closed", async () => {
    const at = await scene();
    const open = await at.book(at.technician, addDays(at.today, -3), "09:00");
    await at.book(at.otherTechnician, addDays(at.today, -3), "09:00");
    expect((await workDay(at.technician)).leftOpen.map(({ id }) => id)).toEqual([open.id]);
    expect((await workDay(at.office)).leftOpen).toHaveLength(2);
  });
});

describe("booking by the site's clock", () => {
  it("says at the time's own field that clocks jump over it", async () => {
    const at = await scene();
    // Europe/Dublin, 29 March 2026, 01:00 to 02:00.
    await expect(at.book(at.technician, "2026-03-29", "01:30")).rejects.toMatchObject({
      code: "invalid",
      more: { fields: { time: expect.stringContaining("jump over") } },
    });
  });

  it("asks once about a start in the past, and takes it when it is confirmed", async () => {
    const at = await scene();
    const plan = {
      id: newId(),
      siteId: at.siteId,
      technicianIds: [at.technician.memberId],
      date: addDays(at.today, -3),
      time: "09:00",
      minutes: 60,
    };
    await expect(planVisit(at.office, visitPlan.parse(plan))).rejects.toMatchObject({
      code: "needs-confirming",
      status: 409,
      message: "This is 3 days ago.",
    });
    await expect(getVisit(at.office, plan.id)).rejects.toMatchObject({ code: "not-found" });
    const booked = await planVisit(at.office, visitPlan.parse({ ...plan, confirm: true }));
    expect(booked.start.slice(0, 10)).toBe(plan.date);

    const move = { version: 1, reason: "Was earlier", date: addDays(at.today, -5), time: "09:00" };
    await expect(moveVisit(at.office, plan.id, visitMovePlan.parse(move))).rejects.toMatchObject({
      code: "needs-confirming",
    });
    const moved = await moveVisit(at.office, plan.id, visitMovePlan.parse({ ...move, confirm: true }));
    expect(moved.state).toBe("moved");
    // A program that names the instant means it.
    const { id } = await createVisit(at.office, {
      siteId: at.siteId,
      technicianIds: [at.otherTechnician.memberId],
      start: "2026-05-14T09:00:00+01:00",
      end: "2026-05-14T10:00:00+01:00",
      jobs: [],
      state: "confirmed",
    });
    expect(id).toBeTruthy();
  });

  it("offers for correction what is on the visit and what stands at the site", async () => {
    const at = await scene();
    const visit = await at.book(at.technician, at.today, "09:00");
    const choices = await correctionChoices(at.office, visit.id);
    expect(choices.instruments.map(({ id }) => id)).toEqual([at.instrumentId]);
    expect(choices.technicians.map(({ id }) => id).sort()).toEqual(
      [at.technician.memberId, at.otherTechnician.memberId].sort(),
    );
  });
});
