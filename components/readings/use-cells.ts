"use client";

import {
  type ChangeEvent,
  type ClipboardEvent,
  type Dispatch,
  type FocusEvent,
  type KeyboardEvent,
  useCallback,
  useMemo,
  useRef,
  useState,
} from "react";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import { readCellPaste } from "@/lib/readings/pasted-rows";
import { isBlank } from "@/lib/readings/typed-number";
import type { Live } from "./live-fit";
import type { Row, RowKey } from "./sheet-row";
import type { SheetState } from "./sheet-rows";
import { firstEmpty, type SheetAction } from "./sheet-state";
import { placeOf } from "./sheet-typing";

const MOST_PARTIAL = 64;

export type InHand = { key: RowKey; partial: number };

type Options = {
  /** Tells the cells of the table from those of the phone's page. */
  prefix: string;
  state: SheetState;
  dispatch: Dispatch<SheetAction>;
  liveOf: (row: Row) => Live;
  /** Rows as they stand, suggested ones included. */
  order: readonly RowKey[];
  columns: readonly number[];
  onRows: (text: string) => void;
  /** Tab goes to the next note; without it Tab is the browser's. */
  tabMovesNotes?: boolean;
};

export function cellId(prefix: string, key: RowKey, partial: number): string {
  return `${prefix}${key}-${partial}`;
}

