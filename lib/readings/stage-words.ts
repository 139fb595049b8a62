import { showDayOf, showInstant } from "@/lib/dates";
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

type Named = { id: string; stage: Stage; takenAt: string };

/** The names of several sheets side by side: two of one day and stage are told apart by the hour. */
export function sheetNames(
  sheets: readonly Named[],
  locale: string,
  timeZone: string,
): (sheet: Named) => string {
  const names = new Map(sheets.map((sheet) => [sheet.id, sheetName(sheet, locale, timeZone)]));
  const often = (name: string) => [...names.values()].filter((each) => each === name).length > 1;
  return (sheet) => {
    const name = names.get(sheet.id) ?? sheetName(sheet, locale, timeZone);
    return often(name) ? `${showInstant(sheet.takenAt, locale, timeZone)}, ${stageWords[sheet.stage]}` : name;
  };
}
