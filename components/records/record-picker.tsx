"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { type KeyboardEvent, type ReactNode, useDeferredValue, useId, useRef, useState } from "react";
import { Field } from "@/components/forms/field";
import { cx } from "@/components/ui/class-names";
import { Sign } from "@/components/ui/sign";
import { fetchJson } from "@/lib/client/fetch-json";

export type Picked = { id: string; label: string; more?: string };

type Answer = {
  items: Array<{
    id: string;
    name: string;
    city?: string;
    customerName?: string;
    contactName?: string | null;
  }>;
};

/** Customers or sites of the shop, found by typing. Empty again by deleting the words, where that is allowed. */
export function RecordPicker({
  of,
  name,
  label,
  help,
  error,
  optional,
  value,
  onChange,
}: {
  of: "customers" | "sites";
  /** Of the form's field. */
  name: string;
  label: ReactNode;
  help?: ReactNode;
  error?: string;
  optional?: boolean;
  value: Picked | null;
  onChange: (picked: Picked | null) => void;
}) {
  const [typed, setTyped] = useState<string | null>(null);
  const [marked, setMarked] = useState(0);
  const listId = useId();
  const box = useRef<HTMLDivElement>(null);
  const open = typed !== null;
  const q = useDeferredValue(typed?.trim() ?? "");
  const found = useQuery({
    queryKey: [of, "picker", q],
    queryFn: ({ signal }) => fetchJson<Answer>(`/api/v1/${of}`, { query: { q, most: 8 }, signal }),
    enabled: open,
    placeholderData: keepPreviousData,
  });
  const options: Picked[] = (found.data?.items ?? []).map((item) => ({
    id: item.id,
    label: item.name,
    more: [item.city, item.customerName, item.contactName].filter(Boolean).join(", "),
  }));
  const at = Math.min(marked, options.length - 1);

  function choose(picked: Picked) {
    onChange(picked);
    setTyped(null);
  }

  /** Words that were typed but not chosen go back to what is chosen; none at all means none. */
  function leave() {
    if (typed !== null && typed.trim() === "" && optional) onChange(null);
    setTyped(null);
  }

  function onKey(event: KeyboardEvent) {
    const step = { ArrowDown: 1, ArrowUp: -1 }[event.key];
    if (step) {
      event.preventDefault();
      if (!open) setTyped("");
      else if (options.length > 0) setMarked((at + step + options.length) % options.length);
    }
    if (event.key === "Escape" && open) {
      event.preventDefault();
      event.stopPropagation();
      setTyped(null);
    }
    const option = options[at];
    if (event.key === "Enter" && open) {
      event.preventDefault();
      if (option) choose(option);
    }
  }

  return (
    <Field label={label} help={help} error={error} optional={optional}>
      {(control) => (
        <div ref={box} className="relative">
          <span className="field-box" data-invalid={error ? "" : undefined}>
            <input
              {...control}
              name={name}
              role="combobox"
              aria-expanded={open}
              aria-controls={listId}
              aria-autocomplete="list"
              aria-activedescendant={open && at >= 0 ? `${listId}-${at}` : undefined}
              value={typed ?? value?.label ?? ""}
              placeholder={`Type to find ${of === "sites" ? "a site" : "a customer"}`}
              onFocus={(event) => event.target.select()}
              onChange={(event) => {
                setTyped(event.target.value);
                setMarked(0);
              }}
              onClick={() => typed === null && !value && setTyped("")}
              onKeyDown={onKey}
              onBlur={leave}
              autoComplete="off"
              className="w-full min-w-0 flex-1 self-stretch border-0 bg-transparent p-0 text-16 text-ink outline-none"
            />
            <Sign name="find" className="text-ink-soft" />
          </span>
          <div
            id={listId}
            role="listbox"
            aria-label={typeof label === "string" ? label : "Found"}
            className={cx(
              "absolute inset-x-0 top-full z-20 mt-1 max-h-72 overflow-y-auto rounded bg-sheet shadow-float",
              !open && "hidden",
            )}
          >
            {options.map((option, index) => (
              // biome-ignore lint/a11y/useKeyWithClickEvents: the input above takes the keys for its list
              <div
                key={option.id}
                id={`${listId}-${index}`}
                role="option"
                aria-selected={index === at}
                tabIndex={-1}
                // Keeps the focus in the line; losing it would close the list before the press counts.
                onMouseDown={(event) => event.preventDefault()}
                onClick={() => choose(option)}
                onMouseMove={() => setMarked(index)}
                className={cx(
                  "min-h-11 border-b border-hairline px-3 py-1.5",
                  index === at && "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)]",
                )}
              >
                <span className="block truncate text-16">{option.label}</span>
                {option.more ? <span className="lab block truncate">{option.more}</span> : null}
              </div>
            ))}
            {options.length === 0 ? (
              <p className="px-3 py-2 text-ink-soft">
                {found.isPending ? "Looking." : found.isError ? found.error.message : "Nothing found."}
              </p>
            ) : null}
          </div>
        </div>
      )}
    </Field>
  );
}
