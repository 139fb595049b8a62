"use client";

import { type ComponentProps, type MouseEvent, useId } from "react";
import { AppLink, type AppLinkProps } from "./app-link";
import { type ButtonKind, type ButtonSize, buttonLook } from "./button-look";
import { cx } from "./class-names";
import { Sign } from "./sign";

export type ButtonProps = Omit<ComponentProps<"button">, "disabled"> & {
  kind?: ButtonKind;
  size?: ButtonSize;
  /** Work is under way: the words change, the width holds, a second press does nothing. */
  busy?: boolean;
  busyLabel?: string;
  /** Why it cannot be used now. Said beside the button and to screen readers; the button stays reachable. */
  disabledReason?: string;
  /** Keeps the reason for screen readers only, where the page already says it. */
  hideReason?: boolean;
};

export function Button({
  kind = "secondary",
  size = "normal",
  busy = false,
  busyLabel,
  disabledReason,
  hideReason = false,
  type = "button",
  className,
  children,
  onClick,
  "aria-describedby": describedBy,
  ...rest
}: ButtonProps) {
  const reasonId = useId();
  const off = busy || Boolean(disabledReason);

  function press(event: MouseEvent<HTMLButtonElement>) {
    // aria-disabled keeps the control in the tab order, so its reason can be read; the press is stopped here.
    if (off) {
      event.preventDefault();
      return;
    }
    onClick?.(event);
  }

  const button = (
    <button
      type={type}
      className={buttonLook(kind, size, { disabled: Boolean(disabledReason), className })}
      aria-disabled={off || undefined}
      aria-busy={busy || undefined}
      aria-describedby={cx(describedBy, disabledReason && reasonId) || undefined}
      onClick={press}
      {...rest}
    >
      {kind === "danger" && !disabledReason ? <Sign name="attention" /> : null}
      {busy ? (busyLabel ?? children) : children}
      {busy ? <BusyString /> : null}
    </button>
  );

  if (!disabledReason) return button;
  return (
    <span className={cx("inline-flex items-center gap-2", size === "big" && "w-full flex-col items-stretch")}>
      {button}
      <span id={reasonId} className={hideReason ? "sr-only" : "lab"}>
        {disabledReason}
      </span>
    </span>
  );
}

/** A short string with its stud travelling along it: work under way, in the shape of the motif. */
function BusyString() {
  return (
    <span aria-hidden="true" className="relative inline-block h-[7px] w-6 overflow-hidden">
      <span className="absolute inset-x-0 top-[3px] h-px bg-current opacity-60" />
      <span className="absolute top-0 left-0 h-[7px] w-2.5 animate-[busy-stud_900ms_ease-in-out_infinite_alternate] rounded-sm bg-current" />
    </span>
  );
}

export type LinkButtonProps = AppLinkProps & { kind?: ButtonKind; size?: ButtonSize };

export function LinkButton({ kind = "secondary", size = "normal", className, ...rest }: LinkButtonProps) {
  return <AppLink className={buttonLook(kind, size, { className })} {...rest} />;
}
