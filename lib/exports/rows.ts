import { keyName } from "@/lib/acoustics";
import type { PlanRecord } from "@/lib/plans/schema";
import { readingCents } from "@/lib/readings/rules";
import type { SheetRecord } from "@/lib/readings/schema";

type Cell = string | number | boolean | null;

export const readingColumns = [
  "midi",
  "note",
  "string",
  "take",
  "partial",
  "hz",
  "cents",
  "reference_hz",
  "sigma_cents",
  "residual_cents",
  "used",
  "left_out_because",
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
      reference_hz: sheet.referenceHz,
      sigma_cents: sigmaCents,
      residual_cents: note.residuals.find((residual) => residual.partial === partial)?.cents ?? null,
      used: note.used.includes(partial),
      left_out_because: note.rejected.find((rejection) => rejection.partial === partial)?.reason ?? null,
    })),
  );
}

export const fitColumns = [
  "midi",
  "note",
  "string",
  "take",
  "f1_hz",
  "f1_sigma_cents",
  "b",
  "b_sigma",
  "b_low_95",
  "b_high_95",
  "rms_cents",
  "partials_used",
  "highest_partial",
  "quality",
] as const;

export function fitRows(sheet: SheetRecord): Record<(typeof fitColumns)[number], Cell>[] {
  return sheet.notes.map((note) => ({
    midi: note.midi,
    note: keyName(note.midi),
    string: note.string,
    take: note.take,
    f1_hz: note.f1Hz,
    f1_sigma_cents: note.f1SigmaCents,
    b: note.b,
    b_sigma: note.bSigma,
    b_low_95: note.bLow,
    b_high_95: note.bHigh,
    rms_cents: note.rmsCents,
    partials_used: note.used.length,
    highest_partial: note.nMax,
    quality: note.quality,
  }));
}

export const planColumns = [
  "midi",
  "note",
  "stretch_cents",
  "band_95_cents",
  "target_f1_hz",
  "listen_partial",
  "listen_hz",
  "b",
  "ln_b_sigma",
] as const;

export function planRows(plan: PlanRecord): Record<(typeof planColumns)[number], Cell>[] {
  return plan.notes.map((note) => ({
    midi: note.midi,
    note: keyName(note.midi),
    stretch_cents: note.stretchCents,
    band_95_cents: note.bandCents,
    target_f1_hz: note.targetHz,
    listen_partial: note.listenPartial,
    listen_hz: note.listenHz,
    b: note.b,
    ln_b_sigma: note.lnBSigma,
  }));
}
