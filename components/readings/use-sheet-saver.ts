"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { type Dispatch, useCallback, useEffect, useRef } from "react";
import { showMessage } from "@/components/ui/message-queue";
import { fetchJson, ProblemError } from "@/lib/client/fetch-json";
import { planKeys } from "@/lib/plans/keys";
import { readingKeys } from "@/lib/readings/keys";
import type { NoteRecord, SheetRecord } from "@/lib/readings/schema";
import type { Live } from "./live-fit";
import { concerns, failureOf } from "./save-answers";
import { inputOf, isChanged, isWhole, partialsOf, type Row, type RowKey, rowKey } from "./sheet-row";
import type { SheetState } from "./sheet-rows";
import type { SheetAction } from "./sheet-state";

/** A row in hand is saved after a pause; one that was left, at once. */
const PAUSE_MS = 900;
const LEFT_MS = 120;
const RETRY_MS = [3_000, 8_000, 20_000, 60_000];
const MOST_AT_ONCE = 128;

function isReady(row: Row, live: Live, state: SheetState): boolean {
  return (
    !row.sending &&
    row.trouble === null &&
    state.editing?.key !== rowKey(row.place) &&
    isChanged(row, state.referenceHz) &&
    isWhole(row, state.referenceHz) &&
    (row.removed || live.questions.length === 0)
  );
}

type Saver = {
  sheetId: string;
  state: SheetState;
  dispatch: Dispatch<SheetAction>;
  liveOf: (row: Row) => Live;
};

/**
 * Sends rows by themselves: one request a row at a time, the newest text wins, silence is tried again, and
 * a refusal leaves everything typed where it is.
 */
export function useSheetSaver({ sheetId, state, dispatch, liveOf }: Saver): void {
  const client = useQueryClient();
  const { referenceHz } = state;

  const answered = useCallback(
    (records: readonly NoteRecord[], removed?: RowKey) => {
      client.setQueryData<SheetRecord>(readingKeys.sheet(sheetId), (sheet) => {
        if (!sheet) return sheet;
        const keys = new Set([...records.map(rowKey), ...(removed ? [removed] : [])]);
        return { ...sheet, notes: [...sheet.notes.filter((note) => !keys.has(rowKey(note))), ...records] };
      });
      void client.invalidateQueries({ queryKey: planKeys.analysis(sheetId, {}).slice(0, 3) });
    },
    [client, sheetId],
  );

  const refuse = useCallback(
    (row: Row, error: unknown, path?: string) => {
      const { trouble, faults } = failureOf(error, partialsOf(row), path);
      dispatch({ type: "failed", key: rowKey(row.place), trouble, faults });
      if (trouble.kind === "stale" && !row.removed) {
        if (trouble.theirs) answered([trouble.theirs]);
        else answered([], rowKey(row.place));
      }
      if (trouble.kind === "refused" && row.removed) {
        showMessage({ kind: "attention", text: "The note was not removed.", detail: trouble.message });
      }
    },
    [dispatch, answered],
  );

  const begin = (rows: readonly Row[]) => {
    // An older reading of the sheet must not arrive after the answer to this.
    void client.cancelQueries({ queryKey: readingKeys.sheet(sheetId), exact: true });
    dispatch({ type: "sending", keys: rows.map(({ place }) => rowKey(place)) });
  };

  const { mutate: saveOne } = useMutation({
    mutationFn: (row: Row) =>
      fetchJson<NoteRecord>(`/api/v1/sheets/${sheetId}/notes/${row.place.midi}`, {
        method: "PUT",
        body: inputOf(row, referenceHz),
      }),
    onMutate: (row) => begin([row]),
    onSuccess: (record, row) => {
      dispatch({ type: "saved", key: rowKey(row.place), record });
      answered([record]);
    },
    onError: (error, row) => refuse(row, error),
  });

  const { mutate: saveMany } = useMutation({
    mutationFn: (rows: readonly Row[]) =>
      fetchJson<{ items: NoteRecord[] }>(`/api/v1/sheets/${sheetId}/notes`, {
        method: "PUT",
        body: {
          notes: rows.map((row) => ({ ...inputOf(row, referenceHz), midi: row.place.midi })),
        },
      }),
    onMutate: begin,
    onSuccess: ({ items }) => {
      for (const record of items) dispatch({ type: "saved", key: rowKey(record), record });
      answered(items);
    },
    onError: (error, rows) => {
      const named = rows.some((_, index) => concerns(error, index));
      const stale = error instanceof ProblemError && error.problem.code === "stale";
      rows.forEach((row, index) => {
        const own = named ? concerns(error, index) : !stale;
        if (own) refuse(row, error, named ? `notes.${index}.readings` : undefined);
        // All or none were saved; the rows without fault go again, one by one where a version was stale.
        else dispatch({ type: "again", key: rowKey(row.place), alone: stale });
      });
    },
  });

  const { mutate: removeOne } = useMutation({
    mutationFn: ({ place: { midi, string, take }, version, saved }: Row) =>
      fetchJson<void>(`/api/v1/sheets/${sheetId}/notes/${midi}`, {
        method: "DELETE",
        // A draft begun before the note was there is removed as the note stands now.
        query: { string, take, version: version > 0 ? version : saved?.version },
      }),
    onMutate: (row) => begin([row]),
    onSuccess: (_, row) => {
      dispatch({ type: "gone", key: rowKey(row.place) });
      answered([], rowKey(row.place));
    },
    onError: (error, row) => {
      // Gone already is what was wanted.
      if (error instanceof ProblemError && error.status === 404) {
        dispatch({ type: "gone", key: rowKey(row.place) });
        answered([], rowKey(row.place));
      } else refuse(row, error);
    },
  });

  // A row as it was sent: any change to it makes another. The page hears of a sending with the next drawing, and
  // another row's clock may run out before.
  const gone = useRef(new WeakSet<Row>());
  const newest = useRef({ state, liveOf });
  newest.current = { state, liveOf };

  const send = useCallback(
    (key: RowKey) => {
      const { state: now, liveOf: live } = newest.current;
      const ready = Object.values(now.rows).filter(
        (row) => !gone.current.has(row) && isReady(row, live(row), now),
      );
      const row = ready.find(({ place }) => rowKey(place) === key);
      if (!row) return;
      if (row.removed) {
        gone.current.add(row);
        return removeOne(row);
      }
      const together = ready.filter(
        (one) => !one.removed && !one.alone && (one === row || rowKey(one.place) !== now.open),
      );
      const going = row.alone || together.length < 2 ? [row] : together.slice(0, MOST_AT_ONCE);
      for (const one of going) gone.current.add(one);
      if (going.length === 1) saveOne(row);
      else saveMany(going);
    },
    [removeOne, saveOne, saveMany],
  );

  useTimers(state, liveOf, send);
  useTryAgain(state, dispatch);
}

