"use client";

import { usePathname } from "next/navigation";
import { useState } from "react";
import { TextInput } from "@/components/forms/text-input";
import { Button } from "@/components/ui/button";
import { Popover } from "@/components/ui/popover";
import { Segmented } from "@/components/ui/segmented";
import type { Span, SpanName } from "./visit-span";

const words: { value: SpanName | "days"; label: string }[] = [
  { value: "coming", label: "To come" },
  { value: "past", label: "Past" },
  { value: "all", label: "All" },
];

/** Which days the ledger shows. Everything stays in the address. */
export function SpanBar({ span }: { span: Span }) {
  const pathname = usePathname();

  function write(change: Record<string, string>) {
    const params = new URLSearchParams(window.location.search);
    for (const [name, value] of Object.entries(change)) {
      if (value) params.set(name, value);
      else params.delete(name);
    }
    const query = params.toString();
    window.history.replaceState(null, "", query ? `${pathname}?${query}` : pathname);
  }

  return (
    <div className="flex flex-wrap items-center gap-2" data-no-print>
      <Segmented
        label="Which visits"
        options={span.name === "days" ? [...words, { value: "days", label: "Chosen days" }] : words}
        value={span.name}
        onChange={(name) => {
          if (name !== "days") write({ when: name === "coming" ? "" : name, from: "", to: "" });
        }}
      />
      <Popover label="Days" title="Days">
        <DaysForm
          key={`${span.from} ${span.to}`}
          from={span.name === "days" ? (span.from ?? "") : ""}
          to={span.name === "days" ? (span.to ?? "") : ""}
          onChoose={(from, to) => write({ from, to, when: "" })}
        />
      </Popover>
    </div>
  );
}

function DaysForm({
  from,
  to,
  onChoose,
}: {
  from: string;
  to: string;
  onChoose: (from: string, to: string) => void;
}) {
  const [first, setFirst] = useState(from);
  const [last, setLast] = useState(to);
  const backwards = first !== "" && last !== "" && last < first;
  return (
    <div className="grid gap-3">
      <TextInput
        label="From"
        type="date"
        optional
        value={first}
        onChange={(event) => setFirst(event.target.value)}
      />
      <TextInput
        label="To"
        type="date"
        optional
        value={last}
        onChange={(event) => setLast(event.target.value)}
        error={backwards ? "The last day is before the first." : undefined}
      />
      <Button onClick={() => (backwards ? undefined : onChoose(first, last))}>Show these days</Button>
    </div>
  );
}
