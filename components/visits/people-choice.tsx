"use client";

import { useId } from "react";
import { Checkbox } from "@/components/forms/checkbox";
import { FieldError } from "@/components/forms/field";

/** Who comes: one or more of those who can be booked. */
export function PeopleChoice({
  people,
  chosen,
  fixedId,
  onChange,
  error,
}: {
  people: readonly { id: string; name: string }[];
  chosen: readonly string[];
  /** A technician's own name stays ticked: the visits of others are the office's. */
  fixedId?: string | undefined;
  onChange: (ids: string[]) => void;
  error?: string | undefined;
}) {
  const errorId = useId();
  return (
    <fieldset className="min-w-0">
      <legend className="font-medium">Comes</legend>
      {people.length === 0 ? (
        <p className="mt-1 text-ink-soft">Nobody can be booked yet. The owner says who can, under Shop.</p>
      ) : null}
      <div className="flex flex-wrap gap-x-6">
        {people.map(({ id, name }, index) => (
          <Checkbox
            key={id}
            name="technicianIds"
            // The first carries what is wrong with the choice, and takes the focus for it.
            aria-invalid={error && index === 0 ? true : undefined}
            aria-describedby={error ? errorId : undefined}
            label={name}
            checked={chosen.includes(id)}
            disabled={id === fixedId}
            onChange={(event) =>
              onChange(event.target.checked ? [...chosen, id] : chosen.filter((other) => other !== id))
            }
          />
        ))}
      </div>
      {fixedId ? <p className="lab">You book your own visits; the office books those of others.</p> : null}
      {error ? <FieldError id={errorId}>{error}</FieldError> : null}
    </fieldset>
  );
}
