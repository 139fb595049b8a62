"use client";

import { useSyncExternalStore } from "react";

/**
 * Keys of a single character, J, K, X and the slash, act without Ctrl or Alt. Who speaks to the computer, or hits
 * keys unawares, can turn them off (WCAG 2.2, 2.1.4); arrows, Enter and Space remain. Kept in this browser.
 */
const name = "letter-keys";

const listeners = new Set<() => void>();

export function letterKeysOn(): boolean {
  try {
    return window.localStorage.getItem(name) !== "off";
  } catch {
    // A browser that keeps nothing.
    return true;
  }
}

export function setLetterKeys(on: boolean): void {
  try {
    if (on) window.localStorage.removeItem(name);
    else window.localStorage.setItem(name, "off");
  } catch {
    // As above: they stay on.
  }
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void) {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useLetterKeys(): boolean {
  return useSyncExternalStore(subscribe, letterKeysOn, () => true);
}

const keepTheirKeys =
  "input, textarea, select, button, summary, [contenteditable], dialog, [popover], [role=combobox], [role=slider], [role=listbox], [role=menu]";

/** Whether a key pressed here is the page's to take: nothing that is typed in, chosen from or pressed has the focus. */
export function isPagesKey(event: KeyboardEvent): boolean {
  if (event.altKey || event.ctrlKey || event.metaKey || event.defaultPrevented || event.isComposing)
    return false;
  const { target } = event;
  if (!(target instanceof HTMLElement) || target.closest(keepTheirKeys)) return false;
  return document.querySelector("dialog[open]") === null;
}
