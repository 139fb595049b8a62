import { z } from "zod";
import { TEMPERAMENT_NAMES } from "@/lib/acoustics";
import type { Observation } from "@/lib/acoustics/types";
import { requiredText } from "@/lib/clean-text";
import { versionSeen } from "@/lib/version";

const temperament = z.union([
  z.enum(TEMPERAMENT_NAMES),
  z.array(z.number().min(-100).max(100)).length(12, "Twelve offsets in cents, from C to B."),
]);

const weight = z.number().min(0, "A weight is not below zero.").max(100, "At most 100.");

const registerRule = z
  .object({
    lowerPartial: z.int().min(1).max(32),
    upperPartial: z.int().min(1).max(32),
    semitones: z.int().min(1).max(60),
    weights: z.object({ bass: weight, tenor: weight, middle: weight, treble: weight, top: weight }),
    target: z.enum(["tempered", "just"]).optional(),
  })
  .refine(
    ({ lowerPartial, upperPartial, semitones }) =>
      Math.abs(1200 * Math.log2(lowerPartial / upperPartial) - 100 * semitones) <= 50,
    {
      message: "These partials do not meet at this interval.",
      path: ["semitones"],
    },
  );

export const registerStyle = z.object({
  intervals: z
    .array(registerRule)
    .min(1, "Give at least one interval.")
    .max(24, "At most 24 intervals.")
    .refine((rules) => rules.some(({ weights }) => Object.values(weights).some((value) => value > 0)), {
      message: "At least one weight must be above zero.",
    }),
  smoothness: z.number().min(0, "Not below zero.").max(10_000, "At most 10 000."),
  toleranceCents: z.number().positive("Above zero.").max(20, "At most 20 cents.").default(2),
});

export const styleFields = registerStyle.extend({
  name: requiredText(60, "Give the style a name."),
});
export const newStyle = styleFields.extend({ id: z.uuid().optional() });
export const styleChange = styleFields.partial().extend({
  version: versionSeen,
  archived: z.boolean().optional(),
});

export const styleRecord = styleFields.extend({
  id: z.uuid(),
  archivedAt: z.iso.datetime().nullable(),
  version: z.int(),
});
export const styleList = z.object({
  builtIn: z.array(z.object({ name: z.enum(["close", "even", "wide", "published"]), words: z.string() })),
  house: z.array(styleRecord),
  defaultStyle: z.string(),
  canChange: z.boolean(),
});

/** Style and temperament of a computation, as chosen on the page; what is left out is the instrument's or the shop's. */
const choices = {
  /** A built-in style's name or a house style's id. */
  style: z.string().max(60).optional(),
  referenceHz: z.coerce
    .number()
    .min(380, "Between 380 and 480 Hz.")
    .max(480, "Between 380 and 480 Hz.")
    .optional(),
};

export const analysisQuery = z.object({
  ...choices,
  /** A name, or twelve offsets separated by commas. */
  temperament: z
    .string()
    .max(200)
    .transform((text) => (text.includes(",") ? text.split(",").map(Number) : text))
    .pipe(temperament)
    .optional(),
});

export const planInput = z.object({
  ...choices,
  id: z.uuid().optional(),
  temperament: temperament.optional(),
  /** Keep it as the plan of this job; another plan of the job steps back. */
  jobId: z.uuid().nullish(),
});

const planNote = z.object({
  midi: z.int(),
  stretchCents: z.number(),
  bandCents: z.number().nullable(),
  targetHz: z.number(),
  listenPartial: z.int(),
  listenHz: z.number(),
});

const evenness = z.object({
  intervals: z.array(
    z.object({
      name: z.string(),
      rates: z.array(z.object({ lowerMidi: z.int(), beatsPerSecond: z.number() })),
      roughness: z.number(),
      reversals: z.array(z.int()),
    }),
  ),
});

const advice = z.object({
  meanBandCents: z.number(),
  next: z.array(z.object({ midi: z.int(), meanBandCents: z.number() })),
  enough: z.boolean(),
  widest: z.object({
    register: z.enum(["bass", "tenor", "middle", "treble", "top"]),
    meanBandCents: z.number(),
    toleranceCents: z.number(),
  }),
});

const key = z.object({
  midi: z.int(),
  b: z.number(),
  bLow: z.number(),
  bHigh: z.number(),
  lnBSigma: z.number(),
  source: z.enum(["measured", "predicted"]),
  flag: z.literal("does-not-belong").nullable(),
  z: z.number().nullable(),
  expectedB: z.number().nullable(),
  detectableChange: z.number().nullable(),
});

const beat = z.object({
  interval: z.string(),
  lowerMidi: z.int(),
  upperMidi: z.int(),
  lowerPartial: z.int(),
  upperPartial: z.int(),
  beatsPerSecond: z.number(),
});

export const analysisRecord = z.object({
  sheetId: z.uuid(),
  instrumentId: z.uuid(),
  style: z.object({ ref: z.string(), name: z.string() }),
  temperament,
  referenceHz: z.number(),
  computationVersion: z.int(),
  breakMidi: z.int(),
  breakSource: z.enum(["given", "inferred", "assumed"]),
  priorOnly: z.boolean(),
  keys: z.array(key),
  notes: z.array(planNote),
  evenness,
  beats: z.array(beat),
  advice,
  /** f1 of the notes read, in cents from equal temperament at `referenceHz`. */
  pitch: z.array(z.object({ midi: z.int(), cents: z.number() })),
});

export const planRecord = z.object({
  id: z.uuid(),
  sheetId: z.uuid(),
  instrumentId: z.uuid(),
  jobId: z.uuid().nullable(),
  styleName: z.string(),
  temperament,
  referenceHz: z.number(),
  computationVersion: z.int(),
  madeByName: z.string().nullable(),
  createdAt: z.iso.datetime(),
  supersededAt: z.iso.datetime().nullable(),
  notes: z.array(planNote.extend({ b: z.number(), lnBSigma: z.number() })),
});
export const planRow = planRecord.omit({ notes: true });
export const planList = z.object({ items: z.array(planRow), next: z.null() });

export const adviceRecord = advice.extend({ sheetId: z.uuid() });

/** An instrument that a style can be tried on: its fullest sheet, as far as a plan is drawn from it. */
export type PreviewInstrument = {
  instrumentId: string;
  sheetId: string;
  name: string;
  sheetName: string;
  notesRead: number;
  firstMidi: number;
  lastMidi: number;
  breakMidi: number | null;
  observations: Observation[];
};
export type StyleFields = z.infer<typeof styleFields>;
export type NewStyle = z.infer<typeof newStyle>;
export type StyleChange = z.infer<typeof styleChange>;
export type StyleRecord = z.infer<typeof styleRecord>;
export type StyleList = z.infer<typeof styleList>;
export type AnalysisQuery = z.infer<typeof analysisQuery>;
export type AnalysisRecord = z.infer<typeof analysisRecord>;
export type PlanInput = z.infer<typeof planInput>;
export type PlanRecord = z.infer<typeof planRecord>;
export type PlanRow = z.infer<typeof planRow>;
