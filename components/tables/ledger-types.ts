import type { ReactNode } from "react";

export type LedgerRow = { id: string; href?: string };

export type LedgerColumn<Row extends LedgerRow> = {
  id: string;
  header: string;
  cell: (row: Row) => ReactNode;
  align?: "left" | "right";
  /** The server can sort by it under this id. */
  sortable?: boolean;
  /** Pixels, 104 if not given: room for an amount, a date or a state word. The title takes what is left. */
  width?: number;
  /** Narrower than this the column is left out: sm 640, lg 1024, xl 1280. */
  from?: "sm" | "lg" | "xl";
  /** Shown only when asked for under "Columns". */
  extra?: boolean;
  /** Where it stands in the phone's two-line row; "none" leaves it out there. Without it: "line". */
  phone?: "title" | "aside" | "line" | "end" | "none";
};

export type LedgerSort = { id: string; descending: boolean };

/** What the address says about the list, without the cursor. */
export type LedgerQuery = {
  search: string;
  sort: LedgerSort | null;
  filters: Readonly<Record<string, string>>;
};

export type LedgerPage<Row> = { rows: Row[]; nextCursor: string | null; total?: number };

export type FetchLedgerPage<Row> = (
  request: LedgerQuery & { cursor: string | null },
  signal: AbortSignal,
) => Promise<LedgerPage<Row>>;

export type LedgerFilter = {
  /** Name of the parameter in the address. */
  id: string;
  name: string;
  anyLabel?: string;
  options: ReadonlyArray<{ value: string; label: string }>;
};

export type LedgerBulkAction<Row> = {
  label: string;
  kind?: "secondary" | "quiet" | "danger";
  /** Rejects with a message for the person; rows stay chosen then. */
  run: (rows: Row[]) => Promise<unknown>;
};
