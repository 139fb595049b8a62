import type { ReadingUnit } from "@/lib/readings/typed-number";
import {
  type Cell,
  type Draft,
  draftOf,
  emptyRow,
  type Place,
  type Row,
  type RowKey,
  rowKey,
  type Trouble,
} from "./sheet-row";

/** The reading sheet without its view: every change is an action, and nothing typed is ever let go. */
export type SheetState = {
  referenceHz: number;
  unit: ReadingUnit;
  rows: Readonly<Record<RowKey, Row>>;
  /** As the rows stand on the page. New ones never move those in hand. */
  order: readonly RowKey[];
  open: RowKey | null;
  /** The cell being typed in, as it was before. */
  editing: { key: RowKey; partial: number; before: Cell | undefined } | null;
  history: readonly Step[];
};

/** One thing done, as the rows were before it; null where there was no row. */
export type Step = ReadonlyArray<{ key: RowKey; before: Draft | null }>;

const MOST_STEPS = 200;

export const without = <T>(record: Readonly<Record<number, T>>, key: number): Readonly<Record<number, T>> =>
  Object.fromEntries(Object.entries(record).filter(([name]) => Number(name) !== key));

export function withChange(state: SheetState, key: RowKey, change: (row: Row) => Partial<Row>): SheetState {
  const row = state.rows[key];
  if (!row) return state;
  return { ...state, rows: { ...state.rows, [key]: { ...row, ...change(row) } } };
}

export function withHistory(state: SheetState, step: Step): SheetState {
  return step.length === 0 ? state : { ...state, history: [...state.history, step].slice(-MOST_STEPS) };
}

/** A change by the person: it can be undone, and asks the server anew whatever it said before. */
export function changed(state: SheetState, key: RowKey, change: (row: Row) => Partial<Row>): SheetState {
  const row = state.rows[key];
  if (!row) return state;
  return withHistory(
    withChange(state, key, (now) => ({ trouble: mended(now.trouble), ...change(now) })),
    [{ key, before: draftOf(row) }],
  );
}

/** A conflict or a lost sign-in is not mended by typing on; the rest is. */
export function mended(trouble: Trouble | null): Trouble | null {
  return trouble?.kind === "stale" || trouble?.kind === "signed-out" ? trouble : null;
}

function placeIn(state: SheetState, place: Place): number {
  const rank = ({ midi, string, take }: Place) => midi * 1000 + (string === "all" ? 0 : string) * 100 + take;
  const before = state.order.findIndex((key) => {
    const row = state.rows[key];
    return row !== undefined && rank(row.place) > rank(place);
  });
  return before < 0 ? state.order.length : before;
}

export function withRow(state: SheetState, place: Place, atEnd = false): SheetState {
  const key = rowKey(place);
  const there = state.rows[key];
  if (there && !there.removed) return state;
  if (there) return withChange(state, key, () => ({ removed: false, cells: {}, kept: [], dropped: [] }));
  const index = atEnd ? state.order.length : placeIn(state, place);
  return {
    ...state,
    rows: { ...state.rows, [key]: emptyRow(place) },
    order: state.order.toSpliced(index, 0, key),
  };
}

export function withoutRow(state: SheetState, key: RowKey): SheetState {
  const { [key]: _, ...rows } = state.rows;
  return {
    ...state,
    rows,
    order: state.order.filter((one) => one !== key),
    open: state.open === key ? null : state.open,
    editing: state.editing?.key === key ? null : state.editing,
  };
}
