import { z } from "zod";
import { TEMPERAMENT_NAMES } from "./temperament";

/**
 * Shapes of the documents the command-line door and the programming interface take, one schema per verb. They check that the
 * right kinds of value are in the right places; what a value must be is checked, and named, by the function behind the verb.
 */

const midi = z.number().meta({ description: "MIDI note number: A0 = 21, A4 = 69, C8 = 108" });
const hz = z.number().meta({ exclusiveMinimum: 0, description: "Hz" });
const partial = z.number().meta({ type: "integer", minimum: 1, description: "Partial number" });
const referenceHz = hz.meta({ exclusiveMinimum: 0, description: "A4 in Hz", default: 440 }).optional();

const readingSchema = z
  .object({
    partial,
    hz: hz.optional(),
    cents: z
      .number()
      .meta({ description: "Cents from n times the note's equal-tempered frequency; needs midi" })
      .optional(),
    sigmaCents: z
      .number()
      .meta({ exclusiveMinimum: 0, description: "Total standard deviation, cents; believed" })
      .optional(),
  })
  .meta({ description: "One partial: its frequency as hz or as cents" });

const choice = z.array(partial).optional();

export const fitSchema = z.object({
  midi: midi.optional(),
  readings: z.array(readingSchema).meta({ minItems: 1 }),
  referenceHz,
  kept: choice,
  dropped: choice,
  maxPartial: partial.meta({ description: "Highest partial used", default: 16 }).optional(),
});

const observation = z.object({
  midi,
  b: z.number().meta({ description: "Inharmonicity coefficient" }),
  bSigma: z.number().meta({ exclusiveMinimum: 0 }),
  residualCents: z.number().meta({ minimum: 0 }).optional(),
});

const keyRange = {
  breakMidi: midi.meta({ description: "Lowest key on the treble bridge" }).optional(),
  firstMidi: midi.meta({ description: "Lowest key", default: 21 }).optional(),
  lastMidi: midi.meta({ description: "Highest key", default: 108 }).optional(),
};

export const keyboardSchema = z.object({ ...keyRange, observations: z.array(observation) });

const intervalRule = z.object({
  lowerPartial: partial,
  upperPartial: partial,
  semitones: z.number().meta({ type: "integer", minimum: 1 }),
  weights: z
    .union([z.number(), z.array(z.number())])
    .meta({ description: "One weight, or one per lower key from the lowest up" }),
  target: z.enum(["tempered", "just"]).optional(),
});

const style = z.union([
  z.string().meta({ examples: ["close", "even", "wide", "published"] }),
  z.object({
    intervals: z.array(intervalRule),
    smoothness: z.number().meta({ minimum: 0 }),
    toleranceCents: z.number().meta({ exclusiveMinimum: 0 }).optional(),
  }),
]);

const temperament = z.union([
  z.string().meta({ enum: [...TEMPERAMENT_NAMES] }),
  z.array(z.number()).meta({ minItems: 12, maxItems: 12, description: "Cents for C, C#, … B" }),
]);

const plan = {
  ...keyRange,
  style: style.optional(),
  temperament: temperament.optional(),
  referenceHz,
  anchor: z.object({ midi, partial }).optional(),
};

export const stretchSchema = z.object({
  ...plan,
  observations: z.array(observation).optional(),
  keys: z.array(z.object({ midi, b: z.number() })).optional(),
});

export const adviseSchema = z.object({ ...plan, observations: z.array(observation).optional() });

export const beatsSchema = z.object({
  notes: z
    .array(z.object({ midi, f1Hz: hz, b: z.number() }))
    .meta({ description: "A tuned instrument; absent: ideal strings in the temperament" })
    .optional(),
  temperament: temperament.optional(),
  referenceHz,
  firstMidi: keyRange.firstMidi,
  lastMidi: keyRange.lastMidi,
});

export const temperamentSchema = z.object({ temperament, referenceHz });

const visit = z.object({
  notes: z.array(
    z.object({
      midi,
      string: z
        .number()
        .meta({ type: "integer", minimum: 1, description: "Which string of the unison" })
        .optional(),
      readings: z.array(readingSchema),
      kept: choice,
      dropped: choice,
    }),
  ),
  referenceHz,
  humidityPercent: z.number().meta({ minimum: 0, maximum: 100 }).optional(),
});

export const compareSchema = z.object({
  before: visit.meta({ description: "The earlier visit, as left" }),
  after: visit.meta({ description: "The later visit, as found" }),
  falseDiscoveryRate: z.number().meta({ exclusiveMinimum: 0, exclusiveMaximum: 1, default: 0.05 }).optional(),
});
