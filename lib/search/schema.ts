import { z } from "zod";

export const searchQuery = z.object({
  q: z
    .string()
    .trim()
    .min(1, "Type a name, an address or a serial number.")
    .max(200, "At most 200 characters."),
  most: z.coerce.number().int().min(1).max(50).default(20),
});

export const found = z.object({
  kind: z.enum(["customer", "site", "instrument"]),
  id: z.uuid(),
  title: z.string(),
  subtitle: z.string(),
});

/** `nearly`: no record has all the words as typed; these are spelt like them. */
export const searchAnswer = z.object({ items: z.array(found), next: z.null(), nearly: z.boolean() });

export type SearchQuery = z.infer<typeof searchQuery>;
export type Found = z.infer<typeof found>;
export type SearchAnswer = z.infer<typeof searchAnswer>;
