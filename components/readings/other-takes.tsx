"use client";

import type { Place } from "./sheet-row";

const strings: ReadonlyArray<{ value: string; label: string }> = [
  { value: "all", label: "All strings" },
  { value: "1", label: "Left string" },
  { value: "2", label: "Middle string" },
  { value: "3", label: "Right string" },
];

const MOST_TAKES = 9;

/** Each string of a unison and each repeated take is a row of its own; this goes to it or begins it. */
export function OtherTakes({ place, onChoose }: { place: Place; onChoose: (place: Place) => void }) {
  return (
    <>
      <SmallSelect
        label="Sounding"
        value={String(place.string)}
        options={strings}
        onChange={(value) => onChoose({ ...place, string: value === "all" ? "all" : Number(value) })}
      />
      <SmallSelect
        label="Take"
        value={String(place.take)}
        options={Array.from({ length: MOST_TAKES }, (_, index) => ({
          value: String(index + 1),
          label: String(index + 1),
        }))}
        onChange={(value) => onChoose({ ...place, take: Number(value) })}
      />
    </>
  );
}

function SmallSelect({
  label,
  value,
  options,
  onChange,
}: {
  label: string;
  value: string;
  options: ReadonlyArray<{ value: string; label: string }>;
  onChange: (value: string) => void;
}) {
  const known = options.some((option) => option.value === value);
  return (
    <label className="flex items-center gap-1.5 text-12 text-ink-soft">
      {label}
      <select
        value={value}
        onChange={(event) => onChange(event.target.value)}
        className="h-7 rounded border border-edge! bg-sheet px-1.5 text-12 text-ink touch:h-11 touch:text-16"
      >
        {known ? null : <option value={value}>{`String ${value}`}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </label>
  );
}
