import { z } from "zod";
import { versionInAddress, versionOrNone, versionSeen } from "@/lib/version";

export const stages = ["as-found", "after-raise", "as-left"] as const;

export const newSheet = z.object({
  id: z.uuid().optional(),
  jobId: z.uuid().nullish(),
  stage: z.enum(stages),
  takenAt: z.iso.datetime({ offset: true }),
  referenceHz: z
    .number("Not a number. Write 440.")
    .min(380, "Between 380 and 480 Hz.")
    .max(480, "Between 380 and 480 Hz."),
  humidityPercent: z
    .number("Not a number. Write 58.")
    .min(0, "Between 0 and 100 %.")
    .max(100, "Between 0 and 100 %.")
    .nullish(),
  temperatureC: z
    .number("Not a number. Write 21.4.")
    .min(-30, "Between −30 and 60 °C.")
    .max(60, "Between −30 and 60 °C.")
    .nullish(),
  remarks: z.string().max(5000, "At most 5000 characters.").nullish(),
});

export const sheetChange = z.object({
  version: versionSeen,
  stage: z.enum(stages).optional(),
  takenAt: z.iso.datetime({ offset: true }).optional(),
  referenceHz: newSheet.shape.referenceHz.optional(),
  /** What of the readings stays when the reference pitch changes: their frequencies, or the cents they were typed as. */
  readingsKeep: z.enum(["hz", "cents"]).optional(),
  jobId: newSheet.shape.jobId,
  humidityPercent: newSheet.shape.humidityPercent,
  temperatureC: newSheet.shape.temperatureC,
  remarks: newSheet.shape.remarks,
  archived: z.boolean().optional(),
});

const hertz = z
  .number("Not a number. Write 784.2.")
  .positive("A frequency is above zero.")
  .max(100_000, "Above 100 kHz: check the unit.");

const readingInput = z
  .object({
    partial: z.int("A whole number from 1 to 64.").min(1, "From 1 to 64.").max(64, "From 1 to 64."),
    hz: hertz.optional(),
    /** From the nth harmonic of the note's equal-tempered pitch at the sheet's reference. */
    cents: z
      .number("Not a number. Write -12.1.")
      .min(-2400, "Beyond two octaves.")
      .max(2400, "Beyond two octaves.")
      .optional(),
    sigmaCents: z.number().positive("Above zero.").max(200, "At most 200 cents.").nullish(),
  })
  .refine((reading) => (reading.hz === undefined) !== (reading.cents === undefined), {
    message: "Give either Hz or cents.",
  });

const partialList = z.array(z.int().min(1).max(64)).max(64);

export const noteInput = z.object({
  string: z.union([z.int().min(1).max(5), z.literal("all")]).default("all"),
  take: z.int().min(1).max(99).default(1),
  readings: z.array(readingInput).min(1, "Give at least one partial.").max(64, "At most 64 partials a note."),
  /** Partials that stay in, or out, of the fit whatever the computation says. */
  kept: partialList.default([]),
  dropped: partialList.default([]),
  /** Partials that were asked about because they lie far from where they are expected, and are meant as typed. */
  confirmed: partialList.default([]),
  /** The version that was changed, 0 where there was no note; left out, the note is written whatever is there. */
  version: versionOrNone.optional(),
});

const midiNumber = z.coerce.number().int().min(9).max(120);

export const noteParams = z.object({ id: z.uuid(), midi: midiNumber });

export const noteQuery = z.object({
  string: z.union([z.literal("all"), z.coerce.number().int().min(1).max(5)]).default("all"),
  take: z.coerce.number().int().min(1).max(99).default(1),
  version: versionInAddress.optional(),
});

/** Whole rows, as pasted from a spreadsheet: all of them are saved or none. */
export const notesInput = z.object({
  notes: z
    .array(noteInput.extend({ midi: midiNumber }))
    .min(1, "No rows.")
    .max(128, "At most 128 notes at once: one sheet holds one instrument."),
});

const fitReason = z.enum([
  "off-curve",
  "wrong-partial-number",
  "neighbouring-note",
  "duplicate",
  "beyond-range",
  "dropped-by-hand",
]);

const fitWarning = z.enum([
  "exact-no-check",
  "single-reading",
  "b-not-significant",
  "few-partials",
  "first-partial-unreliable",
  "kept-off-curve",
  "ambiguous-outlier",
  "scatter-exceeds-sigma",
]);

const fitRecord = z.object({
  f1Hz: z.number(),
  f1SigmaCents: z.number(),
  b: z.number().nullable(),
  bSigma: z.number().nullable(),
  bLow: z.number().nullable(),
  bHigh: z.number().nullable(),
  correlation: z.number().nullable(),
  rmsCents: z.number(),
  chi2: z.number(),
  dof: z.number(),
  nMax: z.number(),
  used: z.array(z.number()),
  rejected: z.array(
    z.object({
      partial: z.number(),
      reason: fitReason,
      residualCents: z.number(),
      fitsPartial: z.number().optional(),
      fitsMidi: z.number().optional(),
    }),
  ),
  residuals: z.array(z.object({ partial: z.number(), cents: z.number() })),
  quality: z.enum(["good", "usable", "repeat"]),
  warnings: z.array(fitWarning),
});

export const noteRecord = fitRecord.extend({
  id: z.uuid(),
  midi: z.int(),
  string: z.union([z.int(), z.literal("all")]),
  take: z.int(),
  readings: z.array(z.object({ partial: z.int(), hz: z.number(), sigmaCents: z.number().nullable() })),
  kept: z.array(z.int()),
  dropped: z.array(z.int()),
  fitVersion: z.int(),
  version: z.int(),
});

export const sheetRow = z.object({
  id: z.uuid(),
  instrumentId: z.uuid(),
  jobId: z.uuid().nullable(),
  visitId: z.uuid().nullable(),
  stage: z.enum(stages),
  takenAt: z.iso.datetime(),
  takenByName: z.string().nullable(),
  referenceHz: z.number(),
  humidityPercent: z.number().nullable(),
  temperatureC: z.number().nullable(),
  remarks: z.string().nullable(),
  notesRead: z.int(),
  archivedAt: z.iso.datetime().nullable(),
  version: z.int(),
});

export const sheetRecord = sheetRow.extend({ notes: z.array(noteRecord), canChange: z.boolean() });
export const sheetList = z.object({ items: z.array(sheetRow), next: z.string().nullable() });
export const sheetListQuery = z.object({
  cursor: z.string().max(600).optional(),
  most: z.coerce.number().int().min(1).max(100).default(50),
  archived: z.enum(["hide", "only"]).default("hide"),
});

export type Stage = (typeof stages)[number];
export type NewSheet = z.infer<typeof newSheet>;
export type SheetChange = z.infer<typeof sheetChange>;
export type NoteInput = z.infer<typeof noteInput>;
export type NotesInput = z.infer<typeof notesInput>;
export type NoteQuery = z.infer<typeof noteQuery>;
export type NoteRecord = z.infer<typeof noteRecord>;
export type SheetRow = z.infer<typeof sheetRow>;
export type SheetRecord = z.infer<typeof sheetRecord>;
export type SheetListQuery = z.infer<typeof sheetListQuery>;
