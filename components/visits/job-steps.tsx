import { SharpText } from "@/components/charts/note-name";
import { noteText } from "@/components/charts/note-spelling";
import { flagWords } from "@/components/plans/analysis-plots";
import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { isRead, type Standing, type Step } from "@/lib/visits/progress/rules";
import type { JobProgress, OpenedJob } from "@/lib/visits/progress/service";
import { JobRow } from "./job-row";
import {
  inharmonicityHref,
  needed,
  planWords,
  readingsWords,
  sheetHref,
  standingWords,
  stepHref,
  stretchHref,
  takenWords,
} from "./progress-words";

export type VisitClock = { day: string; locale: string; timeZone: string };

const begin: Record<Step, string> = {
  found: "Begin sheet",
  look: "Open it",
  plan: "Choose a plan",
  left: "Begin sheet",
};

/** How far the opened job is, step by step; what is in hand stands on the wash with its button. */
export function JobSteps({
  job,
  opened,
  clock,
}: {
  job: JobProgress;
  opened: Pick<OpenedJob, "next" | "strangers">;
  clock: VisitClock;
}) {
  const { found, raised, readings, plan, left, otherSheets } = job.progress;
  const { next, strangers } = opened;
  const [first] = strangers;
  const button = (step: Step, words = begin[step]) => (
    <LinkButton size="small" href={stepHref(step, job)} data-no-print>
      {words}
    </LinkButton>
  );
  const standing = (name: string, at: Standing | null, step?: "found" | "left") => {
    const inHand = step !== undefined && next === step;
    return (
      <JobRow
        state={isRead(at) ? "done" : "open"}
        name={name}
        href={at ? sheetHref(job, at.sheetId) : undefined}
        words={at ? capital(standingWords(at)) : step ? needed[step] : null}
        inHand={inHand}
        end={
          inHand
            ? button(step, at ? "Open sheet" : begin[step])
            : at
              ? takenWords(at.takenAt, clock)
              : undefined
        }
      />
    );
  };
  return (
    <ol aria-label={`Work on ${job.instrument}`} className="border-t border-edge!">
      {standing("As found", found, "found")}
      {raised ? standing("After raise", raised) : null}
      <JobRow
        state={readings ? "done" : "open"}
        name="Readings"
        href={readings ? sheetHref(job, readings.sheetId) : found ? sheetHref(job, found.sheetId) : undefined}
        words={readings ? <SharpText text={readingsWords(readings, strangers)} /> : needed.readings}
        end={readings ? takenWords(readings.takenAt, clock) : undefined}
      />
      {first ? (
        <JobRow
          state="half"
          name={`Look at ${noteText(first.midi)}`}
          href={next === "look" ? undefined : inharmonicityHref(job)}
          words={flagWords(first)}
          inHand={next === "look"}
          end={button("look")}
        />
      ) : null}
      <JobRow
        state={plan ? "done" : "open"}
        name="Plan"
        href={plan ? stretchHref(job, plan.sheetId) : undefined}
        words={
          plan ? (
            planWords(plan)
          ) : (
            <>
              None yet.{" "}
              {next === "plan" ? null : (
                <AppLink
                  href={stretchHref(job, readings?.sheetId)}
                  className="link relative touch:-my-3 touch:inline-block touch:py-3"
                >
                  See what the readings lead to
                </AppLink>
              )}
            </>
          )
        }
        inHand={next === "plan"}
        end={next === "plan" ? button("plan") : plan ? takenWords(plan.createdAt, clock) : undefined}
      />
      {standing("As left", left, "left")}
      {otherSheets.map((sheet) => (
        <JobRow
          key={sheet.id}
          state={sheet.notes > 0 ? "done" : "open"}
          name={`Also ${sheetStages[sheet.stage]}`}
          href={sheetHref(job, sheet.id)}
          words={sheet.notes === 1 ? "1 note" : `${sheet.notes} notes`}
          end={takenWords(sheet.takenAt, clock)}
        />
      ))}
    </ol>
  );
}

const sheetStages = { "as-found": "as found", "after-raise": "after raise", "as-left": "as left" } as const;

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
