import type { ReadingUnit } from "@/lib/readings/typed-number";
import { type Cell, type Cells, draftOf, type Place, type RowKey, rowKey } from "./sheet-row";
import {
  changed,
  mended,
  type SheetState,
  type Step,
  withChange,
  withHistory,
  without,
  withoutRow,
  withRow,
} from "./sheet-rows";

export type Values = ReadonlyArray<{ partial: number; text: string }>;

export function typed(state: SheetState, key: RowKey, partial: number, text: string): SheetState {
  const same = state.editing?.key === key && state.editing.partial === partial;
  const begun = same ? state : settled(state);
  const row = begun.rows[key];
  if (!row) return state;
  const cell: Cell = { kind: "typed", text, unit: begun.unit, settled: false };
  return {
    ...withChange(begun, key, (now) => ({
      cells: { ...now.cells, [partial]: cell },
      faults: without(now.faults, partial),
      // A confirmation was of the old number.
      confirmed: now.confirmed.filter((one) => one !== partial),
      trouble: mended(now.trouble),
    })),
    editing: same ? begun.editing : { key, partial, before: row.cells[partial] },
  };
}

/** The cell in hand is left: an emptied one is taken out, a number is one step that can be undone. */
export function settled(state: SheetState): SheetState {
  const { editing } = state;
  const row = editing && state.rows[editing.key];
  const cell = row?.cells[editing?.partial ?? 0];
  if (!editing || !row || cell?.kind !== "typed") return editing ? { ...state, editing: null } : state;
  const { key, partial, before } = editing;
  const text = cell.text.trim();
  const rest = without(row.cells, partial);
  const cells: Cells = text === "" ? rest : { ...row.cells, [partial]: { ...cell, text, settled: true } };
  const gone = text === "";
  const after = withChange({ ...state, editing: null }, key, () => ({
    cells,
    ...(gone ? { kept: minus(row.kept, partial), dropped: minus(row.dropped, partial) } : {}),
  }));
  return withHistory(after, [
    { key, before: { ...draftOf(row), cells: before ? { ...row.cells, [partial]: before } : rest } },
  ]);
}

const minus = (list: readonly number[], value: number) => list.filter((one) => one !== value);

export function reverted(state: SheetState): SheetState {
  const { editing } = state;
  if (!editing) return state;
  const { key, partial, before } = editing;
  return {
    ...withChange(state, key, (row) => ({
      cells: before ? { ...row.cells, [partial]: before } : without(row.cells, partial),
    })),
    editing: null,
  };
}

/** Rows or runs of numbers from elsewhere; all of them are one step. A whole row takes the old one's place. */
export function entered(
  state: SheetState,
  rows: ReadonlyArray<{ place: Place; values: Values; whole: boolean }>,
  unit: ReadingUnit,
): SheetState {
  const step: Step = rows.map(({ place }) => {
    const row = state.rows[rowKey(place)];
    return { key: rowKey(place), before: row ? draftOf(row) : null };
  });
  const after = rows.reduce((now, { place, values, whole }) => {
    const cells = Object.fromEntries(
      values.map(({ partial, text }): [number, Cell] => [
        partial,
        { kind: "typed", text: text.trim(), unit, settled: true },
      ]),
    );
    const partials = new Set(values.map(({ partial }) => partial));
    const untouched = (list: readonly number[]) =>
      whole ? [] : list.filter((partial) => !partials.has(partial));
    return withChange(withRow(now, place), rowKey(place), (row) => ({
      cells: whole ? cells : { ...row.cells, ...cells },
      kept: untouched(row.kept),
      dropped: untouched(row.dropped),
      confirmed: untouched(row.confirmed),
      removed: false,
      trouble: mended(row.trouble),
      faults: {},
    }));
  }, state);
  return withHistory(after, step);
}

export function judged(state: SheetState, key: RowKey, partial: number, keep: boolean): SheetState {
  return changed(state, key, (row) => ({
    kept: keep ? [...minus(row.kept, partial), partial] : minus(row.kept, partial),
    dropped: keep ? minus(row.dropped, partial) : [...minus(row.dropped, partial), partial],
    faults: without(row.faults, partial),
  }));
}

/** Takes back the last step of a row, or of the sheet when no row is in hand. */
export function undone(state: SheetState, key: RowKey | null): SheetState {
  const index = state.history.findLastIndex((step) => key === null || step.some((part) => part.key === key));
  const step = state.history[index];
  if (!step) return state;
  const after = step.reduce((now, part) => {
    const row = now.rows[part.key];
    if (part.before) {
      const before = part.before;
      const there = row ? now : withRow(now, placeOf(part.key));
      // A note keeps at least one partial: one that had none before it was saved goes again.
      const removed = before.removed || (Object.keys(before.cells).length === 0 && row?.saved != null);
      return withChange(there, part.key, (one) => ({
        ...before,
        removed,
        faults: {},
        trouble: mended(one.trouble),
      }));
    }
    if (!row) return now;
    return row.saved || row.sending
      ? withChange(now, part.key, () => ({ removed: true }))
      : withoutRow(now, part.key);
  }, state);
  return { ...after, history: state.history.toSpliced(index, 1) };
}

export function placeOf(key: RowKey): Place {
  const [midi = "", string = "", take = ""] = key.split("-");
  return { midi: Number(midi), string: string === "all" ? "all" : Number(string), take: Number(take) };
}
