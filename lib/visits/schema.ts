import { z } from "zod";
import { requiredText } from "@/lib/clean-text";
import { isDay } from "@/lib/dates";
import { optionalText } from "@/lib/optional-text";
import { listOf } from "@/lib/pages/list-query";
import { versionInAddress, versionSeen } from "@/lib/version";
import { isWallTime, parseOffsetTime } from "@/lib/wall-time";
import { visitStates } from "./rules";

const visitState = z.enum(visitStates);

const day = z.string().refine(isDay, "Write a day like 2026-05-14.");

/** RFC 3339 in whole minutes; that the offset is the site's at that time is checked where the site is known. */
const offsetTime = z
  .string()
  .refine((text) => parseOffsetTime(text) !== null, "Write a time like 2026-05-14T09:00:00+02:00.");

const work = requiredText(200, "Say what is to be done.");

const jobFields = z.object({
  id: z.uuid().optional(),
  instrumentId: z.uuid(),
  work: work.optional(),
});

const technicianIds = z
  .array(z.uuid(), "Choose who comes.")
  .min(1, "Choose who comes.")
  .max(20, "At most 20 technicians.")
  .refine((ids) => new Set(ids).size === ids.length, "The same technician is named twice.");

const jobs = z
  .array(jobFields)
  .max(200, "At most 200 instruments a visit.")
  .refine(
    (list) => new Set(list.map(({ instrumentId }) => instrumentId)).size === list.length,
    "The same instrument is named twice.",
  );

export const newVisit = z.object({
  id: z.uuid().optional(),
  siteId: z.uuid("Choose the site."),
  technicianIds,
  start: offsetTime,
  end: offsetTime,
  jobs: jobs.default([]),
  /** A visit agreed on the telephone is confirmed from the start. */
  state: z.enum(["offered", "confirmed"]).default("offered"),
  notes: optionalText(5000),
});

/** A form is asked once about a start in the past. A program says what it means and is not asked. */
const confirmable = { confirm: z.boolean().optional() };

/** What the booking form knows: the site's wall time and how long. */
export const visitPlan = newVisit
  .omit({ start: true, end: true, jobs: true })
  .extend({
    date: day,
    time: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, "Write a time like 09:30."),
    minutes: z
      .int("Write whole minutes.")
      .min(5, "At least 5 minutes.")
      .max(24 * 60, "At most 24 hours: a longer job is several visits."),
    jobs: jobs.default([]),
    ...confirmable,
  })
  .refine(({ date, time }) => isWallTime(`${date}T${time}`), {
    path: ["date"],
    message: "There is no such day.",
  });

export const visitChange = z.object({
  version: versionSeen,
  technicianIds: technicianIds.optional(),
  start: offsetTime.optional(),
  end: offsetTime.optional(),
  jobs: jobs.optional(),
  notes: optionalText(5000).optional(),
});

export const visitTransition = z.object({
  to: visitState,
  reason: optionalText(500),
  version: versionSeen,
  /** For "moved": the successor's time, and its technicians where they change. */
  start: offsetTime.optional(),
  end: offsetTime.optional(),
  technicianIds: technicianIds.optional(),
  successorId: z.uuid().optional(),
  confirmed: z.boolean().default(false),
});

/** The form that moves a visit: a new wall time of the same length. */
export const visitMovePlan = z.object({
  version: versionSeen,
  reason: requiredText(500, "Say why the visit moves."),
  date: day,
  time: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, "Write a time like 09:30."),
  confirmed: z.boolean().default(false),
  ...confirmable,
});

/** The same as a form sends it, with the visit it is about. */
export const visitMove = visitMovePlan.extend({ id: z.uuid() });

export const cancelQuery = z.object({
  version: versionInAddress,
  reason: optionalText(500),
});

const named = z.object({ id: z.uuid(), name: z.string() });

const stageOfSheet = z.enum(["as-found", "after-raise", "as-left"]);

