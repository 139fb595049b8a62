"use client";

import { type ReactNode, useEffect, useRef, useState, useSyncExternalStore } from "react";
import { AppLink } from "./app-link";
import { buttonLook } from "./button-look";
import {
  dismissMessage,
  type MessageKind,
  type ShownMessage,
  shownMessages,
  subscribeToMessages,
} from "./message-queue";
import { Sign, type SignName } from "./sign";

/** Eight seconds, and longer while the pointer or the focus rests on it. */
const duration = 8_000;

const signs: Record<MessageKind, SignName> = { done: "tick", attention: "attention", waiting: "clock" };
const none: readonly ShownMessage[] = [];

/**
 * Where messages appear. Once in the tree, in Providers. Ours rather than a package: the usual ones write
 * a style element at run time, which the content security policy refuses.
 */
export function Messages() {
  const messages = useSyncExternalStore(subscribeToMessages, shownMessages, () => none);
  return (
    <section
      aria-label="Messages"
      data-no-print
      className="pointer-events-none fixed right-4 bottom-[calc(var(--bar)+var(--strip)+12px)] left-4 z-50 sm:left-auto sm:w-[440px] lg:right-5 lg:bottom-5"
    >
      <ol aria-live="polite" aria-relevant="additions" className="grid gap-3">
        {messages.map((message) => (
          <li key={message.id} className="motion-safe:animate-[row-open_120ms_ease-out]">
            <MessageBox message={message} />
          </li>
        ))}
      </ol>
    </section>
  );
}

function MessageBox({ message }: { message: ShownMessage }) {
  const { id, kind = "done", text, detail, action } = message;
  const [held, setHeld] = useState(false);
  const left = useRef(duration);

  useEffect(() => {
    if (held) return;
    const started = Date.now();
    const timer = setTimeout(() => dismissMessage(id), left.current);
    return () => {
      clearTimeout(timer);
      left.current = Math.max(2_000, left.current - (Date.now() - started));
    };
  }, [held, id]);

  const close = () => dismissMessage(id);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: resting here only holds the clock, nothing is pressed
    <div
      className="pointer-events-auto flex min-h-12 items-center gap-3 rounded bg-sheet py-1.5 pr-2 pl-4 shadow-float"
      onPointerEnter={() => setHeld(true)}
      onPointerLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
      onKeyDown={(event) => event.key === "Escape" && close()}
    >
      <Words kind={kind} text={text} detail={detail} />
      {action && "href" in action ? (
        <AppLink href={action.href} className={buttonLook("quiet")} onClick={close}>
          {action.label}
        </AppLink>
      ) : null}
      {action && "onPress" in action ? (
        <button
          type="button"
          className={buttonLook("quiet")}
          onClick={() => {
            close();
            action.onPress();
          }}
        >
          {action.label}
        </button>
      ) : null}
      <button
        type="button"
        className="-ml-2 flex size-9 shrink-0 items-center justify-center rounded text-ink-soft hover:bg-cover touch:size-11"
        onClick={close}
        aria-label="Close the message"
      >
        <Sign name="cross" size={12} />
      </button>
    </div>
  );
}

function Words({ kind, text, detail }: { kind: MessageKind; text: string; detail?: string }): ReactNode {
  return (
    <p className="flex min-w-0 flex-1 items-start gap-3 py-1">
      <span className="flex h-lh items-center">
        <Sign name={signs[kind]} />
      </span>
      <span>
        {detail ? <b className="font-semibold">{text}</b> : text}
        {detail ? ` ${detail}` : null}
      </span>
    </p>
  );
}
