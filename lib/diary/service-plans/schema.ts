import { z } from "zod";
import { day } from "@/lib/instruments/schema";
import { versionOrNone } from "@/lib/version";

const whole = (least: number, most: number, message: string) =>
  z.int(message).min(least, message).max(most, message);

export const rhythm = z.discriminatedUnion(
  "kind",
  [
    z.object({
      kind: z.literal("interval"),
      every: whole(1, 120, "From 1 to 120."),
      unit: z.enum(["week", "month"], "Choose weeks or months."),
    }),
    z.object({
      kind: z.literal("months"),
      months: z
        .array(whole(1, 12, "A month from 1 to 12."))
        .min(1, "Choose at least one month.")
        .max(12)
        .refine((months) => new Set(months).size === months.length, "The same month is named twice."),
    }),
    z.object({ kind: z.literal("events"), daysBefore: whole(0, 60, "From 0 to 60 days.") }),
  ],
  "Choose when the instrument is due.",
);

const minuteOfDay = whole(0, 1440, "A time of the day.");

export const servicePlanInput = z.object({
  /** The version seen; 0 for the first plan of an instrument. */
  version: versionOrNone,
  rhythm,
  /** Today at the shop when not given. */
  startsOn: day.optional(),
  servedBefore: day.nullable().default(null),
  rests: z.boolean().default(false),
  restsUntil: day.nullable().default(null),
  technicianId: z.uuid().nullable().default(null),
  weekdays: z
    .array(whole(1, 7, "A weekday from 1, Monday, to 7, Sunday."))
    .max(7)
    .default([]),
  hours: z
    .object({ from: minuteOfDay, until: minuteOfDay })
    .refine(({ from, until }) => from < until, {
      path: ["until"],
      message: "The hours end before they begin.",
    })
    .nullable()
    .default(null),
  work: z
    .string()
    .trim()
    .min(1, "Say what is to be done.")
    .max(200, "At most 200 characters.")
    .default("Tuning"),
  workMinutes: whole(15, 720, "From 15 minutes to 12 hours.").default(90),
});

export const servicePlanRecord = z.object({
  instrumentId: z.uuid(),
  rhythm,
  startsOn: z.iso.date(),
  servedBefore: z.iso.date().nullable(),
  rests: z.boolean(),
  restsUntil: z.iso.date().nullable(),
  technicianId: z.uuid().nullable(),
  technicianName: z.string().nullable(),
  weekdays: z.array(z.int()),
  hours: z.object({ from: z.int(), until: z.int() }).nullable(),
  work: z.string(),
  workMinutes: z.int(),
  version: z.int(),
});

export type ServicePlanInput = z.infer<typeof servicePlanInput>;
export type ServicePlanRecord = z.infer<typeof servicePlanRecord>;
