import type { NoteRecord } from "@/lib/readings/schema";
import {
  type Cell,
  cellHz,
  type Draft,
  draftOf,
  isChanged,
  isOwnWrite,
  type Place,
  type Row,
  type RowKey,
  rowKey,
  rowOf,
  type Sent,
  sameHz,
  savedDraft,
  type Trouble,
} from "./sheet-row";
import { type SheetState, type Step, withChange, withHistory, withoutRow, withRow } from "./sheet-rows";

export type KeptDraft = { place: Place; version: number; draft: Draft; sent?: readonly Sent[] };

/** The server's answer counts; what was typed while it was on its way stays, on top of it. */
export function afterSave(row: Row, record: NoteRecord, referenceHz: number): Partial<Row> {
  const read = new Map(record.readings.map(({ partial, hz }) => [partial, hz]));
  const cells = Object.fromEntries(
    Object.entries(row.cells).map(([name, cell]): [string, Cell] => {
      const held = cellHz(row, Number(name), referenceHz);
      const hz = read.get(Number(name));
      const same = hz !== undefined && held !== null && sameHz(held, hz);
      return [name, same && (cell.kind === "read" || cell.settled) ? { kind: "read", hz } : cell];
    }),
  );
  return {
    cells,
    saved: record,
    version: record.version,
    sending: false,
    sent: [],
    alone: false,
    trouble: null,
    faults: {},
  };
}

export function afterRemoval(state: SheetState, key: RowKey): SheetState {
  const row = state.rows[key];
  if (!row) return state;
  if (row.removed) return withoutRow(state, key);
  // Undone while it was on its way: written again as a new note.
  return withChange(state, key, () => ({
    saved: null,
    version: 0,
    sending: false,
    sent: [],
    trouble: null,
  }));
}

export function afterFailure(
  row: Row,
  trouble: Trouble,
  faults: Readonly<Record<number, string>>,
): Partial<Row> {
  if (trouble.kind === "stale" && isOwnWrite(row.sent, trouble.theirs)) {
    // Our own earlier sending, of which we never heard: no clash, and what is typed goes on top of it.
    const { theirs } = trouble;
    return { saved: theirs, version: theirs?.version ?? 0, sending: false, trouble: null, faults: {} };
  }
  const known = Object.fromEntries(Object.entries(faults).filter(([partial]) => row.cells[Number(partial)]));
  const atCells = Object.keys(known).length > 0;
  return {
    sending: false,
    trouble: trouble.kind === "refused" && atCells ? null : trouble,
    faults: known,
    // A row that may not be removed is there again.
    removed: row.removed && trouble.kind !== "refused" && trouble.kind !== "stale",
  };
}

export function conflictSettled(state: SheetState, key: RowKey, take: "theirs" | "mine"): SheetState {
  const row = state.rows[key];
  if (row?.trouble?.kind !== "stale") return state;
  const { theirs } = row.trouble;
  const now = { saved: theirs, version: theirs?.version ?? 0, sent: [], trouble: null, faults: {} };
  if (take === "mine") return withChange(state, key, () => now);
  const step: Step = [{ key, before: draftOf(row) }];
  if (!theirs) return withHistory(withoutRow(state, key), step);
  return withHistory(
    withChange({ ...state, editing: null }, key, () => ({ ...now, ...savedDraft(theirs) })),
    step,
  );
}

/** The sheet as read anew: rows nobody is changing here follow it, the others keep what is typed. */
export function received(state: SheetState, notes: readonly NoteRecord[]): SheetState {
  const there = new Set(notes.map(rowKey));
  const followed = notes.reduce((now, note) => {
    const key = rowKey(note);
    const row = now.rows[key];
    if (!row) return withChange(withRow(now, note), key, () => rowOf(note));
    const busy = row.sending || isChanged(row, now.referenceHz) || now.editing?.key === key;
    return busy || note.version <= row.version ? now : withChange(now, key, () => rowOf(note));
  }, state);
  return Object.entries(followed.rows).reduce((now, [key, row]) => {
    const gone = row.saved && !there.has(key) && !row.sending;
    return gone && !isChanged(row, now.referenceHz) ? withoutRow(now, key) : now;
  }, followed);
}

export function restored(state: SheetState, drafts: readonly KeptDraft[]): SheetState {
  return drafts.reduce((now, { place, version, draft, sent = [] }) => {
    const cells = Object.fromEntries(
      Object.entries(draft.cells).map(([name, cell]): [string, Cell] => [
        name,
        cell.kind === "typed" ? { ...cell, settled: true } : cell,
      ]),
    );
    const key = rowKey(place);
    const after = withChange(withRow(now, place), key, ({ saved }) => ({
      ...draft,
      cells,
      sent,
      // What was on its way when the page went has arrived: the draft stands on top of it.
      version: saved && isOwnWrite(sent, saved) ? saved.version : version,
    }));
    const row = after.rows[key];
    // It was saved after all, before the page went away.
    return row && isChanged(row, now.referenceHz) ? after : now;
  }, state);
}
