import type { Rhythm } from "../due/rules";

type Columns = {
  rhythm: Rhythm["kind"];
  every: number | null;
  unit: "week" | "month" | null;
  months: number[] | null;
  daysBefore: number | null;
};

/** A rhythm as the table keeps it: one column for each thing a kind may say. */
export function columnsOf(rhythm: Rhythm): Columns {
  const none: Omit<Columns, "rhythm"> = { every: null, unit: null, months: null, daysBefore: null };
  switch (rhythm.kind) {
    case "interval":
      return { ...none, rhythm: "interval", every: rhythm.every, unit: rhythm.unit };
    case "months":
      return { ...none, rhythm: "months", months: [...rhythm.months].sort((one, other) => one - other) };
    case "events":
      return { ...none, rhythm: "events", daysBefore: rhythm.daysBefore };
  }
}

/** The database's checks hold what each kind needs, so a gap here is a fault of ours. */
export function rhythmOf({ rhythm, every, unit, months, daysBefore }: Columns) {
  if (rhythm === "interval" && every !== null && unit) return { kind: "interval" as const, every, unit };
  if (rhythm === "months" && months) return { kind: "months" as const, months };
  if (rhythm === "events" && daysBefore !== null) return { kind: "events" as const, daysBefore };
  throw new Error(`A service plan by ${rhythm} lacks its figures`);
}
