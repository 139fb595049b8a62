import postgres from "postgres";
import { afterAll, describe, expect, it } from "vitest";
import { POST as createRoute, GET as listRoute } from "@/app/api/v1/visits/route";
import { closeDatabases, withShop } from "@/db/client";
import type { Actor } from "@/lib/auth/actor";
import { AppError } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { cancelVisit, moveVisit, transitionVisit } from "@/lib/visits/moves/service";
import { type NewVisit, newVisit, overlap, type VisitRecord, visitListQuery } from "@/lib/visits/schema";
import { changeVisit, createVisit, findVisits, getVisit } from "@/lib/visits/service";
import {
  closeFactories,
  makeCustomer,
  makeInstrument,
  makeMember,
  makeShop,
  makeSite,
  owner as sql,
} from "../support/factories";
import { newShop } from "../support/people";
import { refusal } from "../support/refusal";

afterAll(async () => {
  await closeFactories();
  await closeDatabases();
});

/** A shop with a site of two instruments; its clocks are the site's, so the zone is the test's to choose. */
async function scene(timeZone = "Europe/Paris") {
  const { shopId, owner, office, technician, otherTechnician } = await makeShop({ timeZone });
  const customerId = await makeCustomer(shopId, "Averil Conservatory");
  const siteId = await makeSite(shopId, customerId, "Ropewalk 2");
  await sql()`update site set time_zone = ${timeZone}, access_notes = 'Caretaker opens at 8'
    where shop_id = ${shopId} and id = ${siteId}`;
  const place = { siteId, ownerId: customerId };
  const grand = await makeInstrument(shopId, place);
  const upright = await makeInstrument(shopId, place, { model: "118" });
  return {
    shopId,
    owner,
    office,
    ines: technician,
    jonas: otherTechnician,
    customerId,
    siteId,
    grand,
    upright,
  };
}

type Scene = Awaited<ReturnType<typeof scene>>;

const summer = { start: "2026-05-14T09:00:00+02:00", end: "2026-05-14T10:30:00+02:00" };

function asked(at: Scene, more: Partial<Parameters<typeof newVisit.parse>[0] & object> = {}): NewVisit {
  return newVisit.parse({
    siteId: at.siteId,
    technicianIds: [at.ines.memberId],
    jobs: [{ instrumentId: at.grand }],
    ...summer,
    ...more,
  });
}

const step = (visit: VisitRecord, to: VisitRecord["state"], more = {}) => ({
  to,
  version: visit.version,
  confirmed: false,
  ...more,
});

