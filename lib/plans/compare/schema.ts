import { z } from "zod";

export const compareQuery = z.object({
  /** Two sheets of the instrument, separated by a comma. */
  sheets: z
    .string()
    .transform((text) => text.split(","))
    .pipe(z.tuple([z.uuid(), z.uuid()], "Name two sheets, separated by a comma.")),
});

const side = z.object({
  sheetId: z.uuid(),
  stage: z.enum(["as-found", "after-raise", "as-left"]),
  takenAt: z.iso.datetime(),
  humidityPercent: z.number().nullable(),
  notes: z.array(z.object({ midi: z.int(), b: z.number().nullable(), bSigma: z.number().nullable() })),
  pitch: z.array(z.object({ midi: z.int(), cents: z.number() })),
});

export const comparisonRecord = z.object({
  falseDiscoveryRate: z.number(),
  before: side,
  after: side,
  notes: z.array(
    z.object({
      midi: z.int(),
      verdict: z.enum(["unchanged", "changed", "not-comparable"]),
      reason: z
        .enum([
          "not-read-before",
          "not-read-after",
          "different-string",
          "too-few-matched-partials",
          "b-not-positive",
        ])
        .nullable(),
      deltaLnB: z.number().nullable(),
      deltaLnBSigma: z.number().nullable(),
      low: z.number().nullable(),
      high: z.number().nullable(),
      dof: z.number().nullable(),
      t: z.number().nullable(),
      pValue: z.number().nullable(),
      adjustedPValue: z.number().nullable(),
      detectableChange: z.number().nullable(),
      matchedPartials: z.array(z.int()),
      pitchCents: z.number().nullable(),
    }),
  ),
  pitch: z.array(
    z.object({
      register: z.enum(["bass", "tenor", "middle", "treble", "top"]),
      notes: z.int(),
      meanCents: z.number(),
      sigmaCents: z.number().nullable(),
    }),
  ),
  humidity: z
    .object({ beforePercent: z.number(), afterPercent: z.number(), changePercent: z.number() })
    .nullable(),
});

export type ComparisonRecord = z.infer<typeof comparisonRecord>;
