import "server-only";
import { type Tx, withShop } from "@/db/client";
import { insertPlan, planById, plansOfSheet, supersedePlansOfJob } from "@/db/queries/plans";
import {
  instrumentForReadings,
  jobIsOfInstrument,
  listSheets,
  notesOfSheet,
  sheetById,
  technicianIsOn,
} from "@/db/queries/readings";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { AppError, invalid, notFound } from "@/lib/errors";
import { newId } from "@/lib/ids";
import { analyse } from "./analysis";
import { chosenStyle } from "./chosen-style";
import type { AnalysisQuery, AnalysisRecord, PlanInput, PlanRecord, PlanRow } from "./schema";

type Choices = Pick<PlanInput, "style" | "temperament" | "referenceHz">;

async function analysisOf(tx: Tx, actor: Actor, sheetId: string, choices: Choices) {
  const sheet = await sheetById(tx, actor.shopId, sheetId);
  if (!sheet) throw notFound("reading sheet");
  const instrument = await instrumentForReadings(tx, actor.shopId, sheet.instrumentId);
  if (!instrument) throw notFound("instrument");
  const notes = await notesOfSheet(tx, actor.shopId, sheetId);
  const style = await chosenStyle(tx, actor.shopId, choices.style, instrument);
  const { record, planned } = analyse({
    instrument,
    sheet,
    style,
    notes: notes.map(({ midi, fit }) => ({ ...fit, midi })),
    temperament: choices.temperament ?? instrument.temperament,
    referenceHz: choices.referenceHz ?? instrument.referenceHz,
  });
  return { sheet, style, record, planned };
}

export async function getAnalysis(
  actor: Actor,
  sheetId: string,
  choices: AnalysisQuery,
): Promise<AnalysisRecord> {
  authorise(actor, "plans.read");
  return withShop(actor, async (tx) => (await analysisOf(tx, actor, sheetId, choices)).record);
}

/** What to measure next, from the instrument's newest sheet, or from nothing but the prior. */
export async function getAdvice(
  actor: Actor,
  instrumentId: string,
): Promise<AnalysisRecord["advice"] & { sheetId: string }> {
  authorise(actor, "plans.read");
  return withShop(actor, async (tx) => {
    if (!(await instrumentForReadings(tx, actor.shopId, instrumentId))) throw notFound("instrument");
    const newest = (await listSheets(tx, actor.shopId, instrumentId, { most: 1, archived: "hide" })).items[0];
    if (!newest)
      throw new AppError("not-found", "This instrument has no reading sheet yet. Begin one first.");
    return { sheetId: newest.id, ...(await analysisOf(tx, actor, newest.id, {})).record.advice };
  });
}

type StoredPlan = NonNullable<Awaited<ReturnType<typeof planById>>>;

function planRowOf(row: Awaited<ReturnType<typeof plansOfSheet>>[number]): PlanRow {
  return {
    ...row,
    temperament: typeof row.temperament === "string" ? row.temperament : [...row.temperament],
    createdAt: row.createdAt.toISOString(),
    supersededAt: row.supersededAt?.toISOString() ?? null,
  };
}

function planRecordOf(row: StoredPlan): PlanRecord {
  const { firstMidi, stretchCents, bandCents, targetHz, listenPartial, listenHz, b, lnBSigma, ...head } = row;
  return {
    ...planRowOf(head),
    notes: stretchCents.map((cents, index) => ({
      midi: firstMidi + index,
      stretchCents: cents,
      bandCents: bandCents[index] ?? null,
      targetHz: targetHz[index] ?? 0,
      listenPartial: listenPartial[index] ?? 1,
      listenHz: listenHz[index] ?? 0,
      b: b[index] ?? 0,
      lnBSigma: lnBSigma[index] ?? 0,
    })),
  };
}

/** Computes the plan anew on the server and keeps it; for a job, as the job's plan in place of an earlier one. */
export async function savePlan(actor: Actor, sheetId: string, input: PlanInput): Promise<PlanRecord> {
  authorise(actor, "plans.change");
  const id = input.id ?? newId();
  return withShop(actor, async (tx) => {
    const existing = await planById(tx, actor.shopId, id);
    if (existing) {
      if (existing.sheetId === sheetId) return planRecordOf(existing);
      throw new AppError("id-in-use", "This id is taken. Send the plan with another one.");
    }
    const { sheet, style, record, planned } = await analysisOf(tx, actor, sheetId, input);
    if (actor.role === "technician" && !(await technicianIsOn(tx, actor.shopId, actor.memberId, sheet))) {
      throw new AppError(
        "forbidden",
        "This sheet belongs to a visit you are not on. You can read its plans.",
      );
    }
    const jobId = input.jobId ?? null;
    if (jobId) {
      if (!(await jobIsOfInstrument(tx, actor.shopId, jobId, sheet.instrumentId))) {
        throw invalid({ jobId: "This job is not one of this instrument's." });
      }
      await supersedePlansOfJob(tx, actor.shopId, jobId);
    }
    const made = await insertPlan(tx, actor.shopId, {
      id,
      sheetId,
      jobId,
      styleName: style.name,
      style: style.style,
      temperament: record.temperament,
      referenceHz: record.referenceHz,
      firstMidi: record.notes[0]?.midi ?? 21,
      stretchCents: record.notes.map((note) => note.stretchCents),
      bandCents: record.notes.map((note) => note.bandCents ?? 0),
      targetHz: record.notes.map((note) => note.targetHz),
      listenPartial: record.notes.map((note) => note.listenPartial),
      listenHz: record.notes.map((note) => note.listenHz),
      b: planned.keys.map((key) => key.b),
      lnBSigma: planned.keys.map((key) => key.lnBSigma),
      computationVersion: record.computationVersion,
      madeBy: actor.memberId,
    });
    const saved = await planById(tx, actor.shopId, id);
    if (!saved || (!made && saved.sheetId !== sheetId)) {
      throw new AppError("id-in-use", "This id is taken. Send the plan with another one.");
    }
    return planRecordOf(saved);
  });
}

export async function getPlan(actor: Actor, id: string): Promise<PlanRecord> {
  authorise(actor, "plans.read");
  return withShop(actor, async (tx) => {
    const row = await planById(tx, actor.shopId, id);
    if (!row) throw notFound("plan");
    return planRecordOf(row);
  });
}

export async function findPlans(actor: Actor, sheetId: string): Promise<{ items: PlanRow[]; next: null }> {
  authorise(actor, "plans.read");
  return withShop(actor, async (tx) => {
    if (!(await sheetById(tx, actor.shopId, sheetId))) throw notFound("reading sheet");
    return { items: (await plansOfSheet(tx, actor.shopId, sheetId)).map(planRowOf), next: null };
  });
}
