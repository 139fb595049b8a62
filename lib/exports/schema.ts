import { z } from "zod";

export const sheetExportQuery = z.object({
  format: z.enum(["csv", "json"]).default("csv"),
  what: z.enum(["readings", "fits"]).default("readings"),
});

export const planExportQuery = z.object({ format: z.enum(["csv", "json"]).default("csv") });

export type SheetExportQuery = z.infer<typeof sheetExportQuery>;