describe("booking", () => {
  it("keeps wall time, place, who and the work, and shows the site's offset", async () => {
    const at = await scene();
    const made = await createVisit(
      at.office,
      asked(at, {
        jobs: [{ instrumentId: at.upright, work: "Tuning, regulation" }, { instrumentId: at.grand }],
      }),
    );
    expect(made).toMatchObject({ state: "offered", ...summer, timeZone: "Europe/Paris", version: 1 });
    expect(made.technicians).toEqual([{ id: at.ines.memberId, name: at.ines.name }]);
    expect(made.jobs.map(({ instrument, work }) => [instrument, work])).toEqual([
      ["Castellan 118", "Tuning, regulation"],
      ["Castellan 186", "Tuning"],
    ]);
    expect(made.events).toMatchObject([{ from: null, to: "offered", by: at.office.name }]);
  });

  it("refuses what overlaps and names the visit in the way, with free times of that day", async () => {
    const at = await scene();
    const first = await createVisit(at.office, asked(at));
    const error = await refusal(
      createVisit(
        at.office,
        asked(at, { start: "2026-05-14T10:00:00+02:00", end: "2026-05-14T11:00:00+02:00" }),
      ),
    );
    expect(error).toMatchObject({ code: "visit-overlap", status: 409 });
    expect(error.message).toContain(`${at.ines.name} is at Ropewalk 2 from 09:00 to 10:30`);
    const current = overlap.parse(error.more.current);
    expect(current).toMatchObject({ visitId: first.id, start: summer.start, technicianId: at.ines.memberId });
    expect(current.free[0]).toBe("10:30");
    const taken = await createVisit(
      at.office,
      asked(at, { start: "2026-05-14T10:30:00+02:00", end: "2026-05-14T11:30:00+02:00" }),
    );
    expect(taken.state).toBe("offered");
  });

  it("lets two technicians work at once, and one on two visits of one time never", async () => {
    const at = await scene();
    await createVisit(at.office, asked(at));
    await createVisit(at.office, asked(at, { technicianIds: [at.jonas.memberId] }));
    const both = await refusal(
      createVisit(
        at.office,
        asked(at, {
          technicianIds: [at.ines.memberId, at.jonas.memberId],
          start: "2026-05-14T08:00:00+02:00",
          end: "2026-05-14T09:00:00.000+02:00",
        }),
      ).then(() =>
        createVisit(
          at.office,
          asked(at, {
            technicianIds: [at.jonas.memberId, at.ines.memberId],
            start: "2026-05-14T08:30:00+02:00",
            end: "2026-05-14T08:45:00+02:00",
          }),
        ),
      ),
    );
    expect(both.code).toBe("visit-overlap");
  });

  it("books one of fifty asked at the same moment", async () => {
    const at = await scene();
    const results = await Promise.allSettled(
      Array.from({ length: 50 }, (_, index) =>
        createVisit(
          at.office,
          // Every second one asks for both technicians, in turning order: the shape that deadlocks.
          asked(at, {
            technicianIds:
              index % 4 === 0
                ? [at.ines.memberId, at.jonas.memberId]
                : index % 4 === 2
                  ? [at.jonas.memberId, at.ines.memberId]
                  : [at.ines.memberId],
          }),
        ),
      ),
    );
    expect(results.filter(({ status }) => status === "fulfilled")).toHaveLength(1);
    const codes = results.flatMap((result) =>
      result.status === "rejected" ? [result.reason instanceof AppError && result.reason.code] : [],
    );
    expect(new Set(codes)).toEqual(new Set(["visit-overlap"]));
  });

  it("is one record when the same id is sent twice, also at once", async () => {
    const at = await scene();
    const id = newId();
    const [one, two] = await Promise.all([
      createVisit(at.office, asked(at, { id })),
      createVisit(at.office, asked(at, { id })),
    ]);
    expect(two).toEqual(one);
    expect(await createVisit(at.office, asked(at, { id }))).toEqual(one);
    expect((await findVisits(at.office, visitListQuery.parse({}))).items).toHaveLength(1);
  });

  it("names each field that is wrong: site, technician, instrument, offset", async () => {
    const at = await scene();
    const elsewhere = await scene();
    const fields = async (more: object) =>
      Object.keys((await refusal(createVisit(at.office, asked(at, more)))).more.fields ?? {});
    expect(await fields({ siteId: elsewhere.siteId })).toEqual(["siteId"]);
    expect(await fields({ technicianIds: [at.ines.memberId, at.office.memberId] })).toEqual([
      "technicianIds.1",
    ]);
    expect(await fields({ jobs: [{ instrumentId: at.grand }, { instrumentId: elsewhere.grand }] })).toEqual([
      "jobs.1.instrumentId",
    ]);
    expect(await fields({ start: "2026-05-14T09:00:00Z" })).toEqual(["start"]);
    expect(await fields({ end: summer.start })).toEqual(["end"]);
  });
});

describe("days on which clocks change", () => {
  const cases = [
    {
      zone: "Europe/Paris",
      jumped: ["2026-03-29T02:30:00+01:00", "2026-03-29T04:00:00+02:00"],
      twice: ["2026-10-25T02:00:00+02:00", "2026-10-25T02:30:00+02:00"],
      second: ["2026-10-25T02:00:00+01:00", "2026-10-25T02:30:00+01:00"],
      instants: ["2026-10-25T00:00:00.000Z", "2026-10-25T01:00:00.000Z"],
    },
    {
      zone: "America/New_York",
      jumped: ["2026-03-08T02:30:00-05:00", "2026-03-08T04:00:00-04:00"],
      twice: ["2026-11-01T01:00:00-04:00", "2026-11-01T01:30:00-04:00"],
      second: ["2026-11-01T01:00:00-05:00", "2026-11-01T01:30:00-05:00"],
      instants: ["2026-11-01T05:00:00.000Z", "2026-11-01T06:00:00.000Z"],
    },
  ];

  it.each(cases)("$zone: a time jumped over is refused; of two alike the offset decides", async (day) => {
    const at = await scene(day.zone);
    const [jumpStart, jumpEnd] = day.jumped;
    const error = await refusal(createVisit(at.office, asked(at, { start: jumpStart, end: jumpEnd })));
    expect(error).toMatchObject({ status: 422, more: { fields: { start: expect.any(String) } } });

    const made: VisitRecord[] = [];
    for (const [start, end] of [day.twice, day.second]) {
      const visit = await createVisit(at.office, asked(at, { start, end }));
      expect(visit).toMatchObject({ start, end });
      made.push(visit);
    }
    const rows = await sql()<{ at: Date }[]>`select lower(during) as at from visit
      where shop_id = ${at.shopId} order by lower(during)`;
    expect(rows.map(({ at: instant }) => instant.toISOString())).toEqual(day.instants);
    expect(made[0]?.start.slice(0, 16)).toBe(made[1]?.start.slice(0, 16));
  });

  it("a visit over the night the clocks go back is as long as it is, not as long as it looks", async () => {
    const at = await scene();
    await createVisit(
      at.office,
      asked(at, { start: "2026-10-25T01:30:00+02:00", end: "2026-10-25T02:30:00+01:00" }),
    );
    const error = await refusal(
      createVisit(
        at.office,
        asked(at, { start: "2026-10-25T02:00:00+01:00", end: "2026-10-25T03:00:00+01:00" }),
      ),
    );
    expect(error.code).toBe("visit-overlap");
  });
});

