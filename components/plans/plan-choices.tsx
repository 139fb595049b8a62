"use client";

import { useState } from "react";
import { Select } from "@/components/forms/select";
import { NumberInput } from "@/components/forms/text-input";
import type { Temperament } from "@/lib/acoustics/types";
import type { PlanChoices } from "@/lib/plans/keys";
import { builtInWords, temperamentName, temperamentWords } from "@/lib/plans/rules";
import type { StyleList } from "@/lib/plans/schema";

const lowestHz = 380;
const highestHz = 480;

/** A temperament as the address and the analysis take it: its name, or twelve offsets. */
export function temperamentValue(temperament: Temperament): string {
  return typeof temperament === "string" ? temperament : temperament.join(",");
}

export function PlanChoiceFields({
  styles,
  instrumentTemperament,
  chosen,
  onChange,
}: {
  styles: StyleList;
  instrumentTemperament: Temperament;
  chosen: Required<PlanChoices>;
  onChange: (choices: Required<PlanChoices>) => void;
}) {
  const [typedHz, setTypedHz] = useState(String(chosen.referenceHz));
  const [hzFault, setHzFault] = useState<string>();

  function typeHz(text: string) {
    setTypedHz(text);
    const hz = Number(text.replace(",", "."));
    const fits = text.trim() !== "" && hz >= lowestHz && hz <= highestHz;
    setHzFault(fits ? undefined : `Between ${lowestHz} and ${highestHz} Hz.`);
    if (fits) onChange({ ...chosen, referenceHz: hz });
  }

  const own = typeof instrumentTemperament === "string" ? [] : [instrumentTemperament];
  return (
    <div className="grid gap-4 sm:grid-cols-3">
      <Select
        label="Style"
        value={chosen.style}
        onChange={(event) => onChange({ ...chosen, style: event.target.value })}
        options={[
          ...styles.house.map(({ id, name }) => ({ value: id, label: name })),
          ...Object.entries(builtInWords).map(([value, { title }]) => ({ value, label: title })),
        ]}
      />
      <Select
        label="Temperament"
        value={chosen.temperament}
        onChange={(event) => onChange({ ...chosen, temperament: event.target.value })}
        options={[
          ...Object.entries(temperamentWords).map(([value, label]) => ({ value, label })),
          ...own.map((offsets) => ({ value: temperamentValue(offsets), label: temperamentName(offsets) })),
        ]}
      />
      <NumberInput
        label="A4"
        unit="Hz"
        value={typedHz}
        onChange={(event) => typeHz(event.target.value)}
        {...(hzFault ? { error: hzFault } : {})}
      />
    </div>
  );
}
