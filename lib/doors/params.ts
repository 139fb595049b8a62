import { z } from "zod";

export const idParams = z.object({ id: z.uuid() });

/** DELETE archives and takes the version in the address, since it has no body. */
export const versionQuery = z.object({ version: z.coerce.number().int().positive() });
