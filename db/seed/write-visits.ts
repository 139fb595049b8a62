import type { Handle } from "@/db/client";
import { job, noteReading, readingSheet, stretchPlan, visit, visitEvent, visitTechnician } from "@/db/schema";
import { fit } from "@/lib/acoustics";
import type { Style } from "@/lib/acoustics/types";
import { COMPUTATION_VERSION } from "@/lib/acoustics/version";
import { analyse } from "@/lib/plans/analysis";
import { fitInputOf } from "@/lib/readings/rules";
import { addMinutes, timeOfMinute, withOffset } from "@/lib/wall-time";
import type { SeedVisit, VisitState } from "./calendar";
import type { Chance } from "./random";
import type { SeedInstrument } from "./scenario";
import { instrumentStory, type SeedJob, type SeedSheet } from "./story";
import type { PlaceIds } from "./write-places";

const referenceHz = 440;
const rowsAtOnce = 400;

type Rows = {
  visits: (typeof visit.$inferInsert)[];
  technicians: (typeof visitTechnician.$inferInsert)[];
  events: (typeof visitEvent.$inferInsert)[];
  jobs: (typeof job.$inferInsert)[];
  sheets: (typeof readingSheet.$inferInsert)[];
  notes: (typeof noteReading.$inferInsert)[];
  plans: (typeof stretchPlan.$inferInsert)[];
};

type NamedStyle = { ref: string; name: string; style: Style };

/** The way to each state, as the visit's history tells it. */
const roads: Record<VisitState, readonly VisitState[]> = {
  offered: ["offered"],
  confirmed: ["offered", "confirmed"],
  "on-the-way": ["offered", "confirmed", "on-the-way"],
  "in-progress": ["offered", "confirmed", "on-the-way", "in-progress"],
  done: ["offered", "confirmed", "on-the-way", "in-progress", "done"],
  closed: ["offered", "confirmed", "on-the-way", "in-progress", "done", "closed"],
  declined: ["offered", "declined"],
  cancelled: ["offered", "confirmed", "cancelled"],
  missed: ["offered", "confirmed", "missed"],
};

const reasons: Partial<Record<VisitState, string>> = {
  declined: "Travelling until spring; ask again in March.",
  cancelled: "The room is being painted.",
  missed: "Nobody at home.",
};

/** Visits with their jobs, sheets, fits and plans, every number of them computed by the product's own code. */
export async function writeVisits(
  db: Handle,
  chance: Chance,
  shop: { id: string; timeZone: string },
  visits: readonly SeedVisit[],
  ids: PlaceIds,
  people: { technicians: readonly string[]; office: string },
  style: NamedStyle,
): Promise<void> {
  const rows: Rows = { visits: [], technicians: [], events: [], jobs: [], sheets: [], notes: [], plans: [] };
  const stories = new Map<string, ReturnType<typeof instrumentStory>>();
  const newest = newestReadVisit(visits);

  for (const planned of visits) {
    const startsLocal = `${planned.day}T${timeOfMinute(planned.startMinute)}`;
    const startsAt = new Date(withOffset(startsLocal, shop.timeZone, 0));
    const id = chance.id(startsAt);
    const technician = people.technicians[planned.technician] ?? people.office;
    const shopId = shop.id;
    rows.visits.push({
      shopId,
      id,
      siteId: required(ids.sites, planned.customer.key),
      customerId: required(ids.customers, planned.customer.key),
      state: planned.state,
      startsLocal,
      endsLocal: addMinutes(startsLocal, planned.minutes),
      timeZone: shop.timeZone,
      createdAt: startsAt,
      updatedAt: startsAt,
    });
    rows.technicians.push({ shopId, visitId: id, memberId: technician });
    rows.events.push(...history(chance, shopId, id, planned, startsAt, technician, people.office));

    planned.instruments.forEach((piano, position) => {
      const jobId = chance.id(startsAt);
      const told = wasThere(planned.state)
        ? storyOf(stories, chance, piano)(startsAt, planned.state === "closed")
        : null;
      rows.jobs.push({
        shopId,
        id: jobId,
        visitId: id,
        instrumentId: required(ids.instruments, piano.key),
        work: told?.work ?? "Tuning",
        remarks: told?.remarks ?? null,
        position,
        createdAt: startsAt,
        updatedAt: startsAt,
      });
      if (told) {
        const keepPlan = piano.detailed && newest.get(piano.key) === planned;
        writeSheets(rows, chance, shopId, jobId, piano, told, ids, technician, keepPlan ? style : null);
      }
    });
  }
  await insertAll(db, rows);
}

function required(map: Map<string, string>, key: string): string {
  const id = map.get(key);
  if (!id) throw new Error(`No id for ${key}`);
  return id;
}

function wasThere(state: VisitState): boolean {
  return state === "closed" || state === "done" || state === "in-progress";
}

function storyOf(
  stories: Map<string, ReturnType<typeof instrumentStory>>,
  chance: Chance,
  piano: SeedInstrument,
) {
  const story = stories.get(piano.key) ?? instrumentStory(chance, piano, referenceHz);
  stories.set(piano.key, story);
  return story;
}

function newestReadVisit(visits: readonly SeedVisit[]): Map<string, SeedVisit> {
  const newest = new Map<string, SeedVisit>();
  for (const planned of visits) {
    if (!wasThere(planned.state)) continue;
    for (const { key } of planned.instruments) newest.set(key, planned);
  }
  return newest;
}

