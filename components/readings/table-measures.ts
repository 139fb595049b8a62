import type { Figures } from "./partial-cell";
import { ROW_HOLDS_FIT, ROW_HOLDS_TEN } from "./partial-columns";

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