export const visitJob = z.object({
  id: z.uuid(),
  instrumentId: z.uuid(),
  instrument: z.string(),
  room: z.string(),
  work: z.string(),
  /** Staff only. */
  remarks: z.string().nullable(),
  /** Staff only: empty for a customer's own sign-in. */
  sheets: z.array(z.object({ id: z.uuid(), stage: stageOfSheet, takenAt: z.iso.datetime(), notes: z.int() })),
});

export const visitRecord = z.object({
  id: z.uuid(),
  state: visitState,
  /** RFC 3339 with the site's offset. */
  start: z.string(),
  end: z.string(),
  timeZone: z.string(),
  site: z.object({
    id: z.uuid(),
    name: z.string(),
    street: z.string(),
    postalCode: z.string(),
    city: z.string(),
    /** Staff only. */
    accessNotes: z.string().nullable(),
  }),
  customer: named.extend({ phone: z.string().nullable() }),
  technicians: z.array(named),
  jobs: z.array(visitJob),
  events: z.array(
    z.object({
      from: visitState.nullable(),
      to: visitState,
      at: z.iso.datetime(),
      /** Who and why are for staff only. */
      by: z.string().nullable(),
      reason: z.string().nullable(),
    }),
  ),
  /** Staff only. */
  notes: z.string().nullable(),
  movedToId: z.uuid().nullable(),
  movedFromId: z.uuid().nullable(),
  moves: z.array(z.object({ to: visitState, asksReason: z.boolean(), back: z.boolean() })),
  canChange: z.boolean(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export const visitRow = z.object({
  id: z.uuid(),
  state: visitState,
  start: z.string(),
  end: z.string(),
  timeZone: z.string(),
  siteId: z.uuid(),
  siteName: z.string(),
  place: z.string(),
  customerName: z.string(),
  technicians: z.array(named),
  /** Names of the first instruments, and how many there are in all. */
  instruments: z.array(z.string()),
  jobs: z.int(),
  version: z.int(),
});

const emptyIsAbsent = (value: unknown) => (value === "" ? undefined : value);

export const visitListQuery = z.object({
  state: z.preprocess(emptyIsAbsent, visitState.optional()),
  technicianId: z.preprocess(emptyIsAbsent, z.uuid().optional()),
  siteId: z.preprocess(emptyIsAbsent, z.uuid().optional()),
  customerId: z.preprocess(emptyIsAbsent, z.uuid().optional()),
  instrumentId: z.preprocess(emptyIsAbsent, z.uuid().optional()),
  /** Days in the sites' own time, both included. */
  from: z.preprocess(emptyIsAbsent, day.optional()),
  to: z.preprocess(emptyIsAbsent, day.optional()),
  sort: z.enum(["start"]).default("start"),
  direction: z.enum(["asc", "desc"]).default("desc"),
  cursor: z.string().max(600).optional(),
  most: z.coerce.number().int().min(1).max(100).default(50),
});

export const visitList = listOf(visitRow);

/** What `visit-overlap` carries: the visit in the way, and times of that day that are free. */
export const overlap = z.object({
  visitId: z.uuid(),
  siteName: z.string(),
  start: z.string(),
  end: z.string(),
  technicianId: z.uuid(),
  technicianName: z.string(),
  free: z.array(z.string()),
});

export type VisitRecord = z.infer<typeof visitRecord>;
export type VisitJob = z.infer<typeof visitJob>;
export type VisitRow = z.infer<typeof visitRow>;
export type VisitListQuery = z.infer<typeof visitListQuery>;
export type NewVisit = z.infer<typeof newVisit>;
export type VisitPlan = z.infer<typeof visitPlan>;
export type VisitChange = z.infer<typeof visitChange>;
export type VisitTransition = z.infer<typeof visitTransition>;
export type VisitMovePlan = z.infer<typeof visitMovePlan>;
export type Overlap = z.infer<typeof overlap>;
