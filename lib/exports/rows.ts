import { keyName } from "@/lib/acoustics";
import type { PlanRecord } from "@/lib/plans/schema";
import { readingCents } from "@/lib/readings/rules";
import type { SheetRecord } from "@/lib/readings/schema";

/*
 * Names are those of the API and of the command line (Low and High are the ends, Band the half-width at 95 %), in
 * CSV as in JSON: one thing has one name wherever it is met.
 */

type Cell = string | number | boolean | null;

export const readingColumns = [
  "midi",
  "note",
  "string",
  "take",
  "partial",
  "hz",
  "cents",
  "referenceHz",
  "sigmaCents",
  "residualCents",
  "used",
  "leftOutBecause",
] as const;

/** One row a reading. `cents` are from the nth harmonic of the equal-tempered note at the sheet's reference. */
export function readingRows(sheet: SheetRecord): Record<(typeof readingColumns)[number], Cell>[] {
  return sheet.notes.flatMap((note) =>
    note.readings.map(({ partial, hz, sigmaCents }) => ({
      midi: note.midi,
      note: keyName(note.midi),
      string: note.string,
      take: note.take,
      partial,
      hz,
      cents: readingCents(partial, hz, note.midi, sheet.referenceHz),
      referenceHz: sheet.referenceHz,
      sigmaCents: sigmaCents,
      residualCents: note.residuals.find((residual) => residual.partial === partial)?.cents ?? null,
      used: note.used.includes(partial),
      leftOutBecause: note.rejected.find((rejection) => rejection.partial === partial)?.reason ?? null,
    })),
  );
}

export const fitColumns = [
  "midi",
  "note",
  "string",
  "take",
  "f1Hz",
  "f1SigmaCents",
  "b",
  "bSigma",
  "bLow",
  "bHigh",
  "rmsCents",
  "partialsUsed",
  "nMax",
  "quality",
] as const;

export function fitRows(sheet: SheetRecord): Record<(typeof fitColumns)[number], Cell>[] {
  return sheet.notes.map((note) => ({
    midi: note.midi,
    note: keyName(note.midi),
    string: note.string,
    take: note.take,
    f1Hz: note.f1Hz,
    f1SigmaCents: note.f1SigmaCents,
    b: note.b,
    bSigma: note.bSigma,
    bLow: note.bLow,
    bHigh: note.bHigh,
    rmsCents: note.rmsCents,
    partialsUsed: note.used.length,
    nMax: note.nMax,
    quality: note.quality,
  }));
}

export const planColumns = [
  "midi",
  "note",
  "stretchCents",
  "bandCents",
  "targetHz",
  "listenPartial",
  "listenHz",
  "b",
  "lnBSigma",
  "style",
  "temperament",
  "referenceHz",
] as const;

/** One row a key. What the plan was made with stands in every row, so that the file can be read by itself. */
export function planRows(plan: PlanRecord): Record<(typeof planColumns)[number], Cell>[] {
  return plan.notes.map((note) => ({
    midi: note.midi,
    note: keyName(note.midi),
    stretchCents: note.stretchCents,
    bandCents: note.bandCents,
    targetHz: note.targetHz,
    listenPartial: note.listenPartial,
    listenHz: note.listenHz,
    b: note.b,
    lnBSigma: note.lnBSigma,
    style: plan.styleName,
    temperament: typeof plan.temperament === "string" ? plan.temperament : plan.temperament.join(" "),
    referenceHz: plan.referenceHz,
  }));
}
