import { z } from "zod";
import { TEMPERAMENT_NAMES } from "@/lib/acoustics/temperament";
import { requiredText } from "@/lib/clean-text";
import { isDay } from "@/lib/dates";
import { optionalText, plainText } from "@/lib/optional-text";
import { listOf, listQuery, recordChange } from "@/lib/pages/list-query";
import { versionInAddress, versionOrNone, versionSeen } from "@/lib/version";
import { kinds, stringFaults } from "./rules";

const key = (message: string) => z.int(message).min(9, message).max(120, message);

export const day = z.string().trim().refine(isDay, "Choose a day of the calendar.");

const offset = z
  .number("Write each offset in cents.")
  .min(-100, "Between −100 and 100 cents.")
  .max(100, "Between −100 and 100 cents.");

/** A named temperament, or twelve offsets in cents from equal, C to B. */
const temperament = z.union(
  [z.enum(TEMPERAMENT_NAMES), z.array(offset).length(12, "Give twelve offsets, C to B.")],
  "Choose a temperament, or give twelve offsets between −100 and 100 cents.",
);

export const instrumentFields = z.object({
  maker: requiredText(120, "Give the maker's name."),
  model: plainText(120),
  serial: plainText(60),
  year: z
    .int("Write the year in four figures.")
    .min(1700, "A year from 1700 on.")
    .max(2100, "A year up to 2100.")
    .nullable()
    .optional(),
  kind: z.enum(kinds, "Choose the kind of instrument."),
  room: plainText(120),
  firstMidi: key("Choose the lowest key.").optional(),
  lastMidi: key("Choose the highest key.").optional(),
  breakMidi: key("Choose a note, or leave it open.").nullable().optional(),
  referenceHz: z
    .number("Write the pitch of A4 in hertz.")
    .min(380, "A4 lies between 380 and 480 Hz.")
    .max(480, "A4 lies between 380 and 480 Hz.")
    .optional(),
  temperament: temperament.optional(),
  standingNote: optionalText(2000),
});

const holdingFields = z.object({
  siteId: z.uuid("Choose where the instrument stands."),
  /** The site's customer when not given. */
  ownerId: z.uuid("Choose the owner.").optional(),
  /** Null: the owner. */
  payerId: z.uuid().nullable().optional(),
  bookingContactId: z.uuid().nullable().optional(),
  /** Today at the shop when not given. */
  since: day.optional(),
});

export const newInstrument = instrumentFields.extend({ ...holdingFields.shape, id: z.uuid().optional() });

export const instrumentChange = instrumentFields.partial().extend(recordChange);

/** What the form of an old record holds. */
export const instrumentForm = instrumentFields.extend({ id: z.uuid(), version: versionSeen });

/** Moved or sold: closes the present place on that day and opens another. */
export const newHolding = holdingFields.extend({
  id: z.uuid().optional(),
  /** The instrument's version. */
  version: versionSeen,
});

/** A slip in the present place put right; history is not rewritten. */
export const holdingChange = holdingFields.partial().extend({ version: versionSeen });

/** What the form of a move or of a correction holds. */
export const placeForm = newHolding.extend({ instrumentId: z.uuid() });

export const holdingRecord = z.object({
  id: z.uuid(),
  siteId: z.uuid(),
  siteName: z.string(),
  siteCity: z.string(),
  ownerId: z.uuid(),
  ownerName: z.string(),
  payerId: z.uuid().nullable(),
  payerName: z.string().nullable(),
  bookingContactId: z.uuid().nullable(),
  bookingContactName: z.string().nullable(),
  since: z.iso.date(),
  until: z.iso.date().nullable(),
});

