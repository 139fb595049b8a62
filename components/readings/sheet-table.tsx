"use client";

import { PowerOfTen } from "@/components/ui/glyphs";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { NoteRow } from "./note-row";
import type { OpenNoteActions } from "./open-note";
import type { Figures } from "./partial-cell";
import { ROW_HOLDS_FIT, ROW_HOLDS_TEN } from "./partial-columns";
import { emptyRow, type Row, rowKey } from "./sheet-row";
import { shownRows } from "./sheet-state";
import type { useCells } from "./use-cells";
import type { ReadingSheetState } from "./use-reading-sheet";

export type TableMeasures = {
  /** B and the quality stand in the row. */
  wide: boolean;
  /** The open note's figures stand beside its residuals. */
  beside: boolean;
  note: number;
  cell: number;
  figures: Figures;
  b: number;
  fit: number;
};

/** Six tabular figures with their point are 45.6, 53.2 and 60.8 px wide at 12, 14 and 16 px. */
const ROOM: ReadonlyArray<{ figures: Figures; cell: number }> = [
  { figures: 16, cell: 65 },
  { figures: 14, cell: 58 },
  { figures: 12, cell: 50 },
];

/** Room for "predicted 23.1", and for a sign with "not saved". */
const B_WIDTH = 104;
const FIT_WIDTH = 95;

/**
 * Where there is room B and the quality stand in the row, else on a line under the partials. A column is
 * never narrower than its figures: where the page is, the table is moved sideways.
 */
export function tableMeasures(width: number, columns: number): TableMeasures {
  if (width >= ROW_HOLDS_TEN) {
    const [note, cell, b] = [60, 58, B_WIDTH];
    return { wide: true, beside: true, note, cell, figures: 14, b, fit: width - note - cell * columns - b };
  }
  if (width >= ROW_HOLDS_FIT) {
    const [note, b] = [52, B_WIDTH];
    const cell = Math.min(66, Math.floor((width - note - b - FIT_WIDTH) / columns));
    return {
      wide: true,
      beside: false,
      note,
      cell,
      figures: figuresIn(cell),
      b,
      fit: width - note - cell * columns - b,
    };
  }
  const note = width < 560 ? 44 : 56;
  const cell = Math.max(50, Math.min(72, Math.floor((width - note) / columns)));
  return { wide: false, beside: false, note, cell, figures: figuresIn(cell), b: 0, fit: 0 };
}

function figuresIn(cell: number): Figures {
  return ROOM.find((room) => cell >= room.cell)?.figures ?? 12;
}

export type Suggestion = { midi: number; b: number | null };

type Props = {
  prefix: string;
  sheet: ReadingSheetState;
  /** Of the page it stands in, pixels. */
  width: number;
  cells: ReturnType<typeof useCells>;
  columns: readonly number[];
  unit: ReadingUnit;
  canChange: boolean;
  /** The note to read next, ready to be typed into. */
  suggestion: Suggestion | null;
  /** Why notes do not belong, by key. */
  flags: ReadonlyMap<number, string>;
  actions: OpenNoteActions;
};

export function SheetTable(props: Props) {
  const { prefix, sheet, width, cells, columns, unit, canChange, suggestion, flags, actions } = props;
  const measures = tableMeasures(width, columns.length);
  const { state, liveOf } = sheet;
  const rows = shownRows(state).map((row) => ({ row, predictedB: undefined }));
  // One list with the proposed row, so that a row which becomes real keeps its cells, and the cursor in them.
  const lines: ReadonlyArray<{ row: Row; predictedB: number | null | undefined }> = suggestion
    ? [
        ...rows,
        { row: emptyRow({ midi: suggestion.midi, string: "all", take: 1 }), predictedB: suggestion.b },
      ]
    : rows;
  const tabPartial = cells.inHand?.partial ?? columns[0] ?? 1;

  return (
    <div className="overflow-x-auto">
      <table
        className="w-full table-fixed border-collapse"
        onFocus={cells.onFocus}
        onBlur={cells.onBlur}
        onKeyDown={cells.onKeyDown}
        onPaste={cells.onPaste}
      >
        <caption className="sr-only">
          Readings by note and partial, in {unit === "hz" ? "hertz" : "cents from the harmonic"}
        </caption>
        <colgroup>
          <col style={{ width: measures.note }} />
          {columns.map((partial) => (
            <col key={partial} style={{ width: measures.cell }} />
          ))}
          {measures.wide ? <col style={{ width: measures.b }} /> : null}
          {measures.wide ? <col style={{ width: measures.fit }} /> : <col />}
        </colgroup>
        <thead>
          <tr className="h-8 border-b border-edge! align-bottom text-12 [&>*]:pb-1.5 [&>*]:font-medium [&>*]:text-ink-soft">
            <th scope="col" className="pl-3 text-left max-lg:pl-1">
              Note
            </th>
            {columns.map((partial) => (
              <th key={partial} scope="col" className="pr-1 text-right">
                <span className="sr-only">Partial </span>
                {partial}
              </th>
            ))}
            {measures.wide ? (
              <>
                <th scope="col" className="text-right whitespace-nowrap">
                  B <PowerOfTen exponent={-4} />, 95 %
                </th>
                <th scope="col" className="pr-3 text-right">
                  Fit
                </th>
              </>
            ) : (
              <td />
            )}
          </tr>
        </thead>
        <tbody>
          {lines.map(({ row, predictedB }) => {
            const key = rowKey(row.place);
            return (
              <NoteRow
                key={key}
                prefix={prefix}
                row={row}
                live={liveOf(row)}
                open={state.open === key}
                inHand={cells.inHand?.key === key ? cells.inHand.partial : null}
                tabPartial={tabPartial}
                unit={unit}
                referenceHz={state.referenceHz}
                columns={columns}
                measures={measures}
                canChange={canChange}
                predictedB={predictedB}
                flag={predictedB === undefined ? (flags.get(row.place.midi) ?? null) : null}
                actions={actions}
                onType={cells.onType}
              />
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
