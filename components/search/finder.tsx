"use client";

import type { Route } from "next";
import { useRouter } from "next/navigation";
import { type KeyboardEvent, useEffect, useId, useRef, useState } from "react";
import { AppLink } from "@/components/ui/app-link";
import { cx } from "@/components/ui/class-names";
import { Kbd } from "@/components/ui/kbd";
import { Sign } from "@/components/ui/sign";
import { ErrorState } from "@/components/ui/states";
import { groupFound, hrefOf, useFind } from "./use-find";

/**
 * One line to type in, and what it finds by kind. The cursor of the list follows the arrow keys while the
 * typing stays in the line; Enter opens what is marked.
 */
export function Finder({ initial = "", onOpen }: { initial?: string; onOpen?: () => void }) {
  const [typed, setTyped] = useState(initial);
  const { asked, data, isError, error, isFetching } = useFind(typed);
  const groups = groupFound(asked ? (data?.items ?? []) : []);
  const flat = groups.flatMap((group) => group.items);
  const [marked, setMarked] = useState(0);
  const at = Math.min(marked, Math.max(0, flat.length - 1));
  const router = useRouter();
  const listId = useId();
  const list = useRef<HTMLDivElement>(null);

  useEffect(() => setMarked(0), [data]);
  useEffect(() => {
    list.current?.querySelector(`[data-at="${at}"]`)?.scrollIntoView({ block: "nearest" });
  }, [at]);

  function onKey(event: KeyboardEvent<HTMLInputElement>) {
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step && flat.length > 0) {
      event.preventDefault();
      setMarked((at + step + flat.length) % flat.length);
    }
    const chosen = flat[at];
    if (event.key === "Enter" && chosen) {
      event.preventDefault();
      onOpen?.();
      router.push(hrefOf(chosen) as Route);
    }
  }

  return (
    <div className="flex min-h-0 flex-col">
      <span className="field-box">
        <Sign name="find" className="text-ink-soft" />
        <input
          type="search"
          role="combobox"
          aria-label="Find a customer, site or instrument"
          aria-expanded={flat.length > 0}
          aria-controls={listId}
          aria-activedescendant={flat.length > 0 ? `${listId}-${at}` : undefined}
          placeholder="Name, address, serial number, telephone"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
          onKeyDown={onKey}
          autoComplete="off"
          spellCheck={false}
          data-safe=""
          className="w-full min-w-0 border-0 bg-transparent text-16 outline-none [&::-webkit-search-cancel-button]:hidden"
        />
      </span>
      <div
        ref={list}
        id={listId}
        role="listbox"
        aria-label="Found"
        aria-busy={isFetching}
        className="mt-2 min-h-0 overflow-y-auto"
      >
        {groups.map((group) => (
          // biome-ignore lint/a11y/useSemanticElements: a group of options inside a listbox
          <div key={group.kind} role="group" aria-labelledby={`${listId}-${group.kind}`}>
            <div id={`${listId}-${group.kind}`} className="lab border-b border-hairline pt-3 pb-1">
              {group.title}
            </div>
            {group.items.map((item) => {
              const index = flat.indexOf(item);
              return (
                <AppLink
                  key={item.id}
                  id={`${listId}-${index}`}
                  role="option"
                  aria-selected={index === at}
                  data-at={index}
                  tabIndex={-1}
                  href={hrefOf(item)}
                  onClick={onOpen}
                  onMouseMove={() => setMarked(index)}
                  className={cx(
                    "block min-h-11 border-b border-hairline px-3 py-1.5",
                    index === at && "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)]",
                  )}
                >
                  <span className={cx("block truncate text-16", item.kind === "instrument" && "serif")}>
                    {item.title}
                  </span>
                  <span className="lab block truncate">{item.subtitle}</span>
                </AppLink>
              );
            })}
          </div>
        ))}
      </div>
      <div className="lab mt-3 flex flex-wrap items-center gap-x-4 gap-y-1" role="status">
        {isError ? (
          <ErrorState title="The search did not work">
            {error.message} Type again to try once more.
          </ErrorState>
        ) : asked === "" ? (
          "Parts of words are enough, in any order."
        ) : data && flat.length === 0 ? (
          <span>Nothing has “{asked}” in it. Try fewer letters, or another word.</span>
        ) : data?.nearly ? (
          <span>Nothing is spelt exactly so. These are near.</span>
        ) : null}
        {flat.length > 0 ? (
          <span className="ml-auto hidden items-center gap-1.5 lg:flex">
            <Kbd>
              <Sign name="arrow-up" size={10} label="Up" />
            </Kbd>
            <Kbd>
              <Sign name="arrow-down" size={10} label="Down" />
            </Kbd>
            move <Kbd>Enter</Kbd> open
          </span>
        ) : null}
      </div>
    </div>
  );
}
