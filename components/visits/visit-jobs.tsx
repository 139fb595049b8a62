import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { Sign } from "@/components/ui/sign";
import { EmptyState } from "@/components/ui/states";
import { isFarFlat } from "@/lib/visits/progress/rules";
import type { JobProgress, OpenedJob, VisitWork } from "@/lib/visits/progress/service";
import { JobBackground } from "./job-background";
import { JobRow } from "./job-row";
import { JobSteps, type VisitClock } from "./job-steps";
import { jobLine, jobStage, newSheetHref } from "./progress-words";

/** The instruments of a visit: one opened with its steps, each other in a line that opens it. */
export function VisitJobs({
  work: { visit, jobs, opened, canRecord },
  href,
  locale,
  named = false,
}: {
  work: VisitWork;
  /** The page these stand on. */
  href: string;
  locale: string;
  /** The page's own heading names the only instrument already. */
  named?: boolean;
}) {
  if (jobs.length === 0) {
    return (
      <EmptyState title="No instrument on this visit yet">
        Add them under “Other steps”; reading sheets hang on the instruments of a visit.
      </EmptyState>
    );
  }
  const clock: VisitClock = { day: visit.start.slice(0, 10), locale, timeZone: visit.timeZone };
  const openAt = jobs.findIndex(({ id }) => id === opened?.jobId);
  const job = jobs[openAt];
  return (
    <>
      <JobLines jobs={jobs.slice(0, openAt)} href={href} label="Instruments before" />
      {job && opened ? (
        <section aria-label={job.instrument} className={jobs.length > 1 ? "pt-4 pb-6" : undefined}>
          {named ? null : (
            <div className="mb-3 flex flex-wrap items-baseline gap-x-3">
              <h3>
                <AppLink
                  href={`/instruments/${job.instrumentId}`}
                  className="rounded-sm hover:underline touch:inline-flex touch:min-h-11 touch:items-center"
                >
                  {job.instrument}
                </AppLink>
              </h3>
              <p className="text-ink-soft max-lg:text-16">
                {[job.work, job.room].filter(Boolean).join(", ")}
              </p>
            </div>
          )}
          <OpenedJobWork job={job} opened={opened} clock={clock} canRecord={canRecord} />
        </section>
      ) : null}
      <JobLines jobs={jobs.slice(openAt + 1)} href={href} label="Instruments after" />
    </>
  );
}

function OpenedJobWork({
  job,
  opened,
  clock,
  canRecord,
}: {
  job: JobProgress;
  opened: OpenedJob;
  clock: VisitClock;
  canRecord: boolean;
}) {
  return (
    <>
      <JobSteps job={job} opened={opened} clock={clock} />
      {canRecord ? (
        <LinkButton size="small" href={newSheetHref(job)} className="mt-3 max-sm:w-full" data-no-print>
          <Sign name="plus" size={12} />
          New reading sheet
          <span className="sr-only"> for {job.instrument}</span>
        </LinkButton>
      ) : null}
      <JobBackground
        instrumentId={job.instrumentId}
        opened={opened}
        farFlat={isFarFlat(job.progress.found)}
        locale={clock.locale}
      />
    </>
  );
}

function JobLines({ jobs, href, label }: { jobs: readonly JobProgress[]; href: string; label: string }) {
  if (jobs.length === 0) return null;
  return (
    <ul aria-label={label} className="border-t border-edge!">
      {jobs.map((job) => (
        <JobRow
          key={job.id}
          state={jobStage(job.progress)}
          name={job.instrument}
          href={`${href}?job=${job.id}`}
          words={jobLine(job.progress)}
          end={job.room || undefined}
        />
      ))}
    </ul>
  );
}
