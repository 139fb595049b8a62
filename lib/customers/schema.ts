import { z } from "zod";
import { listOf, listQuery } from "@/lib/pages/list-query";

/** An empty field means "not known", whether a form or a program sends it. */
export function optionalText(most: number) {
  return z
    .string()
    .trim()
    .max(most, `At most ${most} characters.`)
    .transform((text) => (text === "" ? null : text))
    .nullish()
    .transform((text) => text ?? null);
}

export const customerFields = z.object({
  kind: z.enum(["person", "organisation"]).default("person"),
  name: z.string().trim().min(1, "Give the customer a name.").max(200, "At most 200 characters."),
  contactName: optionalText(200),
  email: z
    .union([z.literal("").transform(() => null), z.email("Write an address like anna@example.org.").max(254)])
    .nullish()
    .transform((email) => email ?? null),
  phone: optionalText(60),
  notes: optionalText(5000),
});

export const newCustomer = customerFields.extend({ id: z.uuid().optional() });

export const customerChange = customerFields.partial().extend({ version: z.int().positive() });

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
