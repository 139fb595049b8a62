import type { NoteRecord } from "@/lib/readings/schema";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import {
  afterFailure,
  afterRemoval,
  afterSave,
  conflictSettled,
  type KeptDraft,
  received,
  restored,
} from "./sheet-answers";
import {
  draftOf,
  isChanged,
  type Place,
  type Row,
  type RowKey,
  rowKey,
  rowOf,
  type Trouble,
  withSent,
} from "./sheet-row";
import { changed, type SheetState, withChange, without, withoutRow, withRow } from "./sheet-rows";
import { entered, judged, reverted, settled, typed, undone, type Values } from "./sheet-typing";

export type SheetAction =
  | { type: "unit"; unit: ReadingUnit }
  | { type: "open"; key: RowKey | null }
  | { type: "choose"; place: Place; atEnd?: boolean }
  | { type: "put-away"; key: RowKey }
  | { type: "type"; place: Place; partial: number; text: string }
  | { type: "settle" }
  | { type: "revert" }
  | {
      type: "enter";
      rows: ReadonlyArray<{ place: Place; values: Values; whole: boolean }>;
      unit: ReadingUnit;
    }
  | { type: "judge"; key: RowKey; partial: number; keep: boolean }
  | { type: "confirm"; key: RowKey; partial: number }
  | { type: "remove"; key: RowKey }
  | { type: "undo"; key: RowKey | null }
  | { type: "sending"; keys: readonly RowKey[] }
  | { type: "saved"; key: RowKey; record: NoteRecord }
  | { type: "gone"; key: RowKey }
  | { type: "failed"; key: RowKey; trouble: Trouble; faults?: Readonly<Record<number, string>> }
  | { type: "again"; key: RowKey; alone?: boolean }
  | { type: "settle-conflict"; key: RowKey; take: "theirs" | "mine" }
  | { type: "received"; notes: readonly NoteRecord[]; referenceHz?: number }
  | { type: "restore"; drafts: readonly KeptDraft[] };

export function sheetState(referenceHz: number, notes: readonly NoteRecord[]): SheetState {
  const rows = notes.map(rowOf);
  return {
    referenceHz,
    unit: "cents",
    rows: Object.fromEntries(rows.map((row) => [rowKey(row.place), row])),
    order: rows.map((row) => rowKey(row.place)),
    open: null,
    editing: null,
    history: [],
  };
}

export function sheetReducer(state: SheetState, action: SheetAction): SheetState {
  switch (action.type) {
    case "unit":
      return { ...settled(state), unit: action.unit };
    case "open":
      return state.open === action.key ? state : { ...settled(state), open: action.key };
    case "choose":
      return { ...withRow(settled(state), action.place, action.atEnd), open: rowKey(action.place) };
    case "put-away":
      return state.rows[action.key]?.saved ? state : withoutRow(state, action.key);
    case "type":
      return typed(withRow(state, action.place, true), rowKey(action.place), action.partial, action.text);
    case "settle":
      return settled(state);
    case "revert":
      return reverted(state);
    case "enter":
      return entered(settled(state), action.rows, action.unit);
    case "judge":
      return judged(settled(state), action.key, action.partial, action.keep);
    case "confirm":
      return changed(state, action.key, (row) => ({
        confirmed: [...row.confirmed, action.partial],
        faults: without(row.faults, action.partial),
      }));
    case "remove":
      return changed(settled(state), action.key, () => ({ removed: true }));
    case "undo":
      return undone(settled(state), action.key);
    case "sending":
      return action.keys.reduce(
        (after, key) =>
          withChange(after, key, (row) => ({
            sending: true,
            sent: withSent(row, state.referenceHz),
            trouble: null,
          })),
        state,
      );
    case "saved":
      return withChange(state, action.key, (row) => afterSave(row, action.record, state.referenceHz));
    case "gone":
      return afterRemoval(state, action.key);
    case "failed":
      return withChange(state, action.key, (row) => afterFailure(row, action.trouble, action.faults ?? {}));
    case "again":
      return withChange(state, action.key, (row) => ({
        trouble: null,
        sending: action.alone === undefined ? row.sending : false,
        alone: action.alone ?? row.alone,
      }));
    case "settle-conflict":
      return conflictSettled(state, action.key, action.take);
    case "received":
      return received({ ...state, referenceHz: action.referenceHz ?? state.referenceHz }, action.notes);
    case "restore":
      return restored(state, action.drafts);
  }
}

/** Rows with something that the server does not have: what a reload must not lose. */
export function keptDrafts(state: SheetState): KeptDraft[] {
  return Object.values(state.rows)
    .filter((row) => isChanged(row, state.referenceHz))
    .map((row) => ({ place: row.place, version: row.version, draft: draftOf(row), sent: row.sent }));
}

export function shownRows(state: SheetState): Row[] {
  return state.order.flatMap((key) => {
    const row = state.rows[key];
    return row && !row.removed ? [row] : [];
  });
}

/** The first partial with no reading yet, among those shown. */
export function firstEmpty(row: Row | undefined, columns: readonly number[]): number {
  return columns.find((partial) => !row?.cells[partial]) ?? columns[0] ?? 1;
}
