"use client";

import { useQuery } from "@tanstack/react-query";
import { useDeferredValue, useId, useState } from "react";
import { FieldError } from "@/components/forms/field";
import { TextInput } from "@/components/forms/text-input";
import { fetchJson } from "@/lib/client/fetch-json";
import { peopleKeys } from "@/lib/people/keys";

type Found = { items: Array<{ id: string; name: string; email: string | null }> };

/** Whose records a customer's sign-in shows: found by name, then chosen. */
export function CustomerChoice({
  value,
  onChange,
  error,
}: {
  value: string;
  onChange: (id: string) => void;
  error?: string;
}) {
  const [typed, setTyped] = useState("");
  const query = useDeferredValue(typed.trim());
  const group = useId();
  const found = useQuery({
    queryKey: peopleKeys.customerChoice(query),
    queryFn: ({ signal }) => fetchJson<Found>("/api/v1/customers", { query: { q: query, most: 6 }, signal }),
  });
  const items = found.data?.items ?? [];
  return (
    <fieldset className="min-w-0">
      <legend className="sr-only">The customer</legend>
      <TextInput
        label="Find the customer"
        type="search"
        autoComplete="off"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
      />
      <div className="mt-2 border-t border-hairline" aria-live="polite">
        {items.map((customer) => (
          <label
            key={customer.id}
            className="flex min-h-9 items-center gap-2.5 border-b border-hairline px-1 py-1 has-checked:bg-brass-wash has-checked:shadow-[inset_3px_0_0_var(--brass-fill)] has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-brass touch:min-h-11"
          >
            <input
              type="radio"
              name={group}
              value={customer.id}
              checked={value === customer.id}
              onChange={() => onChange(customer.id)}
              className="ml-1 size-4 accent-(--ink)"
            />
            <span className="min-w-0 break-words">
              {customer.name}
              {customer.email ? <span className="lab ml-2">{customer.email}</span> : null}
            </span>
          </label>
        ))}
        {items.length === 0 ? (
          <p className="py-2 text-ink-soft">
            {found.isPending
              ? "Looking for customers."
              : found.isError
                ? "The customers could not be read. Type again to try once more."
                : "No customer of this name. Add the customer first."}
          </p>
        ) : null}
      </div>
      {error ? <FieldError>{error}</FieldError> : null}
    </fieldset>
  );
}
