"use client";

import { useEffect, useRef, useState } from "react";
import { Select } from "@/components/forms/select";
import { NumberInput } from "@/components/forms/text-input";
import type { Temperament } from "@/lib/acoustics/types";
import type { PlanChoices } from "@/lib/plans/keys";
import { HIGHEST_HZ, LOWEST_HZ, readPitch, temperamentValue } from "@/lib/plans/plan-address";
import { builtInChoices, temperamentName, temperamentWords } from "@/lib/plans/rules";
import type { StyleList } from "@/lib/plans/schema";

export function PlanChoiceFields({
  styles,
  instrumentTemperament,
  chosen,
  onChange,
}: {
  styles: StyleList;
  instrumentTemperament: Temperament;
  chosen: Required<PlanChoices>;
  /** `again` while one number is still being typed: the same step for Back. */
  onChange: (change: PlanChoices, again: boolean) => void;
}) {
  const [typedHz, setTypedHz] = useState<string | null>(null);
  const stepped = useRef(false);
  const hzFault = typedHz !== null && readPitch(typedHz) === null;

  // The address was gone back in: the field follows it.
  useEffect(() => {
    setTypedHz((typed) => (typed !== null && readPitch(typed) === chosen.referenceHz ? typed : null));
  }, [chosen.referenceHz]);

  function typeHz(text: string) {
    setTypedHz(text);
    const hz = readPitch(text);
    if (hz === null || hz === chosen.referenceHz) return;
    onChange({ referenceHz: hz }, stepped.current);
    stepped.current = true;
  }

  const own = typeof instrumentTemperament === "string" ? [] : [instrumentTemperament];
  return (
    <div className="grid gap-4 sm:grid-cols-3">
      <Select
        label="Style"
        value={chosen.style}
        onChange={(event) => onChange({ style: event.target.value }, false)}
        options={[...styles.house.map(({ id, name }) => ({ value: id, label: name })), ...builtInChoices]}
      />
      <Select
        label="Temperament"
        value={chosen.temperament}
        onChange={(event) => onChange({ temperament: event.target.value }, false)}
        options={[
          ...Object.entries(temperamentWords).map(([value, label]) => ({ value, label })),
          ...own.map((offsets) => ({ value: temperamentValue(offsets), label: temperamentName(offsets) })),
        ]}
      />
      <NumberInput
        label="A4"
        unit="Hz"
        value={typedHz ?? String(chosen.referenceHz)}
        onChange={(event) => typeHz(event.target.value)}
        onFocus={() => {
          stepped.current = false;
        }}
        onBlur={() => {
          if (!hzFault) setTypedHz(null);
        }}
        {...(hzFault ? { error: `Between ${LOWEST_HZ} and ${HIGHEST_HZ} Hz.` } : {})}
      />
    </div>
  );
}
