"use client";

import { useEffect, useMemo, useRef, useState } from "react";
import type { KeyMark } from "@/components/charts/key-mark";
import { useWidth } from "@/components/charts/use-width";
import { flaggedKeys } from "@/components/plans/analysis-plots";
import { useAnalysis } from "@/components/plans/use-analysis";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import { type PastedRow, readPasted } from "@/lib/readings/pasted-rows";
import type { SheetRecord } from "@/lib/readings/schema";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { notBelongingWords } from "./fit-words";
import type { OpenNoteActions } from "./open-note";
import { columnsAt, phoneColumns } from "./partial-columns";
import type { SheetInstrument } from "./sheet-about";
import { type Place, partialsOf, rowKey } from "./sheet-row";
import { firstEmpty, shownRows } from "./sheet-state";
import { useBandSteps } from "./use-band-steps";
import { type InHand, useCells } from "./use-cells";
import { useReadingSheet } from "./use-reading-sheet";

type Opened = {
  sheet: SheetRecord;
  instrument: SheetInstrument;
  canChange: boolean;
  /** The note to begin at, from the address. */
  beginAt: number | null;
};

const unison = (midi: number): Place => ({ midi, string: "all", take: 1 });

/** The open sheet as its pages share it: what is read, what to read next, where the cursor is, what a paste does. */
export function useOpenSheet({ sheet: given, instrument, canChange, beginAt }: Opened) {
  const { firstMidi, lastMidi, breakMidi } = instrument;
  const range = useMemo(() => ({ firstMidi, lastMidi, breakMidi }), [firstMidi, lastMidi, breakMidi]);
  const reading = useReadingSheet(given, range);
  const { state, dispatch, liveOf, notes } = reading;
  const { data: analysis } = useAnalysis(given.id, {});
  const steps = useBandSteps(notes, range, analysis);

  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, 856);
  const [high, setHigh] = useState(false);
  const part = high ? "high" : "low";
  const columns = columnsAt(width)[part];

  const rows = shownRows(state);
  const readKeys = new Set(rows.filter((row) => partialsOf(row).length > 0).map((row) => row.place.midi));
  const enough = notes.length > 0 && (analysis?.advice.enough ?? false);
  const proposed = steps?.chain.find(({ midi }) => !state.rows[rowKey(unison(midi))]);
  const suggestion =
    canChange && proposed && !enough ? { midi: proposed.midi, b: proposed.predictedB } : null;
  const order = [
    ...rows.map((row) => rowKey(row.place)),
    ...(suggestion ? [rowKey(unison(suggestion.midi))] : []),
  ];

  const pasting = usePasting();
  function enterRows(pasted: readonly PastedRow[], unit: ReadingUnit) {
    dispatch({
      type: "enter",
      unit,
      rows: pasted.map(({ midi, values }) => ({ place: unison(midi), values, whole: true })),
    });
    pasting.done();
    const [first] = pasted;
    if (!first) return;
    toastWithUndo(pasted.length === 1 ? "One note entered." : `${pasted.length} notes entered.`, () =>
      dispatch({ type: "undo", key: rowKey(unison(first.midi)) }),
    );
  }
  function enterText(text: string) {
    const pasted = readPasted(text, { unit: state.unit, referenceHz: state.referenceHz, ...range });
    if (pasted.faults.length === 0) enterRows(pasted.rows, state.unit);
    else pasting.open(text);
  }

  const cellsOf = { state, dispatch, liveOf, order, onRows: enterText };
  const table = useCells({ ...cellsOf, prefix: "t-", columns, tabMovesNotes: true });
  const phone = useCells({ ...cellsOf, prefix: "p-", columns: phoneColumns[part] });

  const wanted = useRef<InHand | null>(null);
  function choose(place: Place) {
    dispatch({ type: "choose", place });
    const key = rowKey(place);
    wanted.current = { key, partial: firstEmpty(state.rows[key], columns) };
  }
  // Once the row stands. Only the table takes the focus: on the phone the keyboard would cover the page.
  useEffect(() => {
    if (wanted.current && table.goTo(wanted.current.key, wanted.current.partial)) wanted.current = null;
  });
  useEffect(() => {
    if (beginAt === null || !canChange) return;
    if (beginAt >= firstMidi && beginAt <= lastMidi) choose(unison(beginAt));
    else showMessage({ kind: "attention", text: "This note is not on the instrument." });
  }, [beginAt]);
  useUndoKey(() => dispatch({ type: "undo", key: null }));

  const actions = useMemo<OpenNoteActions>(
    () => ({
      judge: (key, partial, keep) => dispatch({ type: "judge", key, partial, keep }),
      confirm: (key, partial) => dispatch({ type: "confirm", key, partial }),
      again: (key) => dispatch({ type: "again", key }),
      settleConflict: (key, take) => dispatch({ type: "settle-conflict", key, take }),
      undo: (key) => dispatch({ type: "undo", key }),
      remove: (key) => {
        dispatch({ type: "remove", key });
        toastWithUndo("Note removed.", () => dispatch({ type: "undo", key }));
      },
      choose: (place) => dispatch({ type: "choose", place }),
    }),
    [dispatch],
  );

  const flags: ReadonlyMap<number, string> = new Map(
    (analysis ? flaggedKeys(analysis) : []).map((key) => [key.midi, notBelongingWords(key)]),
  );
  const marks: KeyMark[] = [
    ...[...readKeys].map((midi): KeyMark => ({ midi, kind: flags.has(midi) ? "flagged" : "measured" })),
    ...(canChange ? (steps?.chain.slice(0, 3) ?? []) : [])
      .filter(({ midi }) => !readKeys.has(midi))
      .map(({ midi }): KeyMark => ({ midi, kind: "next" })),
  ];
  const openRow = state.open ? (state.rows[state.open] ?? null) : null;

  return {
    reading,
    range,
    steps,
    enough,
    /** The table stands in this element, and is as wide. */
    box,
    width,
    columns: { table: columns, phone: phoneColumns[part] },
    high,
    turn: () => setHigh(!high),
    rows,
    readKeys,
    suggestion,
    order,
    cells: { table, phone },
    pasting,
    enterRows,
    actions,
    flags,
    openRow,
    keys: {
      breakMidi: breakMidi ?? analysis?.breakMidi ?? null,
      marks,
      inHand: openRow?.place.midi ?? null,
    },
    chooseKey: canChange ? (midi: number) => choose(unison(midi)) : undefined,
  };
}

export type OpenSheet = ReturnType<typeof useOpenSheet>;

/** The text that waits in the paste dialog stays when it is closed. */
function usePasting() {
  const [isOpen, setOpen] = useState(false);
  const [text, setText] = useState("");
  return {
    isOpen,
    text,
    setText,
    open: (given?: string) => {
      if (given !== undefined) setText(given);
      setOpen(true);
    },
    close: () => setOpen(false),
    done: () => {
      setOpen(false);
      setText("");
    },
  };
}

/** Control+Z outside of a field takes back the last step of the sheet. */
function useUndoKey(undo: () => void): void {
  const newest = useRef(undo);
  newest.current = undo;
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const typing = event.target instanceof HTMLElement && event.target.closest("input, textarea, select");
      if (typing || event.key.toLowerCase() !== "z" || !(event.ctrlKey || event.metaKey) || event.shiftKey)
        return;
      event.preventDefault();
      newest.current();
    };
    window.addEventListener("keydown", onKey);
    return () => window.removeEventListener("keydown", onKey);
  }, []);
}
