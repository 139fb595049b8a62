"use client";

import { useState } from "react";
import { fixed, signed } from "@/components/charts/format";
import { NoteName, SharpText } from "@/components/charts/note-name";
import { noteText } from "@/components/charts/note-spelling";
import { Select } from "@/components/forms/select";
import { StateWord } from "@/components/ui/state-word";
import type { AnalysisRecord } from "@/lib/plans/schema";
import { intervalWords } from "./beat-words";

/** A wound-up third that slows where it should quicken is heard; a few per cent of unevenness are not. */
const audibleRoughness = 0.06;

export function BeatsSection({ analysis }: { analysis: AnalysisRecord }) {
  const [interval, setInterval] = useState("major-third");
  const rates = analysis.beats.filter((beat) => beat.interval === interval);
  const names = [...new Set(analysis.beats.map((beat) => beat.interval))];
  return (
    <section aria-labelledby="beats-heading" className="mt-8">
      <h3 id="beats-heading">Beats</h3>
      <p className="lab mt-1">
        Beats per second where the partials coincide: + wide, − narrow. From the plan and the B of each key;
        of a note that does not belong, the B its neighbours foretell.
      </p>
      <Evenness evenness={analysis.evenness} meant={analysis.temperament !== "equal"} />
      <Select
        label="Interval"
        className="mt-4 w-full sm:w-72"
        value={interval}
        onChange={(event) => setInterval(event.target.value)}
        options={names.map((value) => ({ value, label: intervalWords[value] ?? value }))}
      />
      <ul
        className="mt-3 grid grid-cols-2 gap-x-6 border-edge border-t sm:grid-cols-3 xl:grid-cols-4"
        aria-label={`${intervalWords[interval] ?? interval}, beats per second`}
      >
        {rates.map((beat) => (
          <li
            key={`${beat.lowerMidi}-${beat.upperMidi}`}
            className="flex h-9 items-center justify-between border-hairline border-b"
          >
            <span className="font-serif text-16">
              <NoteName midi={beat.lowerMidi} />
              <span className="text-ink-soft">–</span>
              <NoteName midi={beat.upperMidi} />
            </span>
            <span>{signed(beat.beatsPerSecond, 2)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}

const risingWords: Record<string, string> = {
  "major-third": "Major thirds",
  "major-sixth": "Major sixths",
  "major-tenth": "Major tenths",
};

function Evenness({
  evenness,
  meant,
}: {
  evenness: AnalysisRecord["evenness"];
  /** The temperament itself has the keys beat differently. */
  meant: boolean;
}) {
  return (
    <ul className="mt-3 grid gap-1" aria-label="Evenness over the temperament octaves, by the lower key">
      {evenness.intervals.map(({ name, roughness, reversals, rates }) => {
        const uneven = reversals.length > 0 || roughness > audibleRoughness;
        const first = rates[0];
        const last = rates.at(-1);
        return (
          <li key={name} className="flex flex-wrap items-baseline gap-x-2">
            <StateWord kind={!uneven ? "done" : meant ? "draft" : "partial"} wrap>
              {risingWords[name] ?? name} {uneven ? "rise unevenly" : "rise evenly"}
              {first && last ? (
                <SharpText text={` from ${noteText(first.lowerMidi)} to ${noteText(last.lowerMidi)}`} />
              ) : null}
              {uneven && meant ? ", as this temperament means them to" : null}
            </StateWord>
            <span className="text-ink-soft">
              {first && last
                ? `${fixed(first.beatsPerSecond, 1)} to ${fixed(last.beatsPerSecond, 1)} a second, `
                : ""}
              {fixed(100 * roughness, 1)} % off a smooth rise
              {reversals.length > 0 ? (
                <SharpText text={`; slower again at ${reversals.map(noteText).join(", ")}`} />
              ) : null}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
