"use client";

import { type ComponentProps, useState } from "react";
import { cx } from "../ui/class-names";
import { Field, type FieldProps, Unit } from "./field";

const bare =
  "w-full min-w-0 flex-1 self-stretch border-0 bg-transparent p-0 text-16 text-ink outline-none disabled:text-ink-soft";

export type TextInputProps = FieldProps &
  Omit<ComponentProps<"input">, "className" | "size"> & {
    unit?: string;
    /** Why the value is fixed; makes the field read-only and says so in its place. */
    fixed?: string;
  };

export function TextInput({
  label,
  help,
  error,
  optional,
  aside,
  className,
  unit,
  fixed,
  id,
  type = "text",
  ...input
}: TextInputProps) {
  return (
    <Field {...{ label, help, error, optional, aside, className, id }}>
      {(control) => (
        <span className="field-box" data-invalid={error ? "" : undefined}>
          <input
            {...control}
            {...input}
            type={type}
            readOnly={fixed ? true : input.readOnly}
            className={bare}
          />
          {fixed || unit ? <Unit>{fixed ?? unit}</Unit> : null}
        </span>
      )}
    </Field>
  );
}

/**
 * A text field that brings up the number pad. Not type="number": that one swallows what it does not
 * understand, changes the value under the wheel and refuses a decimal comma.
 */
export function NumberInput({ whole = false, ...props }: TextInputProps & { whole?: boolean }) {
  return (
    <TextInput
      inputMode={whole ? "numeric" : "decimal"}
      autoComplete="off"
      autoCorrect="off"
      spellCheck={false}
      {...props}
    />
  );
}

/** The person sees what is typed when asked; the field stays one field, so password keepers recognise it. */
export function PasswordInput({
  label,
  help,
  error,
  optional,
  aside,
  className,
  id,
  autoComplete = "current-password",
  ...input
}: FieldProps & Omit<ComponentProps<"input">, "className" | "size" | "type">) {
  const [shown, setShown] = useState(false);
  return (
    <Field {...{ label, help, error, optional, aside, className, id }}>
      {(control) => (
        <span className="field-box" data-invalid={error ? "" : undefined}>
          <input
            {...control}
            {...input}
            type={shown ? "text" : "password"}
            autoComplete={autoComplete}
            autoCapitalize="none"
            spellCheck={false}
            className={bare}
          />
          <button
            type="button"
            className="link -mr-3 flex h-[42px] shrink-0 items-center rounded px-3 text-14"
            aria-pressed={shown}
            aria-label={shown ? "Hide the password" : "Show the password"}
            onClick={() => setShown(!shown)}
          >
            {shown ? "Hide" : "Show"}
          </button>
        </span>
      )}
    </Field>
  );
}

export function TextArea({
  label,
  help,
  error,
  optional,
  aside,
  className,
  id,
  rows = 4,
  words = false,
  ...input
}: FieldProps & Omit<ComponentProps<"textarea">, "className"> & { words?: boolean }) {
  return (
    <Field {...{ label, help, error, optional, aside, className, id }}>
      {(control) => (
        <span className="field-box" data-invalid={error ? "" : undefined}>
          <textarea
            {...control}
            {...input}
            rows={rows}
            className={cx(bare, "min-h-24 resize-y py-2.5", words && "note")}
          />
        </span>
      )}
    </Field>
  );
}
