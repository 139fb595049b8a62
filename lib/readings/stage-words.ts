import { showDayOf } from "@/lib/dates";
import type { Stage } from "./schema";

export const stageWords: Record<Stage, string> = {
  "as-found": "as found",
  "after-raise": "after raise",
  "as-left": "as left",
};

/** "14 May 2026, as found": how a sheet is called wherever one is chosen. */
export function sheetName(
  sheet: { stage: Stage; takenAt: string },
  locale: string,
  timeZone: string,
): string {
  return `${showDayOf(sheet.takenAt, locale, timeZone)}, ${stageWords[sheet.stage]}`;
}
