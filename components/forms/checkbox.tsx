"use client";

import { type ComponentProps, type ReactNode, useId } from "react";
import { cx } from "../ui/class-names";
import { FieldError } from "./field";

const box =
  "relative size-5 shrink-0 appearance-none rounded-sm border-[1.5px] border-edge bg-sheet checked:border-ink checked:bg-ink indeterminate:border-ink indeterminate:bg-ink disabled:border-hairline disabled:bg-cover disabled:checked:bg-edge";

/** The box alone, for ledger rows; it needs an aria-label or a label around it. */
export function CheckMark({
  indeterminate = false,
  className,
  ...input
}: Omit<ComponentProps<"input">, "type" | "size"> & { indeterminate?: boolean }) {
  return (
    <span className={cx("relative inline-flex size-5 shrink-0 text-sheet", className)}>
      <input
        {...input}
        type="checkbox"
        ref={(element) => {
          if (element) element.indeterminate = indeterminate;
          if (typeof input.ref === "function") return input.ref(element);
          if (input.ref) input.ref.current = element;
        }}
        className={cx(box, "peer size-full!")}
      />
      <svg
        viewBox="0 0 14 14"
        aria-hidden="true"
        focusable="false"
        className="pointer-events-none absolute inset-[3px] hidden peer-checked:block peer-indeterminate:block"
      >
        <path
          d={indeterminate ? "M2.500 7h9" : "M2.500 7.500l3 3 6-7"}
          fill="none"
          stroke="currentColor"
          strokeWidth="1.75"
        />
      </svg>
    </span>
  );
}

export function Checkbox({
  label,
  help,
  error,
  className,
  ...input
}: Omit<ComponentProps<"input">, "type" | "size" | "className"> & {
  label: ReactNode;
  help?: ReactNode;
  error?: string;
  className?: string;
}) {
  const ownId = useId();
  const id = input.id ?? ownId;
  const describedBy = `${id}-more`;
  return (
    <div className={className}>
      <label htmlFor={id} className="flex min-h-11 items-center gap-2.5">
        <CheckMark
          {...input}
          id={id}
          aria-invalid={error ? true : input["aria-invalid"]}
          aria-describedby={help || error ? describedBy : input["aria-describedby"]}
        />
        <span>{label}</span>
      </label>
      {error ? (
        <FieldError id={describedBy}>{error}</FieldError>
      ) : help ? (
        <p id={describedBy} className="lab -mt-1.5 pl-[30px]">
          {help}
        </p>
      ) : null}
    </div>
  );
}
