"use client";

import { type ChangeEventHandler, memo } from "react";
import { inharmonicity } from "@/components/charts/format";
import { NoteName } from "@/components/charts/note-name";
import { spokenNote } from "@/components/charts/note-spelling";
import { ResidualLane } from "@/components/charts/residual-lane";
import { cx } from "@/components/ui/class-names";
import { StateWord } from "@/components/ui/state-word";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { cellLook, cellText, halfB, residualPoints } from "./cell-look";
import { placeWords } from "./fit-words";
import type { Live } from "./live-fit";
import { OpenNote, type OpenNoteActions } from "./open-note";
import { PartialCell } from "./partial-cell";
import { QualityWord } from "./quality-word";
import { hasRowNotes, RowNotes } from "./row-notes";
import { type RowState, rowState } from "./row-state";
import { type Row, rowKey } from "./sheet-row";
import type { TableMeasures } from "./table-measures";

type Props = {
  prefix: string;
  row: Row;
  live: Live;
  open: boolean;
  inHand: number | null;
  tabPartial: number;
  unit: ReadingUnit;
  referenceHz: number;
  columns: readonly number[];
  measures: TableMeasures;
  canChange: boolean;
  /** Set on the row that is only proposed. */
  predictedB?: number | null;
  /** Why the note does not belong, or null. */
  flag: string | null;
  actions: OpenNoteActions;
  onType: ChangeEventHandler<HTMLInputElement>;
};

/** One note: its partials with the lane of their residuals, B and quality; opened, what the fit says of them. */
export const NoteRow = memo(function NoteRow(props: Props) {
  const { prefix, row, live, open, inHand, tabPartial, unit, referenceHz, columns, measures } = props;
  const { canChange, predictedB, flag, actions, onType } = props;
  const key = rowKey(row.place);
  const proposed = predictedB !== undefined;
  const state = rowState(row, live, referenceHz);
  const words = placeWords(row.place);
  const points = residualPoints(live.fit);
  const noted = hasRowNotes({ row, flag, open });
  const wordsId = `${prefix}${key}-words`;

  return (
    <>
      <tr
        className={cx(
          "group/row h-11 align-top max-lg:h-16",
          open ? "bg-brass-wash" : measures.wide && !noted && "border-b border-hairline",
          open && "[&>*:first-child]:shadow-[inset_3px_0_0_var(--brass-fill)]",
        )}
      >
        <th
          scope="row"
          className={cx(
            "serif overflow-hidden pl-3 text-left text-19 leading-11! font-medium! whitespace-nowrap max-lg:pl-1.5",
            proposed && "text-ink-soft",
          )}
        >
          <NoteName midi={row.place.midi} />
          {words ? (
            <span className="-mt-3 mb-1 block font-sans text-12 leading-3 font-normal whitespace-normal text-ink-soft">
              {words}
            </span>
          ) : null}
        </th>
        {columns.map((partial, index) => (
          <td key={partial} className="relative p-0 pt-px">
            <PartialCell
              prefix={prefix}
              rowKey={key}
              partial={partial}
              text={cellText(row, partial, { unit, referenceHz, inHand: inHand === partial })}
              look={cellLook(row, partial, live)}
              label={`${spokenNote(row.place.midi)}${words ? `, ${words}` : ""}, partial ${partial}, ${unit === "hz" ? "hertz" : "cents"}`}
              describedBy={open && cellLook(row, partial, live) !== "plain" ? wordsId : undefined}
              tabStop={partial === tabPartial}
              readOnly={!canChange}
              figures={measures.figures}
              onType={onType}
            />
            {index === 0 && !open ? (
              <span className="pointer-events-none absolute bottom-0 left-0">
                {points.length > 0 ? (
                  <ResidualLane
                    points={points}
                    columnWidth={measures.cell}
                    columns={columns.length}
                    firstPartial={columns[0] ?? 1}
                  />
                ) : null}
              </span>
            ) : null}
          </td>
        ))}
        {measures.wide ? (
          <>
            <td
              className={cx(
                "text-right leading-11 whitespace-nowrap",
                open ? "font-semibold" : "font-normal",
              )}
            >
              <FittedB live={live} predictedB={predictedB} />
            </td>
            <td className="pr-3 text-right leading-11 whitespace-nowrap">
              <FitWord live={live} state={state} proposed={proposed} />
            </td>
          </>
        ) : (
          <td />
        )}
      </tr>
      {measures.wide ? null : (
        <tr
          className={cx(
            "h-6",
            open
              ? "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)]"
              : !noted && "border-b border-hairline",
          )}
        >
          <td colSpan={columns.length + 2} className="pr-1.5 pb-1.5 text-right text-12">
            <span className="inline-flex items-baseline gap-4">
              <FittedB live={live} predictedB={predictedB} />
              <FitWord live={live} state={state} proposed={proposed} />
            </span>
          </td>
        </tr>
      )}
      {noted ? (
        <tr
          className={
            open ? "bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)]" : "border-b border-hairline"
          }
        >
          <td
            colSpan={columns.length + (measures.wide ? 3 : 2)}
            className={cx("pb-2", measures.wide ? "pr-3" : "pr-1.5")}
            style={{ paddingLeft: measures.note }}
          >
            <RowNotes row={row} state={state} flag={flag} open={open} actions={actions} />
          </td>
        </tr>
      ) : null}
      {open ? (
        <tr className="border-b border-edge! bg-brass-wash shadow-[inset_3px_0_0_var(--brass-fill)] motion-safe:animate-[row-open_120ms_ease-out]">
          <td colSpan={columns.length + (measures.wide ? 3 : 2)} className="p-0">
            <OpenNote
              row={row}
              live={live}
              state={state}
              measures={measures}
              columns={columns}
              unit={unit}
              referenceHz={referenceHz}
              canChange={canChange}
              wordsId={wordsId}
              actions={actions}
            />
          </td>
        </tr>
      ) : null}
    </>
  );
});

function FittedB({ live, predictedB }: { live: Live; predictedB?: number | null | undefined }) {
  if (predictedB !== undefined) {
    return <span className="text-ink-soft">predicted {inharmonicity(predictedB)}</span>;
  }
  const { fit } = live;
  if (!fit || fit.b === null) return <span className="text-ink-soft">–</span>;
  return (
    <span className={live.authoritative ? undefined : "text-ink-soft"}>
      {inharmonicity(fit.b, halfB(fit))}
    </span>
  );
}

function FitWord({ live, state, proposed }: { live: Live; state: RowState; proposed: boolean }) {
  if (proposed) return <span className="text-ink-soft">next</span>;
  if (state.kind === "attention") return <StateWord kind="attention">{state.word}</StateWord>;
  if (live.fit) return <QualityWord fit={live.fit} />;
  return <span className="text-ink-soft">{state.kind === "empty" ? "" : state.word}</span>;
}
