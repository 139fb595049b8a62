import "server-only";
import type { z } from "zod";
import { addressQuery, type SearchParams } from "./ledger-request";

/**
 * A list's question as its address puts it. An address somebody typed may hold anything; what the list does not
 * understand is left out, as the ledger itself does.
 */
export function askedIn<Schema extends z.ZodType>(
  schema: Schema,
  params: SearchParams,
  filterIds: readonly string[],
): z.output<Schema> {
  const asked = schema.safeParse(addressQuery(params, filterIds));
  return asked.success ? asked.data : schema.parse({});
}
