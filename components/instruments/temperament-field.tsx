"use client";

import { useId, useState } from "react";
import { FieldError } from "@/components/forms/field";
import { Select } from "@/components/forms/select";
import { readNumber } from "@/components/forms/use-action-form";
import { NoteName } from "@/components/ui/glyphs";
import { TEMPERAMENT_NAMES, temperamentOffsets } from "@/lib/acoustics/temperament";
import { temperamentLabels } from "@/lib/instruments/rules";

const notes = ["C", "C#", "D", "D#", "E", "F", "F#", "G", "G#", "A", "A#", "B"];
const own = "own";

const options = [
  ...TEMPERAMENT_NAMES.map((name) => ({ value: name, label: temperamentLabels[name] })),
  { value: own, label: "Own, twelve offsets" },
];

/** A named temperament, or twelve offsets of one's own that begin as the one that was chosen before. */
export function TemperamentField({
  value,
  onChange,
  error,
  errors,
}: {
  value: unknown;
  onChange: (value: unknown) => void;
  error?: string;
  /** By note, where one offset is wrong. */
  errors: readonly (string | undefined)[];
}) {
  const [typed, setTyped] = useState<string[]>(() => (Array.isArray(value) ? value.map(String) : []));
  const id = useId();
  const isOwn = Array.isArray(value);

  function choose(name: string) {
    if (name !== own) return onChange(name);
    const known = TEMPERAMENT_NAMES.find((one) => one === value);
    const offsets = temperamentOffsets(known ?? "equal").map((cents) => Number(cents.toFixed(2)));
    setTyped(offsets.map(String));
    onChange(offsets);
  }

  function type(index: number, text: string) {
    const next = typed.map((old, at) => (at === index ? text : old));
    setTyped(next);
    // What is no number goes on as typed, for the schema to refuse beside its field.
    onChange(next.map((one) => readNumber(one) ?? one));
  }

  return (
    <div>
      <Select
        label="Temperament"
        name={isOwn ? undefined : "temperament"}
        options={options}
        value={isOwn ? own : String(value ?? "equal")}
        onChange={(event) => choose(event.target.value)}
        error={isOwn ? undefined : error}
      />
      {isOwn ? (
        <fieldset className="mt-3">
          <legend className="lab mb-1">Cents from equal temperament</legend>
          <div className="grid grid-cols-4 gap-2 sm:grid-cols-6">
            {notes.map((note, index) => (
              <div key={note} className="min-w-0">
                <label htmlFor={`${id}-${note}`} className="lab mb-0.5 block">
                  <NoteName name={note} />
                </label>
                <span className="field-box px-2!" data-invalid={errors[index] ? "" : undefined}>
                  <input
                    id={`${id}-${note}`}
                    name={`temperament.${index}`}
                    inputMode="decimal"
                    autoComplete="off"
                    value={typed[index] ?? ""}
                    aria-invalid={errors[index] ? true : undefined}
                    onChange={(event) => type(index, event.target.value)}
                    className="w-full min-w-0 self-stretch border-0 bg-transparent text-right text-16 outline-none"
                  />
                </span>
              </div>
            ))}
          </div>
          {errors.map((message, index) =>
            message ? (
              <FieldError key={notes[index]}>
                <NoteName name={notes[index] ?? ""} />: {message}
              </FieldError>
            ) : null,
          )}
          {error ? <FieldError>{error}</FieldError> : null}
        </fieldset>
      ) : null}
    </div>
  );
}
