import type { NoteInput, NoteRecord } from "@/lib/readings/schema";
import { type ReadingUnit, typedFault, typedHz } from "@/lib/readings/typed-number";

/** One note of the sheet as the browser holds it: what is typed, beside what the server has. */
export type Place = { midi: number; string: NoteInput["string"]; take: number };
export type RowKey = string;

/** Text stays as it was typed until the server has it; `settled` when the person has left the cell. */
export type Cell =
  | { kind: "read"; hz: number }
  | { kind: "typed"; text: string; unit: ReadingUnit; settled: boolean };
export type Cells = Readonly<Record<number, Cell>>;

export type Draft = {
  cells: Cells;
  kept: readonly number[];
  dropped: readonly number[];
  confirmed: readonly number[];
  /** Taken off the sheet; the row goes when the server has heard of it. */
  removed: boolean;
};

export type Trouble =
  /** No answer: sent again by itself. */
  | { kind: "network" }
  | { kind: "signed-out" }
  /** Somebody else changed this note; `theirs` is null when they removed it. */
  | { kind: "stale"; theirs: NoteRecord | null }
  | { kind: "refused"; message: string };

/** What was once sent of a row; nothing that is still being typed. */
export type Sent =
  | { removed: true }
  | { removed: false; readings: readonly HeldReading[]; kept: readonly number[]; dropped: readonly number[] };

export type Row = Draft & {
  place: Place;
  saved: NoteRecord | null;
  /** The server's version this draft began from; 0 for a note that was not there. */
  version: number;
  sending: boolean;
  /** Sent since the server last answered: any of these may have arrived without our hearing of it. */
  sent: readonly Sent[];
  /** To be sent by itself, because together with others it was refused for one of them. */
  alone: boolean;
  trouble: Trouble | null;
  /** The server's words at single partials, until those are changed. */
  faults: Readonly<Record<number, string>>;
};

export function rowKey({ midi, string, take }: Place): RowKey {
  return `${midi}-${string}-${take}`;
}

export function emptyRow(place: Place): Row {
  return {
    place,
    cells: {},
    kept: [],
    dropped: [],
    confirmed: [],
    removed: false,
    saved: null,
    version: 0,
    sending: false,
    sent: [],
    alone: false,
    trouble: null,
    faults: {},
  };
}

export function rowOf(note: NoteRecord): Row {
  return {
    ...emptyRow({ midi: note.midi, string: note.string, take: note.take }),
    ...savedDraft(note),
    saved: note,
    version: note.version,
  };
}

export function savedDraft(note: NoteRecord): Draft {
  return {
    cells: Object.fromEntries(note.readings.map(({ partial, hz }) => [partial, { kind: "read", hz }])),
    kept: note.kept,
    dropped: note.dropped,
    confirmed: [],
    removed: false,
  };
}

export function draftOf({ cells, kept, dropped, confirmed, removed }: Row): Draft {
  return { cells, kept, dropped, confirmed, removed };
}

export function partialsOf({ cells }: Pick<Row, "cells">): number[] {
  return Object.keys(cells)
    .map(Number)
    .sort((one, other) => one - other);
}

/** The frequency in a cell; null while it is none. */
export function cellHz(
  row: Pick<Row, "cells" | "place">,
  partial: number,
  referenceHz: number,
): number | null {
  const cell = row.cells[partial];
  if (!cell) return null;
  if (cell.kind === "read") return cell.hz;
  return typedHz(cell.text, cell.unit, { partial, midi: row.place.midi, referenceHz });
}

/** What is wrong with a cell by itself; nothing is said of one that is still being typed. */
export function cellFault(row: Row, partial: number): string | null {
  const cell = row.cells[partial];
  if (cell?.kind === "typed") {
    if (!cell.settled) return null;
    const fault = typedFault(cell.text, cell.unit);
    if (fault) return fault;
  }
  return row.faults[partial] ?? null;
}

export type HeldReading = { partial: number; hz: number; sigmaCents: number | null };

