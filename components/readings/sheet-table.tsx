"use client";

import { PowerOfTen } from "@/components/ui/glyphs";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { NoteRow } from "./note-row";
import type { OpenNoteActions } from "./open-note";
import { emptyRow, type Row, rowKey } from "./sheet-row";
import { shownRows } from "./sheet-state";
import { tableMeasures } from "./table-measures";
import type { useCells } from "./use-cells";
import type { ReadingSheetState } from "./use-reading-sheet";

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
