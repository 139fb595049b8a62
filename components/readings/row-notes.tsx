"use client";

import { StateWord } from "@/components/ui/state-word";
import { type NoteMattersActions, TroubleActions } from "./note-matters";
import type { RowState } from "./row-state";
import { type Row, rowKey } from "./sheet-row";

type Props = {
  row: Row;
  state: RowState;
  /** Why the note does not belong, or null. */
  flag: string | null;
  /** The open row says its trouble among its own matters. */
  open: boolean;
  actions: NoteMattersActions;
};

export function hasRowNotes({ row, flag, open }: Pick<Props, "row" | "flag" | "open">): boolean {
  return flag !== null || (row.trouble !== null && !open);
}

/** Under a row: that the note does not belong, and why it is not saved. */
export function RowNotes({ row, state, flag, open, actions }: Props) {
  return (
    <div className="flex flex-wrap items-center justify-end gap-x-4 gap-y-1.5 text-left text-12">
      {flag === null ? null : (
        <StateWord kind="attention" wrap>
          {flag}
        </StateWord>
      )}
      {row.trouble && !open ? (
        <>
          <StateWord kind="attention" wrap>
            {state.sentence}
          </StateWord>
          <span className="flex flex-wrap items-center gap-2">
            <TroubleActions trouble={row.trouble} again={() => actions.again(rowKey(row.place))} />
          </span>
        </>
      ) : null}
    </div>
  );
}
