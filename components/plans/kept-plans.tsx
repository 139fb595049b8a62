"use client";

import { useQuery } from "@tanstack/react-query";
import { StateWord } from "@/components/ui/state-word";
import { ErrorState, LoadingLines } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import { showInstant } from "@/lib/dates";
import { planKeys } from "@/lib/plans/keys";
import { temperamentName } from "@/lib/plans/rules";
import type { PlanRow } from "@/lib/plans/schema";

const exportLook = "touch:inline-flex touch:h-11 touch:min-w-11 touch:items-center touch:justify-center";

/** Plans saved from this sheet; each stays as it was computed. */
export function KeptPlans({
  sheetId,
  locale,
  timeZone,
}: {
  sheetId: string;
  locale: string;
  timeZone: string;
}) {
  const { data, error, refetch } = useQuery({
    queryKey: planKeys.plans(sheetId),
    queryFn: ({ signal }) => fetchJson<{ items: PlanRow[] }>(`/api/v1/sheets/${sheetId}/plans`, { signal }),
  });
  return (
    <section aria-labelledby="kept-heading" className="mt-8">
      <h3 id="kept-heading">Kept plans</h3>
      {error ? (
        <ErrorState
          title="The kept plans did not load"
          action={
            <button type="button" className="font-semibold text-iron" onClick={() => refetch()}>
              Try again
            </button>
          }
        >
          {error.message}
        </ErrorState>
      ) : !data ? (
        <LoadingLines label="Loading the kept plans" lines={2} row="h-11" />
      ) : data.items.length === 0 ? (
        <p className="mt-1 text-ink-soft">None yet. A saved plan stays as it is, whatever is read later.</p>
      ) : (
        <ul className="mt-2 border-edge border-t">
          {data.items.map((plan) => (
            <li
              key={plan.id}
              className="flex min-h-11 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-hairline border-b py-2"
            >
              <span>
                <b className="font-semibold">{plan.styleName}</b>, {temperamentName(plan.temperament)}, A4{" "}
                {plan.referenceHz} Hz
                <span className="block text-12 text-ink-soft">
                  {showInstant(plan.createdAt, locale, timeZone)}
                  {plan.madeByName ? `, ${plan.madeByName}` : ""}
                </span>
              </span>
              <span className="flex items-center gap-4">
                {plan.jobId ? (
                  plan.supersededAt === null ? (
                    <StateWord kind="done">the visit's plan</StateWord>
                  ) : (
                    <StateWord kind="returned">replaced</StateWord>
                  )
                ) : null}
                <a href={`/api/v1/plans/${plan.id}/export?format=csv`} download className={exportLook}>
                  CSV
                </a>
                <a href={`/api/v1/plans/${plan.id}/export?format=json`} download className={exportLook}>
                  JSON
                </a>
              </span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
