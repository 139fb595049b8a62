"use client";

import { type KeyboardEvent, type RefObject, useCallback, useEffect, useState } from "react";
import { isPagesKey, letterKeysOn } from "../shell/letter-keys";

/** Where a key leads from row `at` of `count`; null when the key means nothing here. */
function rowAfterKey(key: string, at: number, count: number): number | null {
  if (count === 0) return null;
  switch (key) {
    case "ArrowDown":
    case "j":
      return Math.min(count - 1, at + 1);
    case "ArrowUp":
    case "k":
      return Math.max(0, at - 1);
    case "Home":
      return 0;
    case "End":
      return count - 1;
    case "PageDown":
      return Math.min(count - 1, at + 10);
    case "PageUp":
      return Math.max(0, at - 10);
    default:
      return null;
  }
}

/**
 * One tab stop for the whole ledger: keys move the row in hand, Enter follows its link (the browser does),
 * Space or X chooses it. The focus sits on the row's own link, so plain table semantics remain. From the page
 * around it, where nothing else wants the key, the first J, K or arrow goes to the row in hand.
 */
export function useRowKeys({
  list,
  ids,
  onChoose,
}: {
  list: RefObject<HTMLElement | null>;
  ids: readonly string[];
  onChoose: ((id: string) => void) | null;
}) {
  const [inHand, setInHand] = useState<string | null>(null);
  // A row that left the list (filtered away, archived) gives its place to the first one.
  const current = inHand !== null && ids.includes(inHand) ? inHand : (ids[0] ?? null);

  const onKeyDown = useCallback(
    (event: KeyboardEvent<HTMLElement>) => {
      if (event.altKey || event.ctrlKey || event.metaKey || event.defaultPrevented) return;
      if (isLetter(event.key) && !letterKeysOn()) return;
      const target = event.target;
      if (!(target instanceof HTMLElement)) return;
      const row = target.closest<HTMLElement>("[data-row]");
      const id = row?.dataset.row;
      // Buttons and fields inside a row keep their own keys.
      if (!id || !target.matches("[data-row-focus], [data-row-check]")) return;

      if ((event.key === " " || event.key === "x") && onChoose && target.matches("[data-row-focus]")) {
        event.preventDefault();
        onChoose(id);
        return;
      }
      const next = rowAfterKey(event.key, ids.indexOf(id), ids.length);
      const nextId = next === null ? undefined : ids[next];
      if (nextId === undefined) return;
      event.preventDefault();
      setInHand(nextId);
      goTo(event.currentTarget, nextId);
    },
    [ids, onChoose],
  );

  useEffect(() => {
    function onPage(event: globalThis.KeyboardEvent) {
      if (current === null || !list.current || !isPagesKey(event)) return;
      const { target } = event;
      if (!(target instanceof HTMLElement) || list.current.contains(target)) return;
      // On a link the arrows scroll, as everywhere; a letter means nothing there.
      const reaches = isLetter(event.key) ? letterKeysOn() : !target.closest("a");
      if (!reaches || !["j", "k", "ArrowDown", "ArrowUp"].includes(event.key)) return;
      event.preventDefault();
      goTo(list.current, current);
    }
    document.addEventListener("keydown", onPage);
    return () => document.removeEventListener("keydown", onPage);
  }, [list, current]);

  return { current, onKeyDown, onFocusRow: setInHand };
}

function goTo(list: HTMLElement, id: string): void {
  const place = list.querySelector<HTMLElement>(`[data-row="${CSS.escape(id)}"] [data-row-focus]`);
  place?.focus();
  place?.scrollIntoView({ block: "nearest" });
}

function isLetter(key: string): boolean {
  return key.length === 1 && key !== " ";
}
