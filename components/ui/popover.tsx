"use client";

import { type ReactNode, type ToggleEvent, useId, useRef } from "react";
import { buttonLook } from "./button-look";
import { Sign } from "./sign";

const gap = 4;
const margin = 16;

/** A small panel under its button. The browser's popover closes it on Escape, on a press outside and on leaving. */
export function Popover({ label, title, children }: { label: string; title: string; children: ReactNode }) {
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);

  function place(event: ToggleEvent<HTMLElement>) {
    if (event.newState !== "open" || !button.current) return;
    const panel = event.currentTarget;
    const at = button.current.getBoundingClientRect();
    const left = Math.min(at.left, window.innerWidth - panel.offsetWidth - margin);
    const below = at.bottom + gap;
    const fits = below + panel.offsetHeight + margin <= window.innerHeight;
    panel.style.left = `${Math.max(margin, Math.min(left, at.right - panel.offsetWidth))}px`;
    panel.style.top = `${fits ? below : Math.max(margin, at.top - gap - panel.offsetHeight)}px`;
  }

  return (
    <>
      <button ref={button} type="button" popoverTarget={id} className={buttonLook("quiet", "small")}>
        {label}
        <Sign name="chevron-down" size={10} />
      </button>
      <section
        id={id}
        popover="auto"
        aria-label={title}
        onToggle={place}
        className="fixed inset-auto m-0 max-h-[80dvh] w-64 overflow-y-auto rounded bg-sheet px-4 py-3 text-ink shadow-float"
      >
        <h3 className="mb-1">{title}</h3>
        {children}
      </section>
    </>
  );
}
