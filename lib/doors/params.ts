import { z } from "zod";
import { versionInAddress } from "@/lib/version";

export const idParams = z.object({ id: z.uuid() });

/** DELETE archives and takes the version in the address, since it has no body. */
export const versionQuery = z.object({ version: versionInAddress });

/** The same for a record that visits hang on: `confirm=true` archives it although some are not over yet. */
export const archiveQuery = versionQuery.extend({ confirm: z.stringbool().optional() });

export type ArchiveQuery = z.infer<typeof archiveQuery>;
