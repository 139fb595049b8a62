import { showWallTime } from "@/lib/dates";
import type { findVisitsOf } from "@/lib/instruments/history/service";

const MOST_JOBS = 20;

/** The visits a sheet can belong to, newest first, the one it has always among them. */
export function sheetJobs(
  visits: Awaited<ReturnType<typeof findVisitsOf>>,
  locale: string,
  chosen: string | null,
): { id: string; label: string }[] {
  return visits
    .filter(({ jobId }, index) => index < MOST_JOBS || jobId === chosen)
    .map(({ jobId, startsLocal, work }) => ({
      id: jobId,
      label: [showWallTime(startsLocal, locale), work].filter(Boolean).join(", "),
    }));
}
