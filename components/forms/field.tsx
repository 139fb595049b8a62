import { type ReactNode, useId } from "react";
import { cx } from "../ui/class-names";
import { Sign } from "../ui/sign";

export type FieldProps = {
  label: ReactNode;
  help?: ReactNode;
  error?: string;
  /** Says "optional" beside the label; everything else is required. */
  optional?: boolean;
  /** A link at the end of the label's line, such as "Forgotten?". */
  aside?: ReactNode;
  className?: string;
};

export type ControlProps = {
  id: string;
  "aria-invalid": true | undefined;
  "aria-describedby": string | undefined;
};

/** Label, control, help and error, tied together by ids. Errors take the place of the help. */
export function Field({
  label,
  help,
  error,
  optional,
  aside,
  className,
  id,
  children,
}: FieldProps & { id?: string; children: (control: ControlProps) => ReactNode }) {
  const ownId = useId();
  const controlId = id ?? ownId;
  const helpId = `${controlId}-help`;
  const errorId = `${controlId}-error`;
  return (
    <div className={cx("min-w-0", className)}>
      <div className="mb-1 flex items-baseline gap-2">
        <label htmlFor={controlId} className="font-medium">
          {label}
        </label>
        {optional ? <span className="lab">optional</span> : null}
        {aside ? <span className="ml-auto">{aside}</span> : null}
      </div>
      {children({
        id: controlId,
        "aria-invalid": error ? true : undefined,
        "aria-describedby": error ? errorId : help ? helpId : undefined,
      })}
      {error ? (
        <FieldError id={errorId}>{error}</FieldError>
      ) : help ? (
        <p id={helpId} className="lab mt-1">
          {help}
        </p>
      ) : null}
    </div>
  );
}

export function FieldError({ id, children }: { id?: string; children: ReactNode }) {
  return (
    <p id={id} className="mt-1 flex items-start gap-1.5 text-rust">
      <Sign name="attention" className="mt-[3px]" />
      <span>{children}</span>
    </p>
  );
}

/** The words at the end of a field's box: a unit, or why it is fixed. */
export function Unit({ children }: { children: ReactNode }) {
  return <span className="ml-auto shrink-0 text-14 text-ink-soft">{children}</span>;
}
