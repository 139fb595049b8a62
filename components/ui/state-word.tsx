import type { ReactNode } from "react";
import { cx } from "./class-names";
import { Sign, type SignName } from "./sign";

export type StateKind =
  | "done"
  | "attention"
  | "waiting"
  | "open"
  | "partial"
  | "unsure"
  | "draft"
  | "sent"
  | "phone"
  | "phone-waiting"
  | "returned"
  | "stopped";

const looks: Record<StateKind, { sign: SignName; colour: string }> = {
  done: { sign: "tick", colour: "text-spruce" },
  attention: { sign: "attention", colour: "text-rust" },
  waiting: { sign: "clock", colour: "text-brass" },
  open: { sign: "clock", colour: "text-ink" },
  partial: { sign: "half", colour: "text-brass" },
  unsure: { sign: "half", colour: "text-ink" },
  draft: { sign: "dashed", colour: "text-ink-soft" },
  sent: { sign: "arrow-right", colour: "text-ink-soft" },
  phone: { sign: "phone", colour: "text-spruce" },
  "phone-waiting": { sign: "phone", colour: "text-brass" },
  returned: { sign: "back", colour: "text-ink-soft" },
  stopped: { sign: "cross", colour: "text-ink-soft" },
};

/** A state is a sign and a word in one colour; never colour alone, never a filled pill. */
export function StateWord({
  kind,
  children,
  wrap = false,
  className,
}: {
  kind: StateKind;
  children: ReactNode;
  wrap?: boolean;
  className?: string;
}) {
  const { sign, colour } = looks[kind];
  return (
    <span
      className={cx(
        "inline-flex items-start gap-1.5 align-top font-medium",
        !wrap && "whitespace-nowrap",
        colour,
        className,
      )}
    >
      {/* As tall as one line, so that the sign stays with the first line of longer words. */}
      <span className="flex h-lh items-center">
        <Sign name={sign} />
      </span>
      <span className="min-w-0">{children}</span>
    </span>
  );
}
