import { AppLink } from "@/components/ui/app-link";
import { LinkButton } from "@/components/ui/button";
import { Sign } from "@/components/ui/sign";
import { EmptyState } from "@/components/ui/states";
import { showInstant } from "@/lib/dates";
import type { VisitJob } from "@/lib/visits/schema";

const stages: Record<VisitJob["sheets"][number]["stage"], string> = {
  "as-found": "As found",
  "after-raise": "After raise",
  "as-left": "As left",
};

/** The instruments of a visit, the work on each, and the readings taken on it. */
export function VisitJobs({
  jobs,
  canRecord,
  locale,
  timeZone,
}: {
  jobs: readonly VisitJob[];
  /** Whether this person may take readings on this visit. */
  canRecord: boolean;
  locale: string;
  timeZone: string;
}) {
  if (jobs.length === 0) {
    return (
      <EmptyState title="No instrument on this visit yet">
        Add them under “Other steps”; reading sheets hang on the instruments of a visit.
      </EmptyState>
    );
  }
  return (
    <ul className="border-t border-edge!">
      {jobs.map((job) => (
        <li key={job.id} className="border-b border-hairline py-3">
          <div className="flex flex-wrap items-start justify-between gap-x-4 gap-y-2">
            <div className="min-w-0">
              <h3>
                <AppLink href={`/instruments/${job.instrumentId}`} className="rounded-sm hover:underline">
                  {job.instrument}
                </AppLink>
              </h3>
              <p className="mt-0.5 max-lg:text-16">
                {job.work}
                {job.room ? <span className="text-ink-soft">, {job.room}</span> : null}
              </p>
            </div>
            {canRecord ? (
              <LinkButton
                href={`/instruments/${job.instrumentId}/sheets/new?job=${job.id}`}
                className="max-sm:w-full"
                data-no-print
              >
                <Sign name="plus" size={12} />
                New reading sheet
                <span className="sr-only"> for {job.instrument}</span>
              </LinkButton>
            ) : null}
          </div>
          <Sheets job={job} locale={locale} timeZone={timeZone} />
        </li>
      ))}
    </ul>
  );
}

function Sheets({ job, locale, timeZone }: { job: VisitJob; locale: string; timeZone: string }) {
  if (job.sheets.length === 0) return <p className="lab mt-2">No readings on this visit yet.</p>;
  return (
    <ul className="mt-2">
      {job.sheets.map((sheet) => (
        <li key={sheet.id}>
          <AppLink
            href={`/instruments/${job.instrumentId}/sheets/${sheet.id}`}
            className="flex min-h-9 flex-wrap items-center gap-x-3 rounded hover:bg-cover touch:min-h-11"
          >
            <span className="link font-medium">{stages[sheet.stage]}</span>
            <span>{sheet.notes === 1 ? "1 note" : `${sheet.notes} notes`}</span>
            <span className="lab ml-auto">{showInstant(sheet.takenAt, locale, timeZone)}</span>
          </AppLink>
        </li>
      ))}
    </ul>
  );
}