/** What cells do on typing, keys and paste. One set of handlers for the whole table, told apart by data attributes. */
export function useCells(options: Options) {
  const [inHand, setInHand] = useState<InHand | null>(null);
  const newest = useRef(options);
  newest.current = options;

  const goTo = useCallback((key: RowKey | undefined, partial: number) => {
    if (key === undefined) return false;
    const cell = document.getElementById(cellId(newest.current.prefix, key, partial));
    cell?.focus();
    cell?.scrollIntoView({ block: "nearest" });
    return cell !== null;
  }, []);

  const handlers = useMemo(() => {
    const cellOf = (target: EventTarget): (InHand & { input: HTMLInputElement }) | null => {
      if (!(target instanceof HTMLInputElement)) return null;
      const { row, partial } = target.dataset;
      return row && partial ? { key: row, partial: Number(partial), input: target } : null;
    };

    const onType = (event: ChangeEvent<HTMLInputElement>) => {
      const cell = cellOf(event.target);
      if (!cell) return;
      const { dispatch } = newest.current;
      dispatch({
        type: "type",
        place: placeOf(cell.key),
        partial: cell.partial,
        text: event.target.value,
      });
    };

    const onFocus = (event: FocusEvent) => {
      const cell = cellOf(event.target);
      if (!cell) return;
      const { state, dispatch } = newest.current;
      if (state.rows[cell.key]) dispatch({ type: "open", key: cell.key });
      else dispatch({ type: "choose", place: placeOf(cell.key), atEnd: true });
      setInHand({ key: cell.key, partial: cell.partial });
      cell.input.select();
      // The cell in hand shows all its digits, which unselects it once.
      requestAnimationFrame(() => {
        if (document.activeElement === cell.input && newest.current.state.editing === null)
          cell.input.select();
      });
    };

    const onBlur = (event: FocusEvent) => {
      if (!cellOf(event.target)) return;
      newest.current.dispatch({ type: "settle" });
      setInHand(null);
    };

    const onKeyDown = (event: KeyboardEvent) => {
      const cell = cellOf(event.target);
      if (!cell || event.nativeEvent.isComposing) return;
      if (actOnCell(event, cell)) event.preventDefault();
    };

    const actOnCell = (event: KeyboardEvent, cell: InHand & { input: HTMLInputElement }): boolean => {
      const { state, dispatch, order, columns, tabMovesNotes } = newest.current;
      const { key, partial, input } = cell;
      const modified = event.ctrlKey || event.metaKey;
      if (modified && event.key.toLowerCase() === "z" && !event.shiftKey) {
        // While a cell is being typed in, taking back single letters is the browser's.
        if (state.editing) return false;
        dispatch({ type: "undo", key });
        return true;
      }
      if (modified || event.altKey) return false;

      const row = order.indexOf(key);
      const column = columns.indexOf(partial);
      const whole = input.selectionStart === 0 && input.selectionEnd === input.value.length;
      const atStart = whole || (input.selectionStart === 0 && input.selectionEnd === 0);
      const atEnd = whole || input.selectionStart === input.value.length;
      const besides = (step: number) => {
        const next = columns[column + step];
        return next !== undefined && goTo(key, next);
      };
      const otherNote = (step: number, at: (key: RowKey) => number) => {
        const next = order[row + step];
        return next !== undefined && goTo(next, at(next));
      };
      switch (event.key) {
        case "Enter":
          if (event.shiftKey) return besides(-1) || true;
          return besides(1) || otherNote(1, (next) => firstEmpty(state.rows[next], columns)) || settle();
        case "Tab":
          if (!tabMovesNotes) return false;
          return otherNote(event.shiftKey ? -1 : 1, (next) => firstEmpty(state.rows[next], columns));
        case "ArrowLeft":
          return atStart && !event.shiftKey && besides(-1);
        case "ArrowRight":
          return atEnd && !event.shiftKey && besides(1);
        case "ArrowUp":
          return otherNote(-1, () => partial);
        case "ArrowDown":
          return otherNote(1, () => partial);
        case "Escape":
          dispatch({ type: "revert" });
          requestAnimationFrame(() => input.select());
          return true;
        case " ":
          return whole && decide(cell);
        default:
          return false;
      }
    };

    const settle = () => {
      newest.current.dispatch({ type: "settle" });
      return true;
    };

    /** Space: keeps what was asked about, and turns the switch of a reading left out or kept by hand. */
    const decide = ({ key, partial }: InHand): boolean => {
      const { state, dispatch, liveOf } = newest.current;
      const row = state.rows[key];
      if (!row || state.editing) return false;
      const live = liveOf(row);
      if (row.faults[partial] || live.questions.some((question) => question.partial === partial)) {
        dispatch({ type: "confirm", key, partial });
        return true;
      }
      const leftOut = live.fit?.rejected.some((one) => one.partial === partial) ?? false;
      if (!leftOut && !row.kept.includes(partial)) return false;
      dispatch({ type: "judge", key, partial, keep: leftOut });
      return true;
    };

    const onPaste = (event: ClipboardEvent) => {
      const cell = cellOf(event.target);
      if (!cell) return;
      const text = event.clipboardData.getData("text/plain");
      const { state, dispatch, onRows } = newest.current;
      const pasted = readCellPaste(text, {
        unit: state.unit,
        midi: placeOf(cell.key).midi,
        partial: cell.partial,
        referenceHz: state.referenceHz,
      });
      if (pasted.kind === "one") return;
      event.preventDefault();
      if (pasted.kind === "unclear") {
        showMessage({
          kind: "attention",
          text: "Nothing was entered: a number can be read two ways.",
          detail: pasted.message,
        });
        return;
      }
      if (pasted.kind === "rows") return onRows(text);
      const values = pasted.texts
        .map((typed, index) => ({ partial: cell.partial + index, text: typed }))
        .filter(({ text: typed }) => !isBlank(typed));
      if (values.some(({ partial }) => partial > MOST_PARTIAL)) {
        showMessage({
          kind: "attention",
          text: "These are more than 64 partials.",
          detail: "Nothing was entered: paste whole rows with their notes instead.",
        });
        return;
      }
      dispatch({
        type: "enter",
        rows: [{ place: placeOf(cell.key), values, whole: false }],
        unit: state.unit,
      });
      toastWithUndo(values.length === 1 ? "One reading pasted." : `${values.length} readings pasted.`, () =>
        dispatch({ type: "undo", key: cell.key }),
      );
    };

    return { onType, onFocus, onBlur, onKeyDown, onPaste };
  }, [goTo]);

  return { inHand, goTo, ...handlers };
}
