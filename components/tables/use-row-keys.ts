"use client";

import { type KeyboardEvent, useCallback, useState } from "react";

/** Where a key leads from row `at` of `count`; null when the key means nothing here. */
export function rowAfterKey(key: string, at: number, count: number): number | null {
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
 * Space or X chooses it. The focus sits on the row's own link, so plain table semantics remain.
 */
export function useRowKeys({
  ids,
  onChoose,
}: {
  ids: readonly string[];
  onChoose: ((id: string) => void) | null;
}) {
  const [inHand, setInHand] = useState<string | null>(null);
  // A row that left the list (filtered away, archived) gives its place to the first one.
  const current = inHand !== null && ids.includes(inHand) ? inHand : (ids[0] ?? null);

  const onKeyDown = useCallback(
    (event: KeyboardEvent<HTMLElement>) => {
      if (event.altKey || event.ctrlKey || event.metaKey || event.defaultPrevented) return;
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
      const place = event.currentTarget.querySelector<HTMLElement>(
        `[data-row="${CSS.escape(nextId)}"] [data-row-focus]`,
      );
      place?.focus();
      place?.scrollIntoView({ block: "nearest" });
    },
    [ids, onChoose],
  );

  return { current, onKeyDown, onFocusRow: setInHand };
}
