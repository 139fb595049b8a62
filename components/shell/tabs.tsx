"use client";

import { usePathname } from "next/navigation";
import { useEffect } from "react";
import { AppLink } from "../ui/app-link";
import { cx } from "../ui/class-names";
import { currentHref, type Place } from "./current-item";
import { useSlidingStud } from "./use-sliding-stud";

/** Links along a string with the stud under the one in hand. They change the address, so they are links, not tabs. */
export function Tabs({
  items,
  label,
  current,
  className,
}: {
  items: readonly Place[];
  label: string;
  current?: string;
  className?: string;
}) {
  const pathname = usePathname();
  const chosen = current ?? currentHref(items, pathname);
  const list = useSlidingStud<HTMLUListElement>(chosen);

  useEffect(() => {
    const strip = list.current;
    const tab = strip?.querySelector<HTMLElement>("[aria-current=page]");
    if (!strip || !tab) return;
    // By boxes: each item is positioned, so the link's own offset is always nought.
    const outer = strip.getBoundingClientRect();
    const inner = tab.getBoundingClientRect();
    strip.scrollLeft += inner.left + inner.width / 2 - (outer.left + outer.width / 2);
  }, [chosen]);

  return (
    <nav aria-label={label} className={cx("relative -mx-4 lg:mx-0", className)} data-no-print>
      <span aria-hidden="true" className="absolute inset-x-4 bottom-1.5 h-px bg-edge lg:inset-x-0" />
      <ul
        ref={list}
        className="relative flex h-[50px] gap-7 overflow-x-auto px-4 pb-1.5 [scrollbar-width:none] lg:px-0"
      >
        {items.map((item) => {
          const on = item.href === chosen;
          return (
            <li key={item.href} className="relative flex shrink-0">
              <AppLink
                href={item.href}
                aria-current={on ? "page" : undefined}
                scroll={false}
                className={cx(
                  "flex items-center rounded whitespace-nowrap -outline-offset-2 max-lg:text-16 touch:min-w-11 touch:justify-center",
                  on ? "font-semibold text-ink" : "font-text text-ink-soft hover:text-ink",
                )}
              >
                {item.label}
                {item.count === undefined ? null : (
                  <span className="lab ml-1.5 font-normal">{item.count}</span>
                )}
              </AppLink>
              {on ? (
                <i
                  data-stud=""
                  aria-hidden="true"
                  className="stud bottom-[-4px] left-1/2 -ml-3 h-[9px] w-6 [--stud-hole:var(--sheet)] after:size-1!"
                />
              ) : null}
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