describe("the life of a visit", () => {
  it("goes from offered to closed, each step with who and when", async () => {
    const at = await scene();
    let visit = await createVisit(at.office, asked(at));
    for (const to of ["confirmed", "on-the-way", "in-progress", "done", "closed"] as const) {
      visit = await transitionVisit(at.ines, visit.id, step(visit, to));
      expect(visit.state).toBe(to);
    }
    expect(visit.events.map(({ to, by }) => [to, by])).toEqual([
      ["offered", at.office.name],
      ["confirmed", at.ines.name],
      ["on-the-way", at.ines.name],
      ["in-progress", at.ines.name],
      ["done", at.ines.name],
      ["closed", at.ines.name],
    ]);
    expect(visit.moves).toEqual([]);
    expect((await getVisit(at.office, visit.id)).moves).toMatchObject([{ to: "done", back: true }]);
  });

  it("refuses a step that does not follow, one without its reason, and one from a stale version", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const early = await refusal(transitionVisit(at.office, visit.id, step(visit, "done")));
    expect(early).toMatchObject({ code: "move-not-allowed", status: 409 });
    const mute = await refusal(transitionVisit(at.office, visit.id, step(visit, "cancelled")));
    expect(mute).toMatchObject({ status: 422, more: { fields: { reason: expect.any(String) } } });
    const confirmed = await transitionVisit(at.office, visit.id, step(visit, "confirmed"));
    const late = await refusal(
      transitionVisit(at.office, visit.id, step(visit, "declined", { reason: "On holiday" })),
    );
    expect(late).toMatchObject({ code: "stale", more: { current: confirmed } });
  });

  it("cancelling frees the time, and taking it back fails when somebody has it by then", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const cancelled = await cancelVisit(at.office, visit.id, { version: 1, reason: "Flooded" });
    expect(cancelled.events.at(-1)).toMatchObject({ to: "cancelled", reason: "Flooded" });
    const back = await transitionVisit(at.office, visit.id, step(cancelled, "offered"));
    const again = await cancelVisit(at.office, visit.id, { version: back.version });
    const other = await createVisit(at.office, asked(at));
    const error = await refusal(transitionVisit(at.office, visit.id, step(again, "offered")));
    expect(error.code).toBe("visit-overlap");
    expect(overlap.parse(error.more.current).visitId).toBe(other.id);
    expect((await getVisit(at.office, visit.id)).version).toBe(again.version);
  });

  it("a moved visit lives on in a successor with its jobs and technicians, even into its own old time", async () => {
    const at = await scene();
    const made = await createVisit(
      at.office,
      asked(at, { jobs: [{ instrumentId: at.grand, work: "Pitch raise" }, { instrumentId: at.upright }] }),
    );
    const visit = await transitionVisit(at.office, made.id, step(made, "confirmed"));
    const moved = await transitionVisit(
      at.office,
      visit.id,
      step(visit, "moved", {
        reason: "Caretaker late",
        start: "2026-05-14T09:30:00+02:00",
        end: "2026-05-14T11:00:00+02:00",
      }),
    );
    expect(moved.state).toBe("moved");
    const successor = await getVisit(at.office, moved.movedToId ?? "");
    expect(successor).toMatchObject({
      state: "offered",
      start: "2026-05-14T09:30:00+02:00",
      movedFromId: visit.id,
    });
    expect(successor.technicians).toEqual(visit.technicians);
    expect(successor.jobs.map(({ instrumentId, work }) => [instrumentId, work])).toEqual([
      [at.grand, "Pitch raise"],
      [at.upright, "Tuning"],
    ]);
  });

  it("a move onto a taken time changes nothing at all", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const other = await createVisit(
      at.office,
      asked(at, { start: "2026-05-15T09:00:00+02:00", end: "2026-05-15T10:00:00+02:00" }),
    );
    const error = await refusal(
      moveVisit(at.office, visit.id, {
        confirm: true,
        version: visit.version,
        reason: "Caretaker late",
        date: "2026-05-15",
        time: "09:30",
        confirmed: false,
      }),
    );
    expect(overlap.parse(error.more.current).visitId).toBe(other.id);
    expect(await getVisit(at.office, visit.id)).toEqual(visit);
    expect((await findVisits(at.office, visitListQuery.parse({}))).items).toHaveLength(2);
  });
});

