import { fixed, signed } from "@/components/charts/format";
import { noteText } from "@/components/charts/note-spelling";
import { dayOf, showDayOf, showTime } from "@/lib/dates";
import { temperamentName } from "@/lib/plans/rules";
import {
  isRead,
  type KeptPlan,
  type NoteCount,
  type Progress,
  type Standing,
  type Step,
} from "@/lib/visits/progress/rules";
import type { JobProgress, OpenedJob, VisitWork } from "@/lib/visits/progress/service";
import { wallTimeOf } from "@/lib/wall-time";

/** The words of a job's rows. Sharps in them are still to be drawn. */

const usualReference = 440;

/** "A4 +3.8 cents, 58 %, 21.4 °C": what of it was taken. */
export function standingWords(standing: Standing): string {
  const { humidityPercent, temperatureC } = standing;
  return [
    pitchWords(standing),
    humidityPercent === null ? null : `${fixed(humidityPercent, 0)} %`,
    temperatureC === null ? null : `${fixed(temperatureC, 1)} °C`,
  ]
    .filter((part) => part !== null)
    .join(", ");
}

function pitchWords({ a4Cents, pitchCents, notes, referenceHz }: Standing): string {
  if (a4Cents === null && pitchCents === null) return "pitch not read yet";
  const from = referenceHz === usualReference ? "" : ` from ${referenceHz} Hz`;
  if (a4Cents !== null) return `A4 ${signed(a4Cents, 1)} cents${from}`;
  return `${signed(pitchCents, 1)} cents${from} over ${notesWords(notes)}`;
}

function notesWords(notes: number): string {
  return notes === 1 ? "1 note" : `${notes} notes`;
}

/** "17 notes: 15 good, 1 usable, 1 to repeat; E6 does not belong". */
export function readingsWords(count: NoteCount, strangers: readonly { midi: number }[]): string {
  const parts = [
    count.good > 0 && `${count.good} good`,
    count.usable > 0 && `${count.usable} usable`,
    count.repeat > 0 && `${count.repeat} to repeat`,
  ].filter(Boolean);
  const read = `${notesWords(count.notes)}: ${parts.join(", ")}`;
  if (strangers.length === 0) return read;
  const names = strangers.map(({ midi }) => noteText(midi));
  const last = names.pop();
  const who = names.length === 0 ? last : `${names.join(", ")} and ${last}`;
  return `${read}; ${who} ${strangers.length === 1 ? "does" : "do"} not belong`;
}

/** "Even harbour, equal, A4 440 Hz". */
export function planWords({ styleName, temperament, referenceHz }: KeptPlan): string {
  return `${styleName}, ${temperamentName(temperament)}, A4 ${referenceHz} Hz`;
}

export const needed = {
  found: "Read A4 and the humidity before anything is tuned",
  readings: "A few notes in each register, so that a plan can rest on them",
  left: "Read A4, one octave and the humidity when it is tuned",
};

/** A job that is not opened, in one line. */
export function jobLine({ found, readings, plan, left }: Progress): string {
  if (left && isRead(left)) return `As left ${standingWords(left)}`;
  const parts = [
    found && `as found ${standingWords(found)}`,
    readings && notesWords(readings.notes),
    plan && `plan ${plan.styleName}`,
  ].filter(Boolean);
  const line = parts.join("; ");
  return line ? line.charAt(0).toUpperCase() + line.slice(1) : "Nothing read yet";
}

export function jobStage({ found, readings, plan, left }: Progress): "done" | "half" | "open" {
  if (isRead(left)) return "done";
  return found || readings || plan ? "half" : "open";
}

/** The time alone on the visit's own day, else the day. */
export function takenWords(
  takenAt: string,
  { day, locale, timeZone }: { day: string; locale: string; timeZone: string },
): string {
  if (dayOf(takenAt, timeZone) !== day) return showDayOf(takenAt, locale, timeZone);
  return showTime(wallTimeOf(new Date(takenAt), timeZone), locale);
}

type Opened = Pick<OpenedJob, "next" | "strangers">;

/** What stands on the button that leads on: "look at E6". */
function stepWords(step: Step, strangers: readonly { midi: number }[]): string {
  const [first] = strangers;
  const words: Record<Step, string> = {
    found: "read as found",
    look: first ? `look at ${noteText(first.midi)}` : "look at the readings",
    plan: "choose a plan",
    left: "read as left",
  };
  return words[step];
}

export function stepHref(step: Step, job: JobProgress): string {
  const { found, readings, left } = job.progress;
  switch (step) {
    case "found":
      return found ? sheetHref(job, found.sheetId) : newSheetHref(job, "as-found");
    case "look":
      return inharmonicityHref(job);
    case "plan":
      return stretchHref(job, readings?.sheetId);
    case "left":
      return left ? sheetHref(job, left.sheetId) : newSheetHref(job, "as-left");
  }
}

/** "Continue: look at E6", and where it leads. */
function continuing(job: JobProgress, { next, strangers }: Opened): GoOn | null {
  return next ? { label: `Continue: ${stepWords(next, strangers)}`, href: stepHref(next, job) } : null;
}

export type GoOn = { label: string; href: string };

/** Where the work under way goes on: the opened job's next step, else the first other job not read as left. */
export function goesOn(
  {
    visit,
    jobs,
    opened,
    canRecord,
  }: Pick<VisitWork, "jobs" | "opened" | "canRecord"> & {
    visit: Pick<VisitWork["visit"], "state">;
  },
  href: string,
): GoOn | null {
  const job = jobs.find(({ id }) => id === opened?.jobId);
  const step = job && opened ? continuing(job, opened) : null;
  if (step || visit.state !== "in-progress" || !canRecord) return step;
  const other = jobs.find(({ progress }) => !isRead(progress.left));
  return other ? { label: `Continue: ${other.instrument}`, href: `${href}?job=${other.id}` } : null;
}

type At = Pick<JobProgress, "id" | "instrumentId">;

export function sheetHref({ instrumentId }: Pick<At, "instrumentId">, sheetId: string): string {
  return `/instruments/${instrumentId}/sheets/${sheetId}`;
}

export function newSheetHref({ id, instrumentId }: At, stage?: "as-found" | "as-left"): string {
  return `/instruments/${instrumentId}/sheets/new?job=${id}${stage ? `&stage=${stage}` : ""}`;
}

export function stretchHref({ instrumentId }: At, sheetId: string | undefined): string {
  return `/instruments/${instrumentId}/stretch${sheetId ? `?sheet=${sheetId}` : ""}`;
}

export function inharmonicityHref({ instrumentId, progress }: JobProgress): string {
  const sheetId = progress.readings?.sheetId;
  return `/instruments/${instrumentId}${sheetId ? `?sheet=${sheetId}` : ""}`;
}
