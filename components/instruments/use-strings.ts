"use client";

import { useReducer, useRef } from "react";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import type { StringRecord } from "@/lib/instruments/schema";
import { readPastedStrings } from "@/lib/instruments/strings/paste";
import { emptyRow, isBlank, parseRow, pasteOver, rowOf, type StringRow } from "./string-row";

export type StringActions = {
  save: (input: unknown) => Promise<ActionResult<StringRecord>>;
  saveAll: (input: unknown) => Promise<ActionResult<{ items: StringRecord[] }>>;
  remove: (input: unknown) => Promise<ActionResult<{ midi: number }>>;
};

type Change = { midi: number; change: Partial<StringRow> } | { rows: readonly StringRow[] };

function reduce(rows: StringRow[], change: Change): StringRow[] {
  if ("midi" in change) {
    return rows.map((row) => (row.midi === change.midi ? { ...row, ...change.change } : row));
  }
  const byNote = new Map(change.rows.map((row) => [row.midi, row]));
  return rows.map((row) => byNote.get(row.midi) ?? row);
}

const noAnswer =
  "The server did not answer. What you typed is still here; leave the row once more to send it.";

/** The rows of a scale: typed freely, saved a row at a time when the row is left. */
export function useStrings(
  instrument: { id: string; firstMidi: number; lastMidi: number },
  saved: readonly StringRecord[],
  actions: StringActions,
) {
  const { id: instrumentId, firstMidi, lastMidi } = instrument;
  const [rows, change] = useReducer(reduce, null, () => {
    const known = new Map(saved.map((record) => [record.midi, rowOf(record)]));
    return Array.from({ length: lastMidi - firstMidi + 1 }, (_, index) => {
      const midi = firstMidi + index;
      return known.get(midi) ?? emptyRow(midi);
    });
  });
  const inStore = useRef(new Set(saved.map((record) => record.midi)));

  function type(midi: number, part: Partial<StringRow>) {
    change({ midi, change: { ...part, errors: {}, state: "typed" } });
  }

  async function leave(row: StringRow) {
    if (row.state !== "typed" && row.state !== "refused") return;
    if (isBlank(row)) return clear(row);
    const parsed = parseRow(row);
    if ("errors" in parsed)
      return change({ midi: row.midi, change: { errors: parsed.errors, state: "refused" } });
    change({ midi: row.midi, change: { state: "saving" } });
    try {
      const result = await actions.save({ instrumentId, midi: row.midi, values: parsed.values });
      if (result.ok) {
        inStore.current.add(row.midi);
        change({ midi: row.midi, change: { errors: {}, state: "saved" } });
      } else refuse(row.midi, result.error.fields, result.error.message);
    } catch {
      refuse(row.midi, undefined, noAnswer);
    }
  }

  async function clear(row: StringRow) {
    if (!inStore.current.has(row.midi)) return change({ midi: row.midi, change: emptyRow(row.midi) });
    try {
      const result = await actions.remove({ instrumentId, midi: row.midi });
      if (!result.ok) return refuse(row.midi, undefined, result.error.message);
      inStore.current.delete(row.midi);
      change({ midi: row.midi, change: emptyRow(row.midi) });
    } catch {
      refuse(row.midi, undefined, noAnswer);
    }
  }

  function refuse(midi: number, fields: Record<string, string> | undefined, message: string) {
    const named = Object.entries(fields ?? {}).map(([path, words]) => [path.replace(/^values\./, ""), words]);
    change({
      midi,
      change: { errors: named.length ? Object.fromEntries(named) : { row: message }, state: "refused" },
    });
  }

  /** Good rows are saved together; the others stand in their places with what is wrong. */
  async function paste(text: string): Promise<string[]> {
    const { rows: pasted, problems } = pasteOver(readPastedStrings(text), firstMidi, lastMidi);
    const good = pasted.filter((row) => row.state === "typed");
    const bad = pasted.length - good.length;
    change({ rows: pasted.map((row) => (row.state === "typed" ? { ...row, state: "saving" } : row)) });
    const values = good.flatMap((row) => {
      const parsed = parseRow(row);
      return "values" in parsed ? [{ midi: row.midi, values: parsed.values }] : [];
    });
    if (values.length > 0) {
      const result = await actions.saveAll({ instrumentId, rows: values }).catch(() => null);
      if (result?.ok) {
        for (const { midi } of values) inStore.current.add(midi);
        change({ rows: result.data.items.map(rowOf) });
        showMessage({ text: `${values.length} ${values.length === 1 ? "note" : "notes"} saved.` });
      } else {
        const words = result && !result.ok ? result.error.message : noAnswer;
        change({ rows: good.map((row) => ({ ...row, errors: { row: words }, state: "refused" })) });
      }
    }
    return bad > 0
      ? [...problems, `${bad} ${bad === 1 ? "row stands" : "rows stand"} below with what is wrong.`]
      : problems;
  }

  return { rows, type, leave, paste };
}