describe("correcting", () => {
  it("changes time, who and work under a version; a stale one gets the current record", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const changed = await changeVisit(at.office, visit.id, {
      version: 1,
      end: "2026-05-14T11:00:00+02:00",
      technicianIds: [at.jonas.memberId],
      jobs: [{ instrumentId: at.upright }, { instrumentId: at.grand, work: "Voicing" }],
    });
    expect(changed).toMatchObject({ version: 2, start: summer.start, end: "2026-05-14T11:00:00+02:00" });
    expect(changed.technicians.map(({ name }) => name)).toEqual([at.jonas.name]);
    expect(changed.jobs.map(({ work }) => work)).toEqual(["Tuning", "Voicing"]);
    expect(changed.jobs[1]?.id).toBe(visit.jobs[0]?.id);
    const error = await refusal(changeVisit(at.office, visit.id, { version: 1, notes: "Late" }));
    expect(error).toMatchObject({ code: "stale", status: 409, more: { current: changed } });
    await createVisit(at.office, asked(at));
  });

  it("meets the same wall against overlaps, and leaves the visit as it was", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const later = { start: "2026-05-14T11:00:00+02:00", end: "2026-05-14T12:00:00+02:00" };
    await createVisit(at.office, asked(at, later));
    const error = await refusal(changeVisit(at.office, visit.id, { version: 1, end: later.end }));
    expect(error.code).toBe("visit-overlap");
    expect(await getVisit(at.office, visit.id)).toEqual(visit);
  });

  it("keeps a job that reading sheets hang on", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    await sql()`insert into reading_sheet (id, shop_id, instrument_id, job_id, stage, taken_at, reference_hz)
      values (${newId()}, ${at.shopId}, ${at.grand}, ${visit.jobs[0]?.id ?? ""}, 'as-found', now(), 440)`;
    const error = await refusal(
      changeVisit(at.office, visit.id, { version: 1, jobs: [{ instrumentId: at.upright }] }),
    );
    expect(error).toMatchObject({ code: "conflict", status: 409 });
    const read = await getVisit(at.office, visit.id);
    expect(read.jobs[0]?.sheets).toMatchObject([{ stage: "as-found", notes: 0 }]);
  });

  it("does not retime what has begun", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at, { state: "confirmed" }));
    const begun = await transitionVisit(at.ines, visit.id, step(visit, "in-progress"));
    const error = await refusal(
      changeVisit(at.ines, visit.id, { version: begun.version, end: "2026-05-14T12:00:00+02:00" }),
    );
    expect(error.code).toBe("move-not-allowed");
  });
});

