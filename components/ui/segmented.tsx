"use client";

import { type ReactNode, useId } from "react";
import { cx } from "./class-names";
import { Sign } from "./sign";

/** One of a few, all in sight. A radio group: arrow keys move, one tab stop. */
export function Segmented<V extends string>({
  label,
  hideLabel = true,
  options,
  value,
  onChange,
  disabled,
  big,
  className,
}: {
  label: string;
  hideLabel?: boolean;
  options: ReadonlyArray<{ value: V; label: ReactNode }>;
  value: V;
  onChange: (value: V) => void;
  disabled?: boolean;
  /** Fills the width and keeps 44 pixels everywhere. */
  big?: boolean;
  className?: string;
}) {
  const name = useId();
  return (
    <fieldset className={cx("min-w-0", className)} disabled={disabled}>
      <legend className={hideLabel ? "sr-only" : "mb-1 font-medium"}>{label}</legend>
      <span
        className={cx(
          "rounded border border-edge",
          big ? "flex h-11" : "inline-flex h-7 touch:h-11",
          "has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-2 has-[:focus-visible]:outline-brass",
        )}
      >
        {options.map((option, index) => (
          <label
            key={option.value}
            className={cx(
              "flex items-center justify-center gap-1.5 px-2.5 font-medium whitespace-nowrap text-ink-soft has-checked:bg-ink has-checked:font-semibold has-checked:text-sheet",
              big ? "flex-1 text-14" : "text-12 touch:px-3.5 touch:text-14",
              index === 0 ? "rounded-l-[5px]" : "border-l border-edge!",
              index === options.length - 1 && "rounded-r-[5px]",
            )}
          >
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={value === option.value}
              onChange={() => onChange(option.value)}
              className="sr-only"
            />
            {value === option.value ? <Sign name="tick" size={12} /> : null}
            {option.label}
          </label>
        ))}
      </span>
    </fieldset>
  );
}