export const instrumentRecord = z.object({
  id: z.uuid(),
  /** Maker and model together. */
  name: z.string(),
  maker: z.string(),
  model: z.string(),
  serial: z.string(),
  year: z.int().nullable(),
  kind: z.enum(kinds),
  room: z.string(),
  firstMidi: z.int(),
  lastMidi: z.int(),
  breakMidi: z.int().nullable(),
  referenceHz: z.number(),
  temperament,
  standingNote: z.string().nullable(),
  /** Where it stands and whose it is today. */
  place: holdingRecord.nullable(),
  /** Whether the asker may change this record. */
  canChange: z.boolean(),
  archivedAt: z.iso.datetime().nullable(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export const instrumentRow = z.object({
  id: z.uuid(),
  name: z.string(),
  maker: z.string(),
  model: z.string(),
  serial: z.string(),
  year: z.int().nullable(),
  kind: z.enum(kinds),
  room: z.string(),
  siteId: z.uuid().nullable(),
  siteName: z.string(),
  siteCity: z.string(),
  ownerId: z.uuid().nullable(),
  ownerName: z.string(),
  lastSheetAt: z.iso.datetime().nullable(),
  /** Pitch as last found, cents from its reference. */
  lastFoundCents: z.number().nullable(),
  archivedAt: z.iso.datetime().nullable(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export const instrumentListQuery = listQuery(["name", "place", "owner", "updated"]).extend({
  siteId: z.uuid().optional(),
  ownerId: z.uuid().optional(),
  kind: z.enum(kinds).optional(),
});
export const instrumentList = listOf(instrumentRow);
export const holdingList = z.object({ items: z.array(holdingRecord), next: z.null() });

const millimetres = (least: number, most: number, message: string) =>
  z.number(message).gt(least, message).lt(most, message).nullable().optional();

const stringShape = z.object({
  strings: z.int("From 1 to 5 strings.").min(1, "From 1 to 5 strings.").max(5, "From 1 to 5 strings."),
  wound: z.boolean(),
  speakingLengthMm: millimetres(0, 3000, "More than 0 and less than 3000 mm."),
  diameterMm: millimetres(0.2, 3, "More than 0.2 and less than 3 mm."),
  outerDiameterMm: millimetres(0.2, 20, "More than 0.2 and less than 20 mm."),
});

/** One note of the scale: what it is strung with. */
export const stringInput = stringShape
  .extend({
    /** The version that was changed, 0 where there was none; left out, it is written whatever is there. */
    version: versionOrNone.optional(),
  })
  .superRefine((row, context) => {
    for (const [path, message] of Object.entries(stringFaults(row))) {
      context.addIssue({ code: "custom", path: [path], message });
    }
  });

export const stringRecord = stringShape.required().extend({ midi: z.int(), version: z.int() });
export const stringList = z.object({ items: z.array(stringRecord), next: z.null() });
export const stringParams = z.object({ id: z.uuid(), midi: z.coerce.number().int().min(9).max(120) });
export const stringQuery = z.object({ version: versionInAddress.optional() });
/** What a stale scale carries: the notes somebody else changed, as they are now; those taken away are not among them. */
export const changedStrings = z.object({ midis: z.array(z.int()), items: z.array(stringRecord) });
/** A pasted scale: all of it is saved or none. */
export const stringsInput = z.object({
  rows: z
    .array(z.object({ midi: z.int().min(9).max(120), values: stringInput }))
    .min(1)
    .max(120, "At most 120 notes at once."),
});

export type InstrumentRecord = z.infer<typeof instrumentRecord>;
export type InstrumentRow = z.infer<typeof instrumentRow>;
export type InstrumentListQuery = z.infer<typeof instrumentListQuery>;
export type NewInstrument = z.infer<typeof newInstrument>;
export type InstrumentChange = z.infer<typeof instrumentChange>;
export type HoldingRecord = z.infer<typeof holdingRecord>;
export type NewHolding = z.infer<typeof newHolding>;
export type HoldingChange = z.infer<typeof holdingChange>;
export type StringInput = z.infer<typeof stringInput>;
export type StringRecord = z.infer<typeof stringRecord>;
export type ChangedStrings = z.infer<typeof changedStrings>;
export type StringsInput = z.infer<typeof stringsInput>;
