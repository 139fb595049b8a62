"use client";

import type { ReactNode } from "react";
import { Toaster, toast } from "sonner";
import { AppLink } from "./app-link";
import { buttonLook } from "./button-look";
import { Sign, type SignName } from "./sign";

/** Eight seconds, and longer while the pointer or the focus rests on it. */
const duration = 8_000;

export type MessageKind = "done" | "attention" | "waiting";

const signs: Record<MessageKind, SignName> = { done: "tick", attention: "attention", waiting: "clock" };

export type MessageAction = { label: string; onPress: () => void } | { label: string; href: string };

export type Message = {
  /** What happened, in one sentence. */
  text: string;
  /** What to do or what it means, set after the first sentence. */
  detail?: string;
  kind?: MessageKind;
  action?: MessageAction;
};

/** Shows a message at the foot of the page and returns its id, for `dismissMessage`. */
export function showMessage({ text, detail, kind = "done", action }: Message): string | number {
  return toast.custom(
    (id) => (
      <MessageBox kind={kind} onClose={() => toast.dismiss(id)} action={action}>
        {detail ? <b className="font-semibold">{text}</b> : text}
        {detail ? ` ${detail}` : null}
      </MessageBox>
    ),
    { duration },
  );
}

export function dismissMessage(id: string | number): void {
  toast.dismiss(id);
}

/**
 * Says what was done and offers to take it back. `undo` runs at most once; if it fails the
 * person is told, because by then the page may already show the old state.
 */
export function toastWithUndo(text: string, undo: () => unknown): string | number {
  let used = false;
  return showMessage({
    text,
    action: {
      label: "Undo",
      onPress: () => {
        if (used) return;
        used = true;
        Promise.resolve()
          .then(undo)
          .catch(() =>
            showMessage({
              kind: "attention",
              text: "That could not be undone.",
              detail: "Load the page again to see how it stands.",
            }),
          );
      },
    },
  });
}

function MessageBox({
  kind,
  action,
  onClose,
  children,
}: {
  kind: MessageKind;
  action?: MessageAction;
  onClose: () => void;
  children: ReactNode;
}) {
  return (
    <div className="flex min-h-12 w-full items-center gap-3 rounded bg-sheet py-1.5 pr-2 pl-4 text-14 text-ink shadow-float">
      <Sign name={signs[kind]} className="self-start mt-2" />
      <p className="min-w-0 flex-1 py-1">{children}</p>
      {action && "href" in action ? (
        <AppLink href={action.href} className={buttonLook("quiet")} onClick={onClose}>
          {action.label}
        </AppLink>
      ) : null}
      {action && "onPress" in action ? (
        <button
          type="button"
          className={buttonLook("quiet")}
          onClick={() => {
            onClose();
            action.onPress();
          }}
        >
          {action.label}
        </button>
      ) : null}
      <button
        type="button"
        className="flex size-9 shrink-0 items-center justify-center rounded text-ink-soft hover:bg-cover touch:size-11"
        onClick={onClose}
        aria-label="Close the message"
      >
        <Sign name="cross" size={12} />
      </button>
    </div>
  );
}

/** Where messages appear. Once in the tree, in Providers. */
export function Messages() {
  return (
    <Toaster
      position="bottom-right"
      expand
      gap={12}
      visibleToasts={3}
      duration={duration}
      containerAriaLabel="Messages"
      offset={{ bottom: 20, right: 20 }}
      mobileOffset={{ bottom: "calc(var(--bar) + var(--strip) + 12px)", left: 16, right: 16 }}
      toastOptions={{ unstyled: true, className: "w-full lg:w-[420px]" }}
    />
  );
}
