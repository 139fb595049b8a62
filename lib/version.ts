import { z } from "zod";

/** The largest number the database can keep as a version; a larger one is no version of anything. */
const largest = 2_147_483_647;

/** The version of a record its writer saw. */
export const versionSeen = z.int().positive().max(largest, "There is no such version.");

/** As `versionSeen`, where 0 stands for a record that is not there yet. */
export const versionOrNone = z.int().nonnegative().max(largest, "There is no such version.");

/** As `versionSeen`, from an address. */
export const versionInAddress = z.coerce.number().pipe(versionSeen);
