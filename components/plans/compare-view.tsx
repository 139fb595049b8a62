"use client";

import type { Route } from "next";
import { usePathname, useRouter } from "next/navigation";
import { useMemo, useState } from "react";
import { fixed, signedCents } from "@/components/charts/format";
import { KeyPlots } from "@/components/charts/key-plots";
import { NoteName } from "@/components/charts/note-name";
import { CursorHint, Readout } from "@/components/charts/readout";
import { Select } from "@/components/forms/select";
import { WorkHead } from "@/components/shell/spread";
import { Button } from "@/components/ui/button";
import { StateWord } from "@/components/ui/state-word";
import { studentQuantile } from "@/lib/acoustics";
import type { ComparisonRecord } from "@/lib/plans/compare/schema";
import { changePlot, overlayPlot, percentOf, pitchPlot, verdictOf } from "./compare-plots";
import type { SheetOption } from "./sheet-choice";

type Props = {
  comparison: ComparisonRecord;
  instrument: { firstMidi: number; lastMidi: number; breakMidi: number | null };
  sheets: readonly SheetOption[];
  names: { before: string; after: string };
};

export function CompareView({ comparison, instrument, sheets, names }: Props) {
  const changed = comparison.notes.filter((note) => note.verdict === "changed");
  const comparable = comparison.notes.filter((note) => note.verdict !== "not-comparable");
  const [cursor, setCursor] = useState(changed[0]?.midi ?? comparison.notes[0]?.midi ?? 69);
  const [numbers, setNumbers] = useState(false);
  const plots = useMemo(
    () => [overlayPlot(comparison, names), changePlot(comparison), pitchPlot(comparison, names)],
    [comparison, names],
  );
  const marks = useMemo(
    () =>
      comparison.notes.map(({ midi, verdict }) => ({
        midi,
        kind: verdict === "changed" ? ("flagged" as const) : ("measured" as const),
      })),
    [comparison],
  );
  const inHand = comparison.notes.find((note) => note.midi === cursor);

  return (
    <>
      <WorkHead
        title="Compare"
        summary={`${names.before} against ${names.after}. ${comparable.length} of ${comparison.notes.length} notes can be compared; false discoveries held to ${fixed(100 * comparison.falseDiscoveryRate, 0)} %.`}
        actions={
          <Button kind="quiet" aria-expanded={numbers} onClick={() => setNumbers(!numbers)}>
            {numbers ? "Hide numbers" : "Numbers"}
          </Button>
        }
      />
      <SidesChoice comparison={comparison} sheets={sheets} />
      <Verdict comparison={comparison} changed={changed} />
      <KeyPlots
        range={instrument}
        plots={plots}
        marks={marks}
        cursor={cursor}
        onCursor={setCursor}
        tables={numbers ? "shown" : "hidden"}
      >
        <Readout
          midi={cursor}
          about={inHand ? verdictOf(inHand) : "not read"}
          noteWidth={280}
          cells={[
            {
              key: "change",
              label: "Change of B, %",
              value: inHand?.deltaLnB == null ? "–" : fixed(percentOf(inHand.deltaLnB), 1),
              width: 128,
            },
            { key: "pitch", label: "Pitch, cents", value: signedCents(inHand?.pitchCents), width: 112 },
            {
              key: "seen",
              label: "Smallest change seen",
              value: inHand?.detectableChange == null ? "–" : `${fixed(100 * inHand.detectableChange, 0)} %`,
              width: 176,
            },
          ]}
          hint={<CursorHint />}
        />
      </KeyPlots>
      <PitchByRegister comparison={comparison} />
    </>
  );
}

/** Two lists; whichever is older is drawn as the older. */
function SidesChoice({
  comparison,
  sheets,
}: {
  comparison: ComparisonRecord;
  sheets: readonly SheetOption[];
}) {
  const router = useRouter();
  const pathname = usePathname();
  const { before, after } = comparison;
  const go = (one: string, other: string) =>
    router.push(`${pathname}?sheets=${one},${other}` as Route, { scroll: false });
  const options = (excluded: string) =>
    sheets.map(({ id, label }) => ({ value: id, label, disabled: id === excluded }));
  return (
    <div className="mb-5 grid gap-4 sm:grid-cols-2">
      <Select
        label="Earlier"
        value={before.sheetId}
        options={options(after.sheetId)}
        onChange={(event) => go(event.target.value, after.sheetId)}
      />
      <Select
        label="Later"
        value={after.sheetId}
        options={options(before.sheetId)}
        onChange={(event) => go(before.sheetId, event.target.value)}
      />
    </div>
  );
}

function Verdict({
  comparison,
  changed,
}: {
  comparison: ComparisonRecord;
  changed: ComparisonRecord["notes"];
}) {
  const notComparable = comparison.notes.filter(({ verdict }) => verdict === "not-comparable");
  if (notComparable.length === comparison.notes.length) {
    return (
      <p className="mb-4">
        <StateWord kind="unsure" wrap>
          No note can be compared: read the same notes with three or more partials on both visits.
        </StateWord>
      </p>
    );
  }
  return (
    <ul className="mb-4 grid gap-1">
      {changed.length === 0 ? (
        <li>
          <StateWord kind="done" wrap>
            No note's stiffness changed beyond its error.
          </StateWord>
        </li>
      ) : (
        changed.map((note) => (
          <li key={note.midi}>
            <StateWord kind="attention" wrap>
              <NoteName midi={note.midi} />: {verdictOf(note)}
            </StateWord>
          </li>
        ))
      )}
      {notComparable.length > 0 ? (
        <li>
          <StateWord kind="unsure" wrap>
            {notComparable.length === 1
              ? "One note cannot be compared."
              : `${notComparable.length} notes cannot be compared.`}
          </StateWord>
        </li>
      ) : null}
    </ul>
  );
}

const registers = { bass: "Bass", tenor: "Tenor", middle: "Middle", treble: "Treble", top: "Top" } as const;

function PitchByRegister({ comparison: { pitch, humidity } }: { comparison: ComparisonRecord }) {
  return (
    <section aria-labelledby="pitch-heading" className="mt-8 max-w-160">
      <h3 id="pitch-heading">Pitch since then, by register</h3>
      {humidity ? (
        <p className="lab mt-1">
          Humidity {fixed(humidity.beforePercent, 0)} % then, {fixed(humidity.afterPercent, 0)} % now.
        </p>
      ) : null}
      <table className="mt-2 w-full border-collapse">
        <thead>
          <tr className="h-8 border-b border-edge! text-right align-bottom text-12 text-ink-soft [&>*]:pb-1.5 [&>*]:font-medium [&>*:not(:first-child)]:pl-3">
            <th scope="col" className="text-left">
              Register
            </th>
            <th scope="col">Notes</th>
            <th scope="col">Moved, cents</th>
            <th scope="col">± 95 %</th>
          </tr>
        </thead>
        <tbody>
          {pitch.map(({ register, notes, meanCents, sigmaCents }) => (
            <tr key={register} className="h-9 border-b border-hairline [&>td]:pl-3 [&>td]:text-right">
              <th scope="row" className="text-left font-normal">
                {registers[register]}
              </th>
              <td>{notes}</td>
              <td>{signedCents(meanCents)}</td>
              <td>{sigmaCents === null ? "–" : fixed(studentQuantile(0.05, notes - 1) * sigmaCents, 1)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
