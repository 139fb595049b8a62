"use client";

import { useId } from "react";
import { Checkbox } from "@/components/forms/checkbox";
import { FieldError } from "@/components/forms/field";
import { TextInput } from "@/components/forms/text-input";
import { Button } from "@/components/ui/button";

export type InstrumentChoice = { id: string; name: string; room: string; serial: string };
export type ChosenJob = { instrumentId: string; work?: string | undefined };

/** The instruments of a site to tick, each with the words for its work. */
export function WorkChoice({
  instruments,
  jobs,
  onChange,
  error,
}: {
  instruments: readonly InstrumentChoice[];
  jobs: readonly ChosenJob[];
  onChange: (jobs: ChosenJob[]) => void;
  error?: string | undefined;
}) {
  const errorId = useId();
  const chosen = new Map(jobs.map((job) => [job.instrumentId, job]));
  // In the order of the list, whatever the order of ticking: it is the order of the work.
  const inOrder = (next: ReadonlyMap<string, ChosenJob>) =>
    onChange(instruments.flatMap(({ id }) => next.get(id) ?? []));

  function tick(id: string, on: boolean) {
    const next = new Map(chosen);
    if (on) next.set(id, { instrumentId: id, work: "Tuning" });
    else next.delete(id);
    inOrder(next);
  }

  return (
    <fieldset className="min-w-0">
      <legend className="font-medium">Instruments</legend>
      {instruments.length === 0 ? (
        <p className="mt-1 text-ink-soft">
          No instrument stands at this site yet. The visit can be booked without one.
        </p>
      ) : null}
      {instruments.length > 3 ? (
        <Button
          kind="quiet"
          size="small"
          className="-ml-2"
          onClick={() =>
            chosen.size === instruments.length
              ? onChange([])
              : inOrder(
                  new Map(
                    instruments.map(({ id }) => [id, chosen.get(id) ?? { instrumentId: id, work: "Tuning" }]),
                  ),
                )
          }
        >
          {chosen.size === instruments.length ? "Choose none" : `Choose all ${instruments.length}`}
        </Button>
      ) : null}
      <ul className="mt-1 border-t border-hairline">
        {instruments.map(({ id, name, room, serial }, index) => {
          const job = chosen.get(id);
          const more = [room, serial && `no. ${serial}`].filter(Boolean).join(", ");
          return (
            <li
              key={id}
              className="grid items-center gap-x-4 border-b border-hairline py-1 sm:min-h-14 sm:grid-cols-2"
            >
              <Checkbox
                label={
                  <>
                    {name} {more ? <span className="text-ink-soft">{more}</span> : null}
                  </>
                }
                name="jobs"
                // The first carries what is wrong with the choice, and takes the focus for it.
                aria-invalid={error && index === 0 ? true : undefined}
                aria-describedby={error ? errorId : undefined}
                checked={job !== undefined}
                onChange={(event) => tick(id, event.target.checked)}
              />
              {job ? (
                <TextInput
                  label={<span className="sr-only">Work on {name}</span>}
                  className="max-sm:mb-2 [&>div:first-child]:mb-0"
                  value={job.work ?? ""}
                  maxLength={200}
                  onChange={(event) => {
                    const next = new Map(chosen);
                    next.set(id, { instrumentId: id, work: event.target.value });
                    inOrder(next);
                  }}
                />
              ) : null}
            </li>
          );
        })}
      </ul>
      {error ? <FieldError id={errorId}>{error}</FieldError> : null}
    </fieldset>
  );
}
