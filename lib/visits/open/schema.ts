import { z } from "zod";
import { visitRow } from "../schema";

/** What archiving a record is asked about: its visits that are not over yet, the earliest first. */
export const openVisits = z.object({
  /** All of them; the list below may be shorter. */
  count: z.int(),
  visits: z.array(visitRow.pick({ id: true, start: true, end: true, state: true, siteName: true })),
});

export type OpenVisits = z.infer<typeof openVisits>;