function history(
  chance: Chance,
  shopId: string,
  visitId: string,
  planned: SeedVisit,
  startsAt: Date,
  technician: string,
  office: string,
): Rows["events"] {
  const road = roads[planned.state];
  const day = 86_400_000;
  return road.map((toState, index) => {
    const inField = index >= 2 && toState !== "cancelled" && toState !== "missed";
    const at = inField
      ? new Date(startsAt.getTime() + (index - 3) * 40 * 60_000)
      : new Date(startsAt.getTime() - (21 - 8 * index) * day);
    return {
      shopId,
      id: chance.id(at),
      visitId,
      fromState: road[index - 1] ?? null,
      toState,
      byMemberId: inField ? technician : office,
      reason: reasons[toState] ?? null,
      at,
    };
  });
}

function writeSheets(
  rows: Rows,
  chance: Chance,
  shopId: string,
  jobId: string,
  piano: SeedInstrument,
  told: SeedJob,
  ids: PlaceIds,
  technician: string,
  planStyle: NamedStyle | null,
): void {
  const instrumentId = required(ids.instruments, piano.key);
  told.sheets.forEach((sheet, index) => {
    const sheetId = chance.id(sheet.takenAt);
    rows.sheets.push({
      shopId,
      id: sheetId,
      instrumentId,
      jobId,
      stage: sheet.stage,
      takenAt: sheet.takenAt,
      takenBy: technician,
      referenceHz,
      humidityPercent: sheet.humidityPercent,
      temperatureC: sheet.temperatureC,
      createdAt: sheet.takenAt,
      updatedAt: sheet.takenAt,
    });
    const notes = sheet.notes.map((note) => fittedNote(chance, shopId, sheetId, sheet, note, technician));
    rows.notes.push(...notes);
    if (index === 0 && planStyle) {
      rows.plans.push(
        planOf(chance, shopId, sheetId, jobId, instrumentId, piano, sheet, notes, technician, planStyle),
      );
    }
  });
}

function fittedNote(
  chance: Chance,
  shopId: string,
  sheetId: string,
  sheet: SeedSheet,
  { midi, readings }: SeedSheet["notes"][number],
  technician: string,
): Rows["notes"][number] {
  const values = {
    partials: readings.map(({ partial }) => partial),
    hz: readings.map(({ hz }) => hz),
    sigmaCents: readings.map(() => null),
    kept: [],
    dropped: [],
  };
  const fitted = fit(fitInputOf({ ...values, midi, referenceHz }));
  return {
    ...values,
    shopId,
    id: chance.id(sheet.takenAt),
    sheetId,
    midi,
    string: 0,
    take: 1,
    f1Hz: fitted.f1Hz,
    b: fitted.b,
    bSigma: fitted.bSigma,
    fit: fitted,
    fitVersion: COMPUTATION_VERSION,
    takenBy: technician,
    createdAt: sheet.takenAt,
    updatedAt: sheet.takenAt,
  };
}

function planOf(
  chance: Chance,
  shopId: string,
  sheetId: string,
  jobId: string,
  instrumentId: string,
  piano: SeedInstrument,
  sheet: SeedSheet,
  notes: Rows["notes"],
  technician: string,
  style: NamedStyle,
): Rows["plans"][number] {
  const { record } = analyse({
    instrument: { ...piano, id: instrumentId },
    sheet: { id: sheetId, referenceHz },
    notes: notes.map(({ midi, fit: fitted }) => ({ ...fitted, midi })),
    style,
    temperament: "equal",
    referenceHz,
  });
  const at = new Date(sheet.takenAt.getTime() + 15 * 60_000);
  return {
    shopId,
    id: chance.id(at),
    sheetId,
    jobId,
    styleName: style.name,
    style: style.style,
    temperament: "equal",
    referenceHz,
    firstMidi: piano.firstMidi,
    stretchCents: record.notes.map((note) => note.stretchCents),
    bandCents: record.notes.map((note) => note.bandCents ?? 0),
    targetHz: record.notes.map((note) => note.targetHz),
    listenPartial: record.notes.map((note) => note.listenPartial),
    listenHz: record.notes.map((note) => note.listenHz),
    b: record.keys.map((key) => key.b),
    lnBSigma: record.keys.map((key) => key.lnBSigma),
    computationVersion: COMPUTATION_VERSION,
    madeBy: technician,
    createdAt: at,
    updatedAt: at,
  };
}

async function insertAll(db: Handle, rows: Rows): Promise<void> {
  for (const part of parts(rows.visits)) await db.insert(visit).values(part);
  for (const part of parts(rows.technicians)) await db.insert(visitTechnician).values(part);
  for (const part of parts(rows.events)) await db.insert(visitEvent).values(part);
  for (const part of parts(rows.jobs)) await db.insert(job).values(part);
  for (const part of parts(rows.sheets)) await db.insert(readingSheet).values(part);
  for (const part of parts(rows.notes)) await db.insert(noteReading).values(part);
  for (const part of parts(rows.plans)) await db.insert(stretchPlan).values(part);
}

function parts<Row>(rows: readonly Row[]): Row[][] {
  return Array.from({ length: Math.ceil(rows.length / rowsAtOnce) }, (_, index) =>
    rows.slice(index * rowsAtOnce, (index + 1) * rowsAtOnce),
  );
}
