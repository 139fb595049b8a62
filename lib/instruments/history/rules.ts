import { type Day, dayOf } from "@/lib/dates";
import type { VisitState } from "@/lib/visits/rules";

export type HistorySheetFacts = {
  id: string;
  stage: "as-found" | "after-raise" | "as-left";
  takenAt: string;
  jobId: string | null;
  humidityPercent: number | null;
  /** How far the instrument stood from its reference, cents; null where nothing was read. */
  cents: number | null;
};

export type HistoryJobFacts = {
  jobId: string;
  visitId: string;
  startsLocal: string;
  state: VisitState;
  work: string;
};

/** One day with the instrument: what was done, where it stood before and after. */
export type HistoryEntry = {
  id: string;
  day: Day;
  work: string;
  visitId: string | null;
  asFoundCents: number | null;
  asLeftCents: number | null;
  humidityPercent: number | null;
};

const worked: ReadonlySet<VisitState> = new Set(["in-progress", "done", "closed"]);

/**
 * Sheets and jobs told as one story, newest first: a job with its sheets is one entry, so is a day of sheets
 * without a job. Jobs of visits that have not begun, or came to nothing, are no history.
 */
export function historyOf(
  sheets: readonly HistorySheetFacts[],
  jobs: readonly HistoryJobFacts[],
  timeZone: string,
): HistoryEntry[] {
  const entries = new Map<string, HistoryEntry>();
  const jobById = new Map(jobs.map((job) => [job.jobId, job]));
  for (const job of jobs) {
    if (worked.has(job.state)) entries.set(job.jobId, entryOf(job.jobId, job.startsLocal.slice(0, 10), job));
  }
  const inOrder = [...sheets].sort((one, other) => one.takenAt.localeCompare(other.takenAt));
  for (const sheet of inOrder) {
    const day = dayOf(sheet.takenAt, timeZone);
    const key = sheet.jobId ?? day;
    const entry = entries.get(key) ?? entryOf(key, day, sheet.jobId ? jobById.get(sheet.jobId) : undefined);
    entries.set(key, withSheet(entry, sheet));
  }
  return [...entries.values()].sort(
    (one, other) => other.day.localeCompare(one.day) || other.id.localeCompare(one.id),
  );
}

function entryOf(id: string, day: Day, job: HistoryJobFacts | undefined): HistoryEntry {
  return {
    id,
    day,
    work: job?.work ?? "Readings",
    visitId: job?.visitId ?? null,
    asFoundCents: null,
    asLeftCents: null,
    humidityPercent: null,
  };
}

/** The first sheet as found and the last as left count; a pitch raise in between is neither. */
function withSheet(entry: HistoryEntry, sheet: HistorySheetFacts): HistoryEntry {
  return {
    ...entry,
    asFoundCents: sheet.stage === "as-found" ? (entry.asFoundCents ?? sheet.cents) : entry.asFoundCents,
    asLeftCents: sheet.stage === "as-left" ? (sheet.cents ?? entry.asLeftCents) : entry.asLeftCents,
    humidityPercent: entry.humidityPercent ?? sheet.humidityPercent,
  };
}
