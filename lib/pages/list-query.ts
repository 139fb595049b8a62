import { z } from "zod";
import { versionSeen } from "@/lib/version";

/** What every list takes in its address: words to find, sorting, a page. Shared by client and server. */
export function listQuery<const Sorts extends readonly [string, ...string[]]>(sorts: Sorts) {
  return z.object({
    q: z.string().trim().max(200).optional(),
    sort: z.enum(sorts).default(sorts[0] as Sorts[number]),
    direction: z.enum(["asc", "desc"]).default("asc"),
    archived: z.enum(["hide", "only"]).default("hide"),
    cursor: z.string().max(600).optional(),
    most: z.coerce.number().int().min(1).max(100).default(50),
  });
}

export function listOf<Item extends z.ZodType>(item: Item) {
  return z.object({ items: z.array(item), next: z.string().nullable() });
}

/** What a change of a customer, a site or an instrument says beside its fields. */
export const recordChange = {
  version: versionSeen,
  archived: z.boolean().optional(),
  /** Archives although visits are not over yet. */
  confirm: z.boolean().optional(),
};

export type ListPage<Item> = { items: Item[]; next: string | null };
