"use client";

import { useEffect, useRef } from "react";
import { fixed, hertz, inharmonicity } from "@/components/charts/format";
import { OpenResidualLane } from "@/components/charts/residual-lane";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/class-names";
import { PowerOfTen } from "@/components/ui/glyphs";
import type { FitResult } from "@/lib/acoustics/types";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { halfB, residualPoints } from "./cell-look";
import { expectedHalfCents } from "./expected-scatter";
import { warningWords } from "./fit-words";
import type { Live } from "./live-fit";
import { NoteMatters, type NoteMattersActions } from "./note-matters";
import { OtherTakes } from "./other-takes";
import type { RowState } from "./row-state";
import type { Place, Row, RowKey } from "./sheet-row";
import { partialsOf, rowKey } from "./sheet-row";
import type { TableMeasures } from "./table-measures";

export type OpenNoteActions = NoteMattersActions & {
  remove: (key: RowKey) => void;
  undo: (key: RowKey) => void;
  choose: (place: Place) => void;
};

type Props = {
  row: Row;
  live: Live;
  state: RowState;
  measures: TableMeasures;
  columns: readonly number[];
  unit: ReadingUnit;
  referenceHz: number;
  canChange: boolean;
  wordsId: string;
  actions: OpenNoteActions;
};

/** Under the row in hand: the residuals at a readable size, the fit's figures, and what needs a decision. */
export function OpenNote(props: Props) {
  const { row, live, state, measures, columns, unit, referenceHz, canChange, wordsId, actions } = props;
  const { fit } = live;
  const key = rowKey(row.place);
  const points = residualPoints(fit);
  const shownPoints = points.some(({ partial }) => columns.includes(partial));
  const box = useInSight([
    shownPoints,
    fit?.rejected.length,
    live.questions.length,
    row.trouble?.kind,
    measures.wide,
  ]);
  return (
    <div
      ref={box}
      className={cx(measures.beside && "grid", "pb-3")}
      style={measures.beside ? frame(measures, columns) : undefined}
    >
      <div className="min-w-0 overflow-hidden">
        {fit && shownPoints ? (
          <OpenResidualLane
            points={points}
            columnWidth={measures.cell}
            columns={columns.length}
            firstPartial={columns[0] ?? 1}
            leading={measures.note}
            expected={columns.map((partial) => ({ partial, halfCents: expectedHalfCents(row.place.midi) }))}
          />
        ) : (
          <p className="py-4 pl-3 text-ink-soft" style={{ marginLeft: measures.note }}>
            {emptyWords(live, row)}
          </p>
        )}
      </div>
      <FitFacts
        fit={fit}
        style={measures.beside ? undefined : { marginLeft: measures.note }}
        className={cx(
          "text-12",
          measures.beside ? "px-3 pt-3" : "mx-3 mt-1 max-w-120 gap-x-6! sm:grid-cols-[auto_auto_auto_auto]!",
          !fit && "hidden",
        )}
      />
      <div
        className={cx("mt-1 grid gap-2 pr-3", measures.beside && "col-span-2")}
        style={{ paddingLeft: measures.note }}
      >
        <NoteMatters
          id={wordsId}
          row={row}
          live={live}
          state={state}
          unit={unit}
          referenceHz={referenceHz}
          canChange={canChange}
          actions={actions}
        />
        {live.fit?.warnings.map((warning) => (
          <p key={warning} className="lab">
            {warningWords[warning]}
          </p>
        ))}
        {canChange ? (
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
            <OtherTakes place={row.place} onChoose={actions.choose} />
            <span className="ml-auto flex items-center gap-1">
              <span className="lab mr-2" aria-live="off">
                {state.kind === "attention" ? "" : state.sentence}
              </span>
              <Button kind="quiet" size="small" onClick={() => actions.undo(key)}>
                Undo
              </Button>
              {partialsOf(row).length > 0 || row.saved ? (
                <Button kind="quiet" size="small" onClick={() => actions.remove(key)}>
                  Remove note
                </Button>
              ) : null}
            </span>
          </div>
        ) : null}
      </div>
    </div>
  );
}

/** What is said of the note in hand is not left behind the bottom bar when the note is opened, the words grow or the page is measured. */
function useInSight(grows: readonly unknown[]) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    // A note that was chosen gets the cursor only after it is drawn.
    const frame = requestAnimationFrame(() => {
      if (!box.current?.closest("table")?.contains(document.activeElement)) return;
      box.current.scrollIntoView({ block: "nearest" });
      document.activeElement?.scrollIntoView({ block: "nearest" });
    });
    return () => cancelAnimationFrame(frame);
  }, [...grows]);
  return box;
}

function frame({ note, cell }: TableMeasures, columns: readonly number[]) {
  return { gridTemplateColumns: `${note + cell * columns.length + 12}px minmax(0, 1fr)` };
}

function emptyWords(live: Live, row: Row): string {
  if (live.fit) return "The pitch alone: two more partials give B and its residuals.";
  return partialsOf(row).length === 0
    ? "Type the first partial, or paste a row from a spreadsheet."
    : "No fit yet.";
}

function FitFacts({
  fit,
  className,
  style,
}: {
  fit: FitResult | null;
  className?: string;
  style?: React.CSSProperties | undefined;
}) {
  if (!fit) return null;
  const f1Half = 1.96 * fit.f1SigmaCents * fit.f1Hz * (Math.LN2 / 1200);
  const facts = [
    { name: "f1, Hz", value: `${hertz(fit.f1Hz)}${fit.used.length > 1 ? ` ± ${f1Half.toFixed(2)}` : ""}` },
    { name: "B", value: fit.b === null ? "–" : inharmonicity(fit.b, halfB(fit)) },
    { name: "Scatter, cents", value: fixed(fit.rmsCents, 1) },
    { name: "Partials used", value: `${fit.used.length} of ${fit.residuals.length}` },
  ];
  return (
    <dl
      className={cx("grid grid-cols-[1fr_auto] content-start gap-x-3 gap-y-1.5 text-ink-soft", className)}
      style={style}
    >
      {facts.map(({ name, value }) => (
        <div key={name} className="contents">
          <dt className="whitespace-nowrap">
            {name}
            {name === "B" ? (
              <>
                {" "}
                <PowerOfTen exponent={-4} />
              </>
            ) : null}
          </dt>
          <dd className="text-right whitespace-nowrap text-ink">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
