import type { LedgerColumn, LedgerFilter, LedgerQuery, LedgerRow, LedgerSort } from "./ledger-types";

/*
 * The whole state of a list lives in its address, so a filtered list can be kept, sent and gone back to.
 * q = search words, sort = column or -column, columns = chosen columns; filters under their own names.
 */

export type LedgerAddress = LedgerQuery & { columns: readonly string[] };

export type LedgerShape<Row extends LedgerRow> = {
  columns: readonly LedgerColumn<Row>[];
  filters: readonly LedgerFilter[];
  defaultSort: LedgerSort | null;
};

export function readAddress<Row extends LedgerRow>(
  params: URLSearchParams,
  { columns, filters, defaultSort }: LedgerShape<Row>,
): LedgerAddress {
  const set: Record<string, string> = {};
  for (const filter of filters) {
    const value = params.get(filter.id);
    if (value && filter.options.some((option) => option.value === value)) set[filter.id] = value;
  }
  return {
    search: params.get("q")?.trim() ?? "",
    sort: readSort(params.get("sort"), columns) ?? defaultSort,
    filters: set,
    columns: readColumns(params.get("columns"), columns),
  };
}

/** Changes the given parts and leaves every other parameter alone; what is as by default is left out. */
export function writeAddress<Row extends LedgerRow>(
  params: URLSearchParams,
  change: Partial<LedgerAddress>,
  { columns, filters, defaultSort }: LedgerShape<Row>,
): URLSearchParams {
  const next = new URLSearchParams(params);
  if (change.search !== undefined) put(next, "q", change.search.trim());
  if (change.sort !== undefined) {
    const same = change.sort?.id === defaultSort?.id && change.sort?.descending === defaultSort?.descending;
    put(next, "sort", change.sort && !same ? `${change.sort.descending ? "-" : ""}${change.sort.id}` : "");
  }
  if (change.filters !== undefined) {
    for (const filter of filters) put(next, filter.id, change.filters[filter.id] ?? "");
  }
  if (change.columns !== undefined) {
    const chosen = columns.filter((column) => change.columns?.includes(column.id)).map((column) => column.id);
    put(next, "columns", chosen.join() === defaultColumns(columns).join() ? "" : chosen.join());
  }
  return next;
}

function defaultColumns<Row extends LedgerRow>(columns: readonly LedgerColumn<Row>[]): string[] {
  return columns.filter((column) => !column.extra).map((column) => column.id);
}

/** First press sorts upwards, the second downwards, the third gives the list's own order back. */
export function nextSort(
  current: LedgerSort | null,
  id: string,
  defaultSort: LedgerSort | null,
): LedgerSort | null {
  if (current?.id !== id) return { id, descending: false };
  if (!current.descending) return { id, descending: true };
  return defaultSort?.id === id ? { id, descending: false } : defaultSort;
}

function readSort<Row extends LedgerRow>(
  text: string | null,
  columns: readonly LedgerColumn<Row>[],
): LedgerSort | null {
  if (!text) return null;
  const descending = text.startsWith("-");
  const id = descending ? text.slice(1) : text;
  return columns.some((column) => column.id === id && column.sortable) ? { id, descending } : null;
}

function readColumns<Row extends LedgerRow>(
  text: string | null,
  columns: readonly LedgerColumn<Row>[],
): string[] {
  const asked = text?.split(",") ?? [];
  const known = columns.filter((column) => asked.includes(column.id)).map((column) => column.id);
  return known.length > 0 ? known : defaultColumns(columns);
}

function put(params: URLSearchParams, name: string, value: string) {
  if (value) params.set(name, value);
  else params.delete(name);
}
