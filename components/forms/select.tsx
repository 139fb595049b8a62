"use client";

import type { ComponentProps } from "react";
import { Sign } from "../ui/sign";
import { Field, type FieldProps } from "./field";

export type SelectOption = { value: string; label: string; disabled?: boolean };

/** The system's own list: it knows the phone, the keyboard and the screen reader better than we do. */
export function Select({
  label,
  help,
  error,
  optional,
  aside,
  className,
  id,
  options,
  placeholder,
  ...input
}: FieldProps &
  Omit<ComponentProps<"select">, "className" | "children"> & {
    options: readonly SelectOption[];
    placeholder?: string;
  }) {
  return (
    <Field {...{ label, help, error, optional, aside, className, id }}>
      {(control) => (
        <span className="field-box relative pr-0! pl-0!" data-invalid={error ? "" : undefined}>
          <select
            {...control}
            {...input}
            className="h-[42px] w-full min-w-0 appearance-none truncate rounded border-0 bg-transparent pr-9 pl-3 text-16 text-ink outline-none disabled:text-ink-soft"
          >
            {placeholder === undefined ? null : <option value="">{placeholder}</option>}
            {options.map((option) => (
              <option key={option.value} value={option.value} disabled={option.disabled}>
                {option.label}
              </option>
            ))}
          </select>
          <Sign name="chevron-down" className="pointer-events-none absolute right-3 text-ink-soft" />
        </span>
      )}
    </Field>
  );
}
