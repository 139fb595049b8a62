"use client";

import { useQuery, useQueryClient } from "@tanstack/react-query";
import { useCallback, useEffect, useMemo, useReducer, useRef, useState } from "react";
import { showMessage } from "@/components/ui/message-queue";
import { fetchJson } from "@/lib/client/fetch-json";
import { readingKeys } from "@/lib/readings/keys";
import type { KeyRange } from "@/lib/readings/rules";
import type { NoteRecord, SheetRecord } from "@/lib/readings/schema";
import { keepDrafts, readKeptDrafts } from "./kept-drafts";
import { type Around, type Live, liveOf as liveFit } from "./live-fit";
import { isChanged, type Row } from "./sheet-row";
import { keptDrafts, sheetReducer, sheetState } from "./sheet-state";
import { useSheetSaver } from "./use-sheet-saver";

/** The sheet in the browser: its state, the fit of every row as typed, and the saving of it. */
export function useReadingSheet(given: SheetRecord, range: KeyRange) {
  const [state, dispatch] = useReducer(sheetReducer, given, (sheet) =>
    sheetState(sheet.referenceHz, sheet.notes),
  );

  const { data: sheet = given } = useQuery({
    queryKey: readingKeys.sheet(given.id),
    queryFn: ({ signal }) => fetchJson<SheetRecord>(`/api/v1/sheets/${given.id}`, { signal }),
    initialData: given,
  });
  const client = useQueryClient();
  // The page was made anew on the server, as after archiving.
  useEffect(() => {
    client.setQueryData(readingKeys.sheet(given.id), given);
  }, [client, given]);
  useEffect(
    () => dispatch({ type: "received", notes: sheet.notes, referenceHz: sheet.referenceHz }),
    [sheet],
  );

  const notes = useSavedNotes(state.rows);
  const around = useMemo<Around>(
    () => ({ referenceHz: state.referenceHz, range, notes }),
    [state.referenceHz, range, notes],
  );
  const liveOf = useCallback((row: Row): Live => liveFit(row, around), [around]);

  useSheetSaver({ sheetId: given.id, state, dispatch, liveOf });

  const unsaved = Object.values(state.rows).filter((row) => isChanged(row, state.referenceHz));
  useKeptText(given.id, dispatch, state);
  useLeaveWarning(unsaved.length > 0);

  return { state, dispatch, sheet, notes, liveOf, unsaved, savedAt: useSavedAt(notes, given.notes) };
}

export type ReadingSheetState = ReturnType<typeof useReadingSheet>;

/** The notes as the server has them; the same list as long as none of them changes. */
function useSavedNotes(rows: Readonly<Record<string, Row>>): readonly NoteRecord[] {
  const now = Object.values(rows)
    .flatMap(({ saved }) => (saved ? [saved] : []))
    .sort((one, other) => one.midi - other.midi);
  const kept = useRef(now);
  const same = now.length === kept.current.length && now.every((note, index) => note === kept.current[index]);
  if (!same) kept.current = now;
  return kept.current;
}

/** When the last row was saved while the page was open; null before. */
function useSavedAt(notes: readonly NoteRecord[], first: readonly NoteRecord[]): Date | null {
  const [at, setAt] = useState<Date | null>(null);
  const before = useRef(notes);
  useEffect(() => {
    if (before.current !== notes && notes !== first) setAt(new Date());
    before.current = notes;
  }, [notes, first]);
  return at;
}

const MIRROR_MS = 250;

/** Text not yet saved is mirrored in the tab and comes back after a reload. */
function useKeptText(
  sheetId: string,
  dispatch: (action: { type: "restore"; drafts: ReturnType<typeof readKeptDrafts> }) => void,
  state: Parameters<typeof keptDrafts>[0],
): void {
  const restored = useRef(false);
  useEffect(() => {
    if (restored.current) return;
    restored.current = true;
    const drafts = readKeptDrafts(sheetId);
    if (drafts.length === 0) return;
    dispatch({ type: "restore", drafts });
    showMessage({
      kind: "waiting",
      text:
        drafts.length === 1 ? "One note was not saved yet." : `${drafts.length} notes were not saved yet.`,
      detail: "What was typed is here again.",
    });
  }, [sheetId, dispatch]);

  useEffect(() => {
    const timer = setTimeout(() => keepDrafts(sheetId, keptDrafts(state)), MIRROR_MS);
    return () => clearTimeout(timer);
  }, [sheetId, state]);

  const newest = useRef(state);
  newest.current = state;
  useEffect(() => {
    const keep = () => keepDrafts(sheetId, keptDrafts(newest.current));
    window.addEventListener("pagehide", keep);
    return () => {
      window.removeEventListener("pagehide", keep);
      keep();
    };
  }, [sheetId]);
}

function useLeaveWarning(unsaved: boolean): void {
  useEffect(() => {
    if (!unsaved) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener("beforeunload", warn);
    return () => window.removeEventListener("beforeunload", warn);
  }, [unsaved]);
}
