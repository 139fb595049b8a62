"use client";

import { type RefObject, useLayoutEffect, useRef } from "react";

/**
 * Lets the stud slide along its string from where it last sat. The stud is drawn inside the chosen item,
 * so it is in place before any script runs; the slide only plays from the old place to the new one.
 */
export function useSlidingStud<E extends HTMLElement>(chosen: string | undefined): RefObject<E | null> {
  const container = useRef<E | null>(null);
  const last = useRef<{ key: string | undefined; x: number; y: number } | null>(null);

  useLayoutEffect(() => {
    const list = container.current;
    const stud = list?.querySelector<HTMLElement>("[data-stud]");
    if (!stud || !list) {
      last.current = null;
      return;
    }
    const box = stud.getBoundingClientRect();
    const origin = list.getBoundingClientRect();
    const place = {
      key: chosen,
      x: box.left - origin.left + list.scrollLeft,
      y: box.top - origin.top + list.scrollTop,
    };
    const before = last.current;
    last.current = place;
    if (!before || before.key === chosen) return;
    if (window.matchMedia("(prefers-reduced-motion: reduce)").matches) return;
    stud.animate(
      [{ transform: `translate(${before.x - place.x}px, ${before.y - place.y}px)` }, { transform: "none" }],
      { duration: 150, easing: "ease-out" },
    );
  }, [chosen]);

  return container;
}
