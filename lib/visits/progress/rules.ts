import { keyboard } from "@/lib/acoustics";
import type { KeyEstimate, Quality, Temperament } from "@/lib/acoustics/types";
import {
  type FittedNote,
  type KeyRange,
  keyboardInput,
  observationsOf,
  pitchOf,
  pitchOffset,
} from "@/lib/readings/rules";
import type { Stage } from "@/lib/readings/schema";

export type SheetFacts = {
  id: string;
  stage: Stage;
  takenAt: string;
  referenceHz: number;
  humidityPercent: number | null;
  temperatureC: number | null;
};

export type NoteFacts = FittedNote & { sheetId: string; string: number; quality: Quality };

export type KeptPlan = {
  sheetId: string;
  styleName: string;
  temperament: Temperament;
  referenceHz: number;
  createdAt: string;
};

/** Where an instrument stood, and in what air. */
export type Standing = {
  sheetId: string;
  takenAt: string;
  notes: number;
  referenceHz: number;
  a4Cents: number | null;
  /** Of the instrument as a whole; null where nothing was read. */
  pitchCents: number | null;
  humidityPercent: number | null;
  temperatureC: number | null;
};

export type NoteCount = { notes: number; good: number; usable: number; repeat: number };

export type Readings = NoteCount & { sheetId: string; takenAt: string };

export type Progress = {
  found: Standing | null;
  raised: Standing | null;
  /** The fullest sheet of the job: B and the plan rest on it. */
  readings: Readings | null;
  plan: KeptPlan | null;
  left: Standing | null;
  /** Sheets none of the above tells of. */
  otherSheets: (Pick<SheetFacts, "id" | "stage" | "takenAt"> & { notes: number })[];
};

/** Sheets as they were taken, oldest first. */
export function progressOf(
  sheets: readonly SheetFacts[],
  notes: readonly NoteFacts[],
  plan: KeptPlan | null,
): Progress {
  const told = sheets.map((sheet) => {
    const own = notes.filter(({ sheetId }) => sheetId === sheet.id);
    return { sheet, standing: standingOf(sheet, own), count: countOf(own) };
  });
  const at = (stage: Stage) => told.filter(({ sheet }) => sheet.stage === stage);
  const read = ({ count }: (typeof told)[number]) => count.notes > 0;
  // As the history tells it: the first as found, the last as left.
  const found = at("as-found").find(read) ?? at("as-found")[0];
  const raised = at("after-raise").findLast(read) ?? at("after-raise").at(-1);
  const left = at("as-left").findLast(read) ?? at("as-left").at(-1);
  const fullest = told.filter(read).sort((one, other) => other.count.notes - one.count.notes)[0];
  const named = new Set([found, raised, left, fullest].map((one) => one?.sheet.id));
  return {
    found: found?.standing ?? null,
    raised: raised?.standing ?? null,
    readings: fullest
      ? { sheetId: fullest.sheet.id, takenAt: fullest.sheet.takenAt, ...fullest.count }
      : null,
    plan,
    left: left?.standing ?? null,
    otherSheets: told
      .filter(({ sheet }) => !named.has(sheet.id))
      .map(({ sheet: { id, stage, takenAt }, count }) => ({ id, stage, takenAt, notes: count.notes })),
  };
}

function standingOf(sheet: SheetFacts, notes: readonly NoteFacts[]): Standing {
  const pitch = pitchOf(notes, sheet.referenceHz);
  return {
    sheetId: sheet.id,
    takenAt: sheet.takenAt,
    notes: pitch.length,
    referenceHz: sheet.referenceHz,
    a4Cents: pitch.find(({ midi }) => midi === 69)?.cents ?? null,
    pitchCents: pitchOffset(pitch),
    humidityPercent: sheet.humidityPercent,
    temperatureC: sheet.temperatureC,
  };
}

const qualities: readonly Quality[] = ["good", "usable", "repeat"];

/** Notes, not rows: a string counts by the best of its takes, a note by the worst of its strings. */
export function countOf(notes: readonly Pick<NoteFacts, "midi" | "string" | "quality">[]): NoteCount {
  const strings = new Map<number, Map<number, number>>();
  for (const { midi, string, quality } of notes) {
    const ofNote = strings.get(midi) ?? new Map<number, number>();
    ofNote.set(string, Math.min(ofNote.get(string) ?? Number.POSITIVE_INFINITY, qualities.indexOf(quality)));
    strings.set(midi, ofNote);
  }
  const worst = [...strings.values()].map((ofNote) => qualities[Math.max(...ofNote.values())]);
  const count = (quality: Quality) => worst.filter((one) => one === quality).length;
  return { notes: strings.size, good: count("good"), usable: count("usable"), repeat: count("repeat") };
}

export type Stranger = Omit<KeyEstimate, "residualCents">;

/** Notes whose B does not belong to its neighbours', the strangest first. */
export function strangersAmong(notes: readonly FittedNote[], range: KeyRange): Stranger[] {
  const observations = observationsOf(notes);
  if (observations.length === 0) return [];
  const { keys } = keyboard(keyboardInput(observations, range));
  return keys
    .filter(({ flag }) => flag !== null)
    .map(({ residualCents: _, ...key }) => key)
    .sort((one, other) => Math.abs(other.z ?? 0) - Math.abs(one.z ?? 0));
}

export function isRead(standing: Standing | null): standing is Standing {
  return standing !== null && standing.notes > 0;
}

export type Step = "found" | "look" | "plan" | "left";

/** What comes next on a job; nothing once it is read as left. */
export function stepAfter(
  { found, plan, left }: Pick<Progress, "found" | "plan" | "left">,
  strangers: readonly unknown[],
): Step | null {
  if (isRead(left)) return null;
  if (!isRead(found)) return "found";
  if (strangers.length > 0) return "look";
  return plan ? "left" : "plan";
}

/** The job to open: the one asked for, else the first not yet read as left, else the first. */
export function jobToOpen<Job extends { id: string; progress: Pick<Progress, "left"> }>(
  jobs: readonly Job[],
  asked?: string,
): Job | undefined {
  return (
    jobs.find(({ id }) => id === asked) ?? jobs.find(({ progress }) => !isRead(progress.left)) ?? jobs[0]
  );
}

/** Common practice, no source: flatter than this, pitch is raised before it is tuned. */
const flatEnoughToRaise = -20;

/** By A4 or by the instrument as a whole, whichever was found flatter. */
export function isFarFlat(found: Pick<Standing, "a4Cents" | "pitchCents"> | null): boolean {
  return Math.min(found?.a4Cents ?? 0, found?.pitchCents ?? 0) < flatEnoughToRaise;
}
