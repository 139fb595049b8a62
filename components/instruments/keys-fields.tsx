"use client";

import { useState } from "react";
import { Select } from "@/components/forms/select";
import { keyName } from "@/lib/acoustics/keys";
import {
  highestFirst,
  highestLast,
  lowestFirst,
  lowestLast,
  rangeLabel,
  usualRanges,
} from "@/lib/instruments/rules";

const free = "free";

function keysBetween(low: number, high: number) {
  return Array.from({ length: Math.max(0, high - low + 1) }, (_, index) => ({
    value: String(low + index),
    label: keyName(low + index),
  }));
}

const firstKeys = keysBetween(lowestFirst, highestFirst);
const lastKeys = keysBetween(lowestLast, highestLast);
const ranges = [
  ...usualRanges.map((range) => ({ value: String(range.keys), label: rangeLabel(range) })),
  { value: free, label: "Another compass" },
];

export type Keys = { firstMidi: number; lastMidi: number; breakMidi: number | null };

/** The compass, by its usual names or by its two ends, and the break within it. */
export function KeysFields({
  value,
  onChange,
  errors,
}: {
  value: Keys;
  onChange: (change: Partial<Keys>) => void;
  errors: Partial<Record<keyof Keys, string>>;
}) {
  const usual = usualRanges.find(
    (range) => range.firstMidi === value.firstMidi && range.lastMidi === value.lastMidi,
  );
  const [isFree, setFree] = useState(!usual);

  function choose(name: string) {
    const range = usualRanges.find(({ keys }) => String(keys) === name);
    setFree(!range);
    if (range) onChange({ firstMidi: range.firstMidi, lastMidi: range.lastMidi });
  }

  return (
    <>
      <Select
        label="Keys"
        name={isFree ? undefined : "firstMidi"}
        options={ranges}
        value={isFree || !usual ? free : String(usual.keys)}
        onChange={(event) => choose(event.target.value)}
        error={isFree ? undefined : (errors.firstMidi ?? errors.lastMidi)}
      />
      <Select
        label="Break"
        name="breakMidi"
        optional
        help="The first note of the treble bridge."
        placeholder="Not looked for yet"
        options={keysBetween(value.firstMidi + 1, value.lastMidi)}
        value={value.breakMidi === null ? "" : String(value.breakMidi)}
        onChange={(event) => onChange({ breakMidi: event.target.value ? Number(event.target.value) : null })}
        error={errors.breakMidi}
      />
      {isFree ? (
        <>
          <Select
            label="Lowest key"
            name="firstMidi"
            options={firstKeys}
            value={String(value.firstMidi)}
            onChange={(event) => onChange({ firstMidi: Number(event.target.value) })}
            error={errors.firstMidi}
          />
          <Select
            label="Highest key"
            name="lastMidi"
            options={lastKeys}
            value={String(value.lastMidi)}
            onChange={(event) => onChange({ lastMidi: Number(event.target.value) })}
            error={errors.lastMidi}
          />
        </>
      ) : null}
    </>
  );
}
