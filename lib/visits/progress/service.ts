import "server-only";
import { type Tx, withShop } from "@/db/client";
import { fittedNotesOf, keptPlansOf, sheetsWithClimate } from "@/db/queries/visit-progress";
import { may } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import type { HistoryEntry } from "@/lib/instruments/history/rules";
import { historyWithin } from "@/lib/instruments/history/service";
import { readInstrument } from "@/lib/instruments/service";
import type { VisitJob, VisitRecord } from "../schema";
import { readVisit } from "../service";
import {
  jobToOpen,
  type KeptPlan,
  type NoteFacts,
  type Progress,
  progressOf,
  type Step,
  type Stranger,
  stepAfter,
  strangersAmong,
} from "./rules";

export type JobProgress = Omit<VisitJob, "sheets" | "remarks"> & { progress: Progress };

/** What is told of one job only: it takes a computation and the instrument's whole history. */
export type OpenedJob = {
  jobId: string;
  strangers: Stranger[];
  /** What this person does next; null where the visit is not under way or not theirs to write. */
  next: Step | null;
  history: HistoryEntry[];
  standingNote: string | null;
};

export type VisitWork = {
  visit: VisitRecord;
  jobs: JobProgress[];
  opened: OpenedJob | null;
  /** Whether this person may take readings on this visit. */
  canRecord: boolean;
};

/** A visit with how far the work on each of its instruments is, one of them opened. */
export async function getVisitWork(actor: Actor, visitId: string, openJobId?: string): Promise<VisitWork> {
  authorise(actor, "visits.read");
  authorise(actor, "sheets.read");
  authorise(actor, "plans.read");
  return withShop(actor, async (tx) => {
    const visit = await readVisit(tx, actor, visitId);
    const canRecord = visit.canChange && may(actor.role, "sheets.change") && visit.state !== "moved";
    const { jobs, notes } = await progressOfJobs(tx, actor, visit.jobs);
    const job = jobToOpen(jobs, openJobId);
    const goesOn = canRecord && visit.state === "in-progress";
    return { visit, jobs, canRecord, opened: job ? await openJob(tx, actor, job, notes, goesOn) : null };
  });
}

async function progressOfJobs(tx: Tx, actor: Actor, jobs: readonly VisitJob[]) {
  const jobIds = jobs.map(({ id }) => id);
  const sheets = (await sheetsWithClimate(tx, actor.shopId, jobIds)).map((sheet) => ({
    ...sheet,
    takenAt: sheet.takenAt.toISOString(),
  }));
  const notes: NoteFacts[] = await fittedNotesOf(
    tx,
    actor.shopId,
    sheets.map(({ id }) => id),
  );
  const plans = new Map<string | null, KeptPlan>(
    (await keptPlansOf(tx, actor.shopId, jobIds)).map(({ jobId, createdAt, ...plan }) => [
      jobId,
      { ...plan, createdAt: createdAt.toISOString() },
    ]),
  );
  return {
    notes,
    jobs: jobs.map(({ id, instrumentId, instrument, room, work }): JobProgress => {
      const own = sheets.filter(({ jobId }) => jobId === id);
      return {
        id,
        instrumentId,
        instrument,
        room,
        work,
        progress: progressOf(own, notes, plans.get(id) ?? null),
      };
    }),
  };
}

async function openJob(
  tx: Tx,
  actor: Actor,
  { id, instrumentId, progress }: JobProgress,
  notes: readonly NoteFacts[],
  goesOn: boolean,
): Promise<OpenedJob> {
  const instrument = await readInstrument(tx, actor, instrumentId);
  const strangers = strangersAmong(
    notes.filter(({ sheetId }) => sheetId === progress.readings?.sheetId),
    instrument,
  );
  return {
    jobId: id,
    strangers,
    next: goesOn ? stepAfter(progress, strangers) : null,
    history: await historyWithin(tx, actor, instrumentId),
    standingNote: instrument.standingNote,
  };
}