/** The readings that can be counted on: settled, and numbers. */
export function heldReadings(row: Row, referenceHz: number): HeldReading[] {
  return partialsOf(row).flatMap((partial) => {
    const cell = row.cells[partial];
    const hz = cellHz(row, partial, referenceHz);
    if (!cell || hz === null || (cell.kind === "typed" && !cell.settled)) return [];
    return [{ partial, hz, sigmaCents: sigmaOf(row, partial, hz) }];
  });
}

/** A reading's own error belongs to the number it came with, not to one typed in its place. */
function sigmaOf(row: Row, partial: number, hz: number): number | null {
  const before = row.saved?.readings.find((reading) => reading.partial === partial);
  return before && sameHz(before.hz, hz) ? before.sigmaCents : null;
}

/** Cents become hertz and come back: equal to a billionth is the same number. */
export function sameHz(one: number, other: number): boolean {
  return Math.abs(one - other) <= 1e-9 * Math.abs(other);
}

const sameSet = (one: readonly number[], other: readonly number[]) =>
  one.length === other.length && one.every((value) => other.includes(value));

/** Whether the server has something else than this row. */
export function isChanged(row: Row, referenceHz: number): boolean {
  if (row.removed) return row.saved !== null;
  const partials = partialsOf(row);
  if (!row.saved) return partials.length > 0;
  const { readings, kept, dropped } = row.saved;
  if (!sameSet(row.kept, kept) || !sameSet(row.dropped, dropped)) return true;
  if (partials.length !== readings.length) return true;
  return readings.some(({ partial, hz }) => {
    const held = cellHz(row, partial, referenceHz);
    return held === null || !sameHz(held, hz);
  });
}

/** All cells are numbers and nobody is in the middle of one. */
export function isWhole(row: Row, referenceHz: number): boolean {
  if (row.removed) return true;
  const partials = partialsOf(row);
  return (
    partials.length > 0 &&
    heldReadings(row, referenceHz).length === partials.length &&
    partials.every((partial) => cellFault(row, partial) === null)
  );
}

/** Meant as typed: what the person said so of, and what the server has already, which was asked about then. */
export function confirmedOf(row: Row, referenceHz: number): number[] {
  return partialsOf(row).filter((partial) => {
    if (row.confirmed.includes(partial)) return true;
    const before = row.saved?.readings.find((reading) => reading.partial === partial);
    const held = cellHz(row, partial, referenceHz);
    return before !== undefined && held !== null && sameHz(before.hz, held);
  });
}

/** What is sent to the server: hertz, as they are what is stored. */
export function inputOf(row: Row, referenceHz: number): NoteInput {
  const partials = new Set(partialsOf(row));
  return {
    string: row.place.string,
    take: row.place.take,
    readings: heldReadings(row, referenceHz).map(({ partial, hz, sigmaCents }) => ({
      partial,
      hz,
      ...(sigmaCents === null ? {} : { sigmaCents }),
    })),
    kept: row.kept.filter((partial) => partials.has(partial)),
    dropped: row.dropped.filter((partial) => partials.has(partial)),
    confirmed: confirmedOf(row, referenceHz),
    version: row.version,
  };
}

const MOST_SENT = 20;

/** The row as it goes out now, beside what went out before and was not answered. */
export function withSent(row: Row, referenceHz: number): readonly Sent[] {
  const { kept, dropped } = inputOf(row, referenceHz);
  const now: Sent = row.removed
    ? { removed: true }
    : { removed: false, readings: heldReadings(row, referenceHz), kept, dropped };
  return [...row.sent, now].slice(-MOST_SENT);
}

/** Whether what stands on the server is what we ourselves sent, its answer lost by a reload or a broken line. */
export function isOwnWrite(sent: readonly Sent[], stored: NoteRecord | null): boolean {
  return sent.some((one) => {
    if (one.removed || !stored) return one.removed && !stored;
    return (
      sameSet(one.kept, stored.kept) &&
      sameSet(one.dropped, stored.dropped) &&
      one.readings.length === stored.readings.length &&
      stored.readings.every(({ partial, hz }) =>
        one.readings.some((reading) => reading.partial === partial && sameHz(reading.hz, hz)),
      )
    );
  });
}
