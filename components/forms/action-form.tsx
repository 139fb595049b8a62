"use client";

import { type ReactNode, useEffect, useRef } from "react";
import type { FieldErrors } from "react-hook-form";
import { Button, type ButtonProps } from "../ui/button";
import { cx } from "../ui/class-names";
import { Sign } from "../ui/sign";
import type { ActionForm as State } from "./use-action-form";

/** The frame of a form made with useActionForm: summary of errors on top, fields, then its button. */
export function ActionForm({
  state,
  children,
  className,
  label,
}: {
  state: State;
  children: ReactNode;
  className?: string;
  label?: string;
}) {
  return (
    // "post", so that a press before the scripts are there cannot put what was typed into the address.
    <form
      method="post"
      noValidate
      onSubmit={state.submit}
      className={cx("grid gap-4", className)}
      aria-label={label}
    >
      <FormError state={state} />
      {children}
    </form>
  );
}

/**
 * Says why nothing was saved. After every failed attempt the focus goes to the first field that is wrong, or here
 * where no field is. Each field error is a link to its field; a network failure offers to send the same again.
 */
export function FormError({ state }: { state: State }) {
  const box = useRef<HTMLDivElement>(null);
  const { failure, attempts, form, busy } = state;
  const errors = listErrors(form.formState.errors);
  // What only needs confirming is asked beside its fields, see AskAgain.
  const refused = failure !== null && failure.code !== "needs-confirming";
  const shown = attempts > 0 && (refused || errors.length > 0);

  // The errors may be drawn after the attempt was counted; and an attempt takes the focus once, not again
  // when an error comes and goes while somebody types.
  const focusedFor = useRef(0);
  useEffect(() => {
    if (!shown || focusedFor.current === attempts) return;
    focusedFor.current = attempts;
    const wrong = box.current?.closest("form")?.querySelector<HTMLElement>('[aria-invalid="true"]');
    (wrong ?? box.current)?.focus();
  }, [shown, attempts]);

  if (!shown) return null;
  return (
    <div
      ref={box}
      tabIndex={-1}
      role="alert"
      className="border-l-3 border-rust! bg-rust-wash py-3 pr-3 pl-4 text-ink"
    >
      <p className="flex items-start gap-1.5 font-semibold">
        <Sign name="attention" className="mt-[3px] text-rust" />
        <span>{failure?.message ?? summary(errors.length)}</span>
      </p>
      {errors.length > 0 ? (
        <ul className="mt-1 grid gap-0.5 pl-5">
          {errors.map(({ path, message }) => (
            <li key={path}>
              <button
                type="button"
                className="link rounded-sm text-left text-ink!"
                onClick={() => fieldAt(box.current, path)?.focus()}
              >
                {message}
              </button>
            </li>
          ))}
        </ul>
      ) : null}
      {failure?.kind === "network" ? (
        <Button type="submit" size="small" busy={busy} className="mt-2 ml-5">
          Send again
        </Button>
      ) : null}
    </div>
  );
}

export function SubmitButton({
  state,
  children,
  kind = "primary",
  ...rest
}: Omit<ButtonProps, "busy" | "type"> & { state: Pick<State, "busy"> }) {
  return (
    <Button
      type="submit"
      kind={kind}
      busy={state.busy}
      // Leaving a field may show its error, which moves this button away from under the press that left it.
      onMouseDown={(event) => event.preventDefault()}
      {...rest}
    >
      {children}
    </Button>
  );
}

function summary(count: number): string {
  return count === 1 ? "One field needs another look." : `${count} fields need another look.`;
}

/** By its name; what is wrong with an entry of a list may be said at the list alone. */
function fieldAt(within: HTMLElement | null, path: string): HTMLElement | null {
  const form = within?.closest("form");
  const [list = path] = path.split(".");
  return (
    [path, list]
      .map((name) => form?.querySelector<HTMLElement>(`[name="${CSS.escape(name)}"]`))
      .find((field) => field) ?? null
  );
}

type ListedError = { path: string; message: string };

/** Flattens nested field errors into paths such as "lines.0.quantity". */
export function listErrors(errors: FieldErrors, prefix = ""): ListedError[] {
  const listed: ListedError[] = [];
  for (const [key, value] of Object.entries(errors)) {
    if (!value || typeof value !== "object" || key === "ref") continue;
    const path = prefix ? `${prefix}.${key}` : key;
    if ("message" in value && typeof value.message === "string")
      listed.push({ path, message: value.message });
    else listed.push(...listErrors(value as FieldErrors, path));
  }
  return listed;
}
