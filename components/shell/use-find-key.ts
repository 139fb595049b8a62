"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useEffect } from "react";

/** The slash key goes to the page's own search box (data-find) if it has one, else to the finding page. */
export function useFindKey(href: string | undefined) {
  const router = useRouter();
  useEffect(() => {
    function onKey(event: KeyboardEvent) {
      if (event.key !== "/" || event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented)
        return;
      const target = event.target;
      if (
        target instanceof HTMLElement &&
        target.closest("input, textarea, select, [contenteditable], dialog")
      )
        return;
      const box = document.querySelector<HTMLInputElement>("input[data-find]");
      if (!box && !href) return;
      event.preventDefault();
      if (box) box.focus();
      else if (href) router.push(href as Route);
    }
    document.addEventListener("keydown", onKey);
    return () => document.removeEventListener("keydown", onKey);
  }, [href, router]);
}
