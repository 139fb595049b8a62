import { z } from "zod";
import { kinds } from "@/lib/instruments/rules";
import { listOf } from "@/lib/pages/list-query";

const dueStates = ["due", "overdue", "booked", "declined", "resting", "later"] as const;

export const dueQuery = z.object({
  q: z.string().trim().max(200).optional(),
  /** What wants booking, due and overdue together, unless another state is asked for. */
  state: z.enum([...dueStates, "to-book", "any"]).default("to-book"),
  technicianId: z.uuid().optional(),
  kind: z.enum(kinds).optional(),
  city: z.string().trim().max(200).optional(),
  sort: z.enum(["due", "name", "place"]).default("due"),
  direction: z.enum(["asc", "desc"]).default("asc"),
  cursor: z.string().max(600).optional(),
  most: z.coerce.number().int().min(1).max(100).default(50),
});

export const dueItem = z.object({
  instrumentId: z.uuid(),
  instrument: z.string(),
  kind: z.enum(kinds),
  room: z.string(),
  siteId: z.uuid(),
  site: z.string(),
  city: z.string(),
  customerId: z.uuid(),
  customer: z.string(),
  state: z.enum(dueStates),
  /** The days on one of which the visit should be; null when nothing is to come. */
  window: z.object({ from: z.iso.date(), until: z.iso.date() }).nullable(),
  lastServed: z.iso.date().nullable(),
  bookedOn: z.iso.date().nullable(),
  bookedVisitId: z.uuid().nullable(),
  technicianId: z.uuid().nullable(),
  technician: z.string().nullable(),
  workMinutes: z.int(),
});

export const dueList = listOf(dueItem).extend({
  /** How many instruments the shop has in each state, whatever the list is narrowed to. */
  counts: z.record(z.enum(dueStates), z.int()),
});

export type DueQuery = z.infer<typeof dueQuery>;
export type DueItem = z.infer<typeof dueItem>;
export type DueList = z.infer<typeof dueList>;