describe("whose visit it is", () => {
  it("a technician books and changes own visits, and only reads the others'", async () => {
    const at = await scene();
    const own = await createVisit(at.ines, asked(at));
    expect(own.canChange).toBe(true);
    const seen = await getVisit(at.jonas, own.id);
    expect(seen).toMatchObject({ canChange: false, moves: [] });
    const doors: ((actor: Actor) => Promise<unknown>)[] = [
      (actor) =>
        createVisit(
          actor,
          asked(at, { start: "2026-05-20T09:00:00+02:00", end: "2026-05-20T10:00:00+02:00" }),
        ),
      (actor) => changeVisit(actor, own.id, { version: 1, notes: "Mine" }),
      (actor) => transitionVisit(actor, own.id, step(own, "confirmed")),
      (actor) => cancelVisit(actor, own.id, { version: 1 }),
    ];
    for (const door of doors) expect((await refusal(door(at.jonas))).status).toBe(403);
    const away = await refusal(
      changeVisit(at.ines, own.id, { version: 1, technicianIds: [at.jonas.memberId] }),
    );
    expect(away.status).toBe(403);
  });

  it("another shop's visit does not exist", async () => {
    const at = await scene();
    const elsewhere = await scene();
    const visit = await createVisit(at.office, asked(at));
    for (const door of [
      () => getVisit(elsewhere.owner, visit.id),
      () => changeVisit(elsewhere.owner, visit.id, { version: 1, notes: "Mine" }),
      () => transitionVisit(elsewhere.owner, visit.id, step(visit, "confirmed")),
      () => cancelVisit(elsewhere.owner, visit.id, { version: 1 }),
    ]) {
      expect((await refusal(door())).status).toBe(404);
    }
    expect((await findVisits(elsewhere.owner, visitListQuery.parse({}))).items).toEqual([]);
  });

  it("a customer sees own visits without the shop's notes, and changes none", async () => {
    const at = await scene();
    const otherId = await makeCustomer(at.shopId, "Okafor-Reyes");
    const otherSite = await makeSite(at.shopId, otherId, "Saltmarket 9");
    await sql()`update site set time_zone = 'Europe/Paris' where shop_id = ${at.shopId} and id = ${otherSite}`;
    const guest = await makeMember(at.shopId, "customer", at.customerId);
    const visit = await createVisit(at.office, asked(at, { notes: "Charge double" }));
    const moved = await transitionVisit(
      at.office,
      visit.id,
      step(visit, "confirmed", { reason: "By phone" }),
    );
    const foreign = await createVisit(
      at.office,
      asked(at, { siteId: otherSite, technicianIds: [at.jonas.memberId], jobs: [] }),
    );
    const seen = await getVisit(guest, visit.id);
    expect(seen).toMatchObject({ state: "confirmed", notes: null, canChange: false, moves: [] });
    expect(seen.site.accessNotes).toBeNull();
    expect(seen.technicians.map(({ name }) => name)).toEqual([at.ines.name]);
    expect(seen.jobs.map(({ instrument }) => instrument)).toEqual(["Castellan 186"]);
    expect(JSON.stringify(seen)).not.toMatch(/Charge double|By phone|office|Caretaker/);
    expect((await findVisits(guest, visitListQuery.parse({}))).items.map(({ id }) => id)).toEqual([visit.id]);
    expect((await refusal(getVisit(guest, foreign.id))).status).toBe(404);
    expect((await refusal(transitionVisit(guest, visit.id, step(moved, "declined")))).status).toBe(403);
    const names = await withShop(guest, (tx) =>
      tx.execute(`select name from technicians_of(array['${foreign.id}']::uuid[])`),
    );
    expect([...names]).toEqual([]);
  });
});

describe("the list", () => {
  it("filters by state, technician, instrument and days, and turns pages without gap or repeat", async () => {
    const at = await scene();
    const ids: string[] = [];
    for (let hour = 8; hour < 13; hour++) {
      const two = String(hour).padStart(2, "0");
      const visit = await createVisit(
        at.office,
        asked(at, {
          start: `2026-05-14T${two}:00:00+02:00`,
          end: `2026-05-14T${two}:45:00+02:00`,
          jobs: hour === 9 ? [{ instrumentId: at.upright }] : [],
        }),
      );
      ids.push(visit.id);
    }
    await createVisit(at.office, asked(at, { technicianIds: [at.jonas.memberId] }));
    const list = (query: object) =>
      findVisits(at.office, visitListQuery.parse({ direction: "asc", ...query }));
    const seen: string[] = [];
    let cursor: string | null | undefined;
    do {
      const page = await list({ technicianId: at.ines.memberId, most: 2, ...(cursor ? { cursor } : {}) });
      seen.push(...page.items.map(({ id }) => id));
      cursor = page.next;
    } while (cursor);
    expect(seen).toEqual(ids);
    expect((await list({ instrumentId: at.upright })).items.map(({ id }) => id)).toEqual([ids[1]]);
    expect((await list({ state: "confirmed" })).items).toEqual([]);
    expect((await list({ from: "2026-05-14", to: "2026-05-14" })).items).toHaveLength(6);
    expect((await list({ from: "2026-05-15" })).items).toEqual([]);
  });
});

