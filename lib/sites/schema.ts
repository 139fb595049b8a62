import { z } from "zod";
import { requiredText } from "@/lib/clean-text";
import { isTimeZone } from "@/lib/dates";
import { optionalText, plainText } from "@/lib/optional-text";
import { listOf, listQuery, recordChange } from "@/lib/pages/list-query";
import { versionSeen } from "@/lib/version";

const degrees = (most: number) =>
  z
    .number(`Write degrees between −${most} and ${most}.`)
    .min(-most, `Write degrees between −${most} and ${most}.`)
    .max(most, `Write degrees between −${most} and ${most}.`)
    .nullable()
    .optional();

export const siteFields = z.object({
  customerId: z.uuid("Choose the customer this site belongs to."),
  name: requiredText(200, "Give the site a name."),
  street: plainText(200),
  postalCode: plainText(20),
  city: plainText(120),
  /** ISO 3166-1 alpha-2; the shop's own when not given. */
  country: z
    .string()
    .trim()
    .toUpperCase()
    .regex(/^[A-Z]{2}$/, "Two letters, such as IE.")
    .optional(),
  /** IANA zone; the shop's own when not given. */
  timeZone: z.string().trim().refine(isTimeZone, "Choose a time zone such as Europe/Dublin.").optional(),
  latitude: degrees(90),
  longitude: degrees(180),
  accessNotes: optionalText(2000),
});

export const newSite = siteFields.extend({ id: z.uuid().optional() });

export const siteChange = siteFields.partial().extend(recordChange);

/** What the form holds: a new record has no version yet. */
export const siteForm = siteFields.extend({ id: z.uuid(), version: versionSeen.optional() });

export const siteRecord = z.object({
  id: z.uuid(),
  customerId: z.uuid(),
  customerName: z.string(),
  name: z.string(),
  street: z.string(),
  postalCode: z.string(),
  city: z.string(),
  country: z.string(),
  timeZone: z.string(),
  latitude: z.number().nullable(),
  longitude: z.number().nullable(),
  /** Staff only: null for a customer's own sign-in. */
  accessNotes: z.string().nullable(),
  archivedAt: z.iso.datetime().nullable(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export const siteRow = siteRecord.omit({ accessNotes: true }).extend({ instruments: z.int() });

export const siteListQuery = listQuery(["name", "city", "customer", "updated"]).extend({
  customerId: z.uuid().optional(),
});
export const siteList = listOf(siteRow);

export type SiteRecord = z.infer<typeof siteRecord>;
export type SiteRow = z.infer<typeof siteRow>;
export type SiteListQuery = z.infer<typeof siteListQuery>;
export type NewSite = z.infer<typeof newSite>;
export type SiteChange = z.infer<typeof siteChange>;
