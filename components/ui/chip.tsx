"use client";

import type { ComponentProps } from "react";
import { cx } from "./class-names";
import { Sign } from "./sign";

const look =
  "inline-flex h-7 items-center gap-1.5 rounded border px-2.5 text-12 font-medium whitespace-nowrap touch:h-11 touch:px-3.5 touch:text-14";
const kept = "border-brass bg-brass-wash text-ink";
const free = "border-edge text-ink-soft hover:bg-cover";

/** A filter with a short list of values: the system's own list under the look of a chip. */
export function SelectChip({
  name,
  anyLabel = "any",
  options,
  value,
  onChange,
  ...rest
}: Omit<ComponentProps<"select">, "value" | "onChange" | "className"> & {
  name: string;
  anyLabel?: string;
  options: ReadonlyArray<{ value: string; label: string }>;
  value: string;
  onChange: (value: string) => void;
}) {
  const chosen = options.find((option) => option.value === value);
  return (
    <span
      className={cx(
        look,
        "relative has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-2 has-[:focus-visible]:outline-brass",
        chosen ? kept : free,
      )}
    >
      {chosen ? (
        <>
          {name} <b className="font-semibold">{chosen.label}</b>
        </>
      ) : (
        `${name}: ${anyLabel}`
      )}
      <Sign name="chevron-down" size={10} />
      <select
        {...rest}
        aria-label={name}
        value={chosen ? value : ""}
        onChange={(event) => onChange(event.target.value)}
        className="absolute -inset-px cursor-pointer opacity-0"
      >
        <option value="">{anyLabel}</option>
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </span>
  );
}