describe("the doors over HTTP", () => {
  it("answer 201, 409 naming the other visit, 422 by field and 401", async () => {
    const { shopId, owner, browser } = await newShop();
    await sql()`update member set bookable = true where shop_id = ${shopId} and id = ${owner.memberId}`;
    const customerId = await makeCustomer(shopId);
    const siteId = await makeSite(shopId, customerId, "Ropewalk 2");
    await sql()`update site set time_zone = 'Europe/Paris' where shop_id = ${shopId} and id = ${siteId}`;
    const send = (body: unknown, headers = browser.headers()) => {
      headers.set("content-type", "application/json");
      return createRoute(
        new Request("http://127.0.0.1:3000/api/v1/visits", {
          method: "POST",
          headers,
          body: JSON.stringify(body),
        }),
        { params: Promise.resolve({}) },
      );
    };
    const body = { siteId, technicianIds: [owner.memberId], ...summer };
    const made = await send(body);
    expect(made.status).toBe(201);
    const { id } = await made.json();
    const refused = await send(body);
    expect(refused.status).toBe(409);
    expect(await refused.json()).toMatchObject({ code: "visit-overlap", current: { visitId: id } });
    const wrong = await send({
      ...body,
      start: "2026-03-29T02:30:00+01:00",
      end: "2026-03-29T03:30:00+02:00",
    });
    expect(wrong.status).toBe(422);
    expect(await wrong.json()).toMatchObject({ errors: [{ path: "start" }] });
    expect((await send(body, new Headers())).status).toBe(401);
    const list = await listRoute(
      new Request("http://127.0.0.1:3000/api/v1/visits?state=offered&from=", { headers: browser.headers() }),
      { params: Promise.resolve({}) },
    );
    expect(await list.json()).toMatchObject({ items: [{ id, siteName: "Ropewalk 2" }], next: null });
  });
});

describe("the database itself, as the role of the app", () => {
  it("refuses an overlap, a time that does not exist and a false range, whatever is written", async () => {
    const at = await scene();
    const app = postgres(process.env.APP_DATABASE_URL ?? "", { max: 1, onnotice: () => {} });
    const insert = (id: string, start: string, end: string) =>
      app.begin(async (tx) => {
        await tx`select set_config('app.shop_id', ${at.shopId}, true)`;
        await tx`insert into visit (id, shop_id, site_id, customer_id, starts_local, ends_local, time_zone, during)
          values (${id}, ${at.shopId}, ${at.siteId}, ${at.customerId}, ${start}, ${end}, 'Europe/Paris', '[2020-01-01,2020-01-02)')`;
        await tx`insert into visit_technician (shop_id, visit_id, member_id, during, live)
          values (${at.shopId}, ${id}, ${at.ines.memberId}, 'empty', false)`;
        const [row] = await tx<
          { during: string }[]
        >`select during from visit_technician where visit_id = ${id}`;
        return row?.during;
      });
    try {
      expect(await insert(newId(), "2026-05-14 09:00", "2026-05-14 10:00")).toContain(
        "2026-05-14 07:00:00+00",
      );
      await expect(insert(newId(), "2026-05-14 09:59", "2026-05-14 11:00")).rejects.toMatchObject({
        code: "23P01",
        constraint_name: "visit_overlap",
      });
      await expect(insert(newId(), "2026-03-29 02:30", "2026-03-29 04:00")).rejects.toMatchObject({
        code: "23514",
        constraint_name: "visit_time_exists",
      });
      await expect(insert(newId(), "2026-05-16 09:00", "2026-05-16 09:00")).rejects.toMatchObject({
        code: "23514",
      });
    } finally {
      await app.end({ timeout: 5 });
    }
  });

  it("keeps the history of a visit: no change, no deletion", async () => {
    const at = await scene();
    const visit = await createVisit(at.office, asked(at));
    const touched = await withShop(at.owner, async (tx) => {
      const changed = await tx.execute("update visit_event set reason = 'invented' returning id");
      const gone = await tx.execute("delete from visit_event returning id");
      return [...changed, ...gone];
    });
    expect(touched).toEqual([]);
    expect((await getVisit(at.office, visit.id)).events).toHaveLength(1);
  });
});