/** One clock a row, begun anew whenever the row changes. */
function useTimers(state: SheetState, liveOf: (row: Row) => Live, send: (key: RowKey) => void): void {
  const clocks = useRef(new Map<RowKey, { row: Row; open: boolean; timer: ReturnType<typeof setTimeout> }>());
  useEffect(() => {
    const running = clocks.current;
    for (const [key, clock] of running) {
      if (state.rows[key] !== clock.row) {
        clearTimeout(clock.timer);
        running.delete(key);
      }
    }
    for (const [key, row] of Object.entries(state.rows)) {
      const open = key === state.open && !row.removed;
      const before = running.get(key);
      if (!isReady(row, liveOf(row), state) || before?.open === open) continue;
      if (before) clearTimeout(before.timer);
      const timer = setTimeout(
        () => {
          running.delete(key);
          send(key);
        },
        open ? PAUSE_MS : LEFT_MS,
      );
      running.set(key, { row, open, timer });
    }
  }, [state, liveOf, send]);
  useEffect(() => {
    const running = clocks.current;
    return () => {
      // The page is left for another one of the book: what waits goes now.
      for (const [key, { timer }] of running) {
        clearTimeout(timer);
        send(key);
      }
      running.clear();
    };
  }, [send]);
}

/** Silence is tried again with growing pauses, and when the network is back; a sign-in, when the page is looked at again. */
function useTryAgain(state: SheetState, dispatch: Dispatch<SheetAction>): void {
  const tries = useRef(0);
  const waiting = Object.values(state.rows)
    .filter(({ trouble }) => trouble?.kind === "network")
    .map(({ place }) => rowKey(place))
    .join(" ");
  const signedOut = Object.values(state.rows)
    .filter(({ trouble }) => trouble?.kind === "signed-out")
    .map(({ place }) => rowKey(place))
    .join(" ");
  const anySaved = Object.values(state.rows).some(({ sending }) => sending);

  useEffect(() => {
    if (waiting === "") {
      if (!anySaved) tries.current = 0;
      return;
    }
    const again = () => {
      tries.current += 1;
      for (const key of waiting.split(" ")) dispatch({ type: "again", key });
    };
    const timer = setTimeout(again, RETRY_MS[Math.min(tries.current, RETRY_MS.length - 1)]);
    window.addEventListener("online", again);
    return () => {
      clearTimeout(timer);
      window.removeEventListener("online", again);
    };
  }, [waiting, anySaved, dispatch]);

  useEffect(() => {
    if (signedOut === "") return;
    const again = () => {
      if (document.visibilityState !== "visible") return;
      for (const key of signedOut.split(" ")) dispatch({ type: "again", key });
    };
    document.addEventListener("visibilitychange", again);
    // Signing in in another window leaves this one in sight all the while.
    window.addEventListener("focus", again);
    return () => {
      document.removeEventListener("visibilitychange", again);
      window.removeEventListener("focus", again);
    };
  }, [signedOut, dispatch]);
}
