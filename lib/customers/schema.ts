import { z } from "zod";
import { requiredText } from "@/lib/clean-text";
import { optionalText } from "@/lib/optional-text";
import { listOf, listQuery, recordChange } from "@/lib/pages/list-query";
import { versionSeen } from "@/lib/version";

export const customerFields = z.object({
  kind: z.enum(["person", "organisation"]).optional(),
  name: requiredText(200, "Give the customer a name."),
  contactName: optionalText(200),
  email: z
    .string()
    .trim()
    .max(254, "At most 254 characters.")
    .refine(
      (text) => text === "" || z.email().safeParse(text).success,
      "Write an address like anna@example.org.",
    )
    .transform((text) => (text === "" ? null : text))
    .nullable()
    .optional(),
  phone: optionalText(60),
  notes: optionalText(5000),
});

export const newCustomer = customerFields.extend({ id: z.uuid().optional() });

/** `archived` archives and restores: the same record, out of the lists or back in them. */
export const customerChange = customerFields.partial().extend(recordChange);

/** What the form holds: a new record has no version yet. */
export const customerForm = customerFields.extend({ id: z.uuid(), version: versionSeen.optional() });

export const customerRecord = z.object({
  id: z.uuid(),
  kind: z.enum(["person", "organisation"]),
  name: z.string(),
  contactName: z.string().nullable(),
  email: z.string().nullable(),
  phone: z.string().nullable(),
  /** Staff only: null for a customer's own sign-in. */
  notes: z.string().nullable(),
  archivedAt: z.iso.datetime().nullable(),
  updatedAt: z.iso.datetime(),
  version: z.int(),
});

export const customerRow = customerRecord.omit({ notes: true }).extend({
  sites: z.int(),
  instruments: z.int(),
});

export const customerListQuery = listQuery(["name", "updated"]);
export const customerList = listOf(customerRow);

export type CustomerRecord = z.infer<typeof customerRecord>;
export type CustomerRow = z.infer<typeof customerRow>;
export type CustomerListQuery = z.infer<typeof customerListQuery>;
export type NewCustomer = z.infer<typeof newCustomer>;
export type CustomerChange = z.infer<typeof customerChange>;
