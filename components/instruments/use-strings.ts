"use client";

import { useReducer, useRef } from "react";
import { showMessage } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { changedStrings, type StringRecord } from "@/lib/instruments/schema";
import { readPastedStrings } from "@/lib/instruments/strings/paste";
import { emptyRow, isBlank, parseRow, pasteOver, rowOf, type StringRow, sameCells } from "./string-row";

export type StringActions = {
  save: (input: unknown) => Promise<ActionResult<StringRecord>>;
  saveAll: (input: unknown) => Promise<ActionResult<{ items: StringRecord[] }>>;
  remove: (input: unknown) => Promise<ActionResult<{ midi: number }>>;
};

type Failure = Extract<ActionResult<unknown>, { ok: false }>["error"];

type Change =
  | { midi: number; change: Partial<StringRow> }
  | { rows: readonly StringRow[] }
  /** What was sent is kept now; what was typed since is not. */
  | { kept: readonly StringRow[] };

function reduce(rows: StringRow[], change: Change): StringRow[] {
  if ("midi" in change) {
    return rows.map((row) => (row.midi === change.midi ? { ...row, ...change.change } : row));
  }
  const byNote = new Map(("rows" in change ? change.rows : change.kept).map((row) => [row.midi, row]));
  return rows.map((row) => {
    const given = byNote.get(row.midi);
    if (!given) return row;
    if ("rows" in change) return given;
    return sameCells(row, given) ? { ...given, errors: {}, newer: undefined, state: "saved" } : row;
  });
}

const noAnswer: Failure = {
  code: "unavailable",
  message: "The server did not answer. What you typed is still here; leave the row once more to send it.",
};

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
  const versions = useRef(new Map(saved.map(({ midi, version }) => [midi, version])));
  // One write at a time: the next one names the version that the one before made.
  const queue = useRef<Promise<unknown>>(Promise.resolve());

  function inTurn<T>(write: () => Promise<T>): Promise<T> {
    const turn = queue.current.then(write);
    queue.current = turn.catch(() => {});
    return turn;
  }

  function type(midi: number, part: Partial<StringRow>) {
    change({ midi, change: { ...part, errors: {}, newer: undefined, state: "typed" } });
  }

  async function leave(row: StringRow) {
    if (row.newer !== undefined || (row.state !== "typed" && row.state !== "refused")) return;
    await send(row);
  }

  async function send(row: StringRow) {
    if (isBlank(row)) return inTurn(() => clear(row));
    const parsed = parseRow(row);
    if ("errors" in parsed)
      return change({ midi: row.midi, change: { errors: parsed.errors, state: "refused" } });
    change({ midi: row.midi, change: { errors: {}, newer: undefined, state: "saving" } });
    await inTurn(async () => {
      const values = { ...parsed.values, version: versions.current.get(row.midi) ?? 0 };
      const result = await answerOf(actions.save({ instrumentId, midi: row.midi, values }));
      if (result.ok) keep([result.data], [row]);
      else refuse([row.midi], result.error);
    });
  }

  async function clear(row: StringRow) {
    const version = versions.current.get(row.midi);
    if (version === undefined) return change({ midi: row.midi, change: emptyRow(row.midi) });
    const result = await answerOf(actions.remove({ instrumentId, midi: row.midi, version }));
    if (!result.ok && result.error.code !== "not-found") return refuse([row.midi], result.error);
    versions.current.delete(row.midi);
    change({ midi: row.midi, change: { ...emptyRow(row.midi), newer: undefined } });
  }

  function keep(records: readonly StringRecord[], sent: readonly StringRow[]) {
    for (const { midi, version } of records) versions.current.set(midi, version);
    change({ kept: sent });
  }

  function refuse(midis: readonly number[], { code, message, fields, current }: Failure) {
    const changed = code === "stale" ? changedStrings.safeParse(current) : null;
    const newer = new Map(changed?.data?.items.map((record) => [record.midi, record]));
    for (const midi of midis) {
      const named = Object.entries(fields ?? {}).map(([path, words]) => [
        path.replace(/^(rows\.\d+\.)?values\./, ""),
        words,
      ]);
      const errors = named.length > 0 ? Object.fromEntries(named) : { row: message };
      const theirs = changed?.data?.midis.includes(midi) ? (newer.get(midi) ?? null) : undefined;
      change({
        midi,
        change: { errors: theirs === undefined ? errors : {}, newer: theirs, state: "refused" },
      });
    }
  }

  /** Two people changed one note, and this one chooses: theirs takes the place of what was typed, or mine goes over it. */
  async function settle(row: StringRow, take: "theirs" | "mine") {
    const { newer } = row;
    if (newer === undefined) return;
    if (newer) versions.current.set(row.midi, newer.version);
    else versions.current.delete(row.midi);
    if (take === "mine") return send({ ...row, newer: undefined });
    change({
      midi: row.midi,
      change: { ...(newer ? rowOf(newer) : emptyRow(row.midi)), newer: undefined },
    });
  }

  /** Good rows are saved together; the others stand in their places with what is wrong. */
  async function paste(text: string): Promise<string[]> {
    const { rows: pasted, problems } = pasteOver(readPastedStrings(text), firstMidi, lastMidi);
    // The last of two rows for one note counts.
    const good = [
      ...new Map(pasted.filter((row) => row.state === "typed").map((row) => [row.midi, row])).values(),
    ];
    const bad = pasted.filter((row) => row.state === "refused").length;
    change({ rows: pasted.map((row) => (row.state === "typed" ? { ...row, state: "saving" } : row)) });
    await inTurn(() => sendAll(good));
    return bad > 0
      ? [...problems, `${bad} ${bad === 1 ? "row stands" : "rows stand"} below with what is wrong.`]
      : problems;
  }

  async function sendAll(good: readonly StringRow[]): Promise<void> {
    if (good.length === 0) return;
    const values = good.flatMap((row) => {
      const parsed = parseRow(row);
      if ("errors" in parsed) return [];
      const version = versions.current.get(row.midi) ?? 0;
      return [{ midi: row.midi, values: { ...parsed.values, version } }];
    });
    const result = await answerOf(actions.saveAll({ instrumentId, rows: values }));
    if (result.ok) {
      keep(result.data.items, good);
      showMessage({ text: `${values.length} ${values.length === 1 ? "note" : "notes"} saved.` });
      return;
    }
    const changed = result.error.code === "stale" ? changedStrings.safeParse(result.error.current) : null;
    const theirs = new Set(changed?.data?.midis);
    const mine = good.filter(({ midi }) => !theirs.has(midi));
    // Without the notes somebody else changed, the rest goes through as it was pasted.
    const again = theirs.size > 0 && mine.length < good.length;
    refuse(
      (again ? good.filter(({ midi }) => theirs.has(midi)) : good).map(({ midi }) => midi),
      result.error,
    );
    if (again) await sendAll(mine);
  }

  return { rows, type, leave, settle, paste };
}

/** An action's answer; where none came, a failure that says so. */
async function answerOf<T>(answer: Promise<ActionResult<T>>): Promise<ActionResult<T>> {
  return answer.catch(() => ({ ok: false, error: noAnswer }));
}
