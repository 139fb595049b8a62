"use client";

import { keepPreviousData, type QueryKey, useInfiniteQuery } from "@tanstack/react-query";
import { createColumnHelper, type RowSelectionState, useTable } from "@tanstack/react-table";
import { type ReactNode, useCallback, useMemo, useState } from "react";
import { NetworkError } from "@/lib/client/fetch-json";
import { Button } from "../ui/button";
import { EmptyState, ErrorState, LoadingLines, OfflineState } from "../ui/states";
import { nextSort } from "./ledger-address";
import { LedgerBar } from "./ledger-bar";
import { ledgerFeatures } from "./ledger-features";
import { LedgerFoot } from "./ledger-foot";
import { LedgerTable } from "./ledger-table";
import type {
  FetchLedgerPage,
  LedgerBulkAction,
  LedgerColumn,
  LedgerFilter,
  LedgerPage,
  LedgerRow,
  LedgerSort,
} from "./ledger-types";
import { useLedgerAddress } from "./use-ledger-address";

export type LedgerProps<Row extends LedgerRow> = {
  /** Says what the list is, to screen readers and in its states: "Instruments". */
  label: string;
  /** react-query key of the list; search, sort and filters are added to it. */
  queryKey: QueryKey;
  /** At module scope or memoised. */
  columns: readonly LedgerColumn<Row>[];
  fetchPage: FetchLedgerPage<Row>;
  /** The first page as the server rendered it for this address, so that nothing loads twice. */
  initialPage?: LedgerPage<Row>;
  filters?: readonly LedgerFilter[];
  searchLabel?: string;
  defaultSort?: LedgerSort | null;
  bulkActions?: readonly LedgerBulkAction<Row>[];
  chosenSummary?: (rows: readonly Row[]) => ReactNode;
  /** What to do first, when there is nothing at all. */
  empty: ReactNode;
};

const noRows: never[] = [];
const noFilters: readonly LedgerFilter[] = [];
const noActions: never[] = [];

/** A list as a ledger: hairlines, sticky head, sorting and filters in the address, keyboard, bulk choice. */
export function Ledger<Row extends LedgerRow>({
  label,
  queryKey,
  columns,
  fetchPage,
  initialPage,
  filters = noFilters,
  searchLabel,
  defaultSort = null,
  bulkActions = noActions,
  chosenSummary,
  empty,
}: LedgerProps<Row>) {
  const sortId = defaultSort?.id;
  const sortDown = defaultSort?.descending ?? false;
  const shape = useMemo(
    () => ({ columns, filters, defaultSort: sortId ? { id: sortId, descending: sortDown } : null }),
    [columns, filters, sortId, sortDown],
  );
  const { address, change } = useLedgerAddress(shape);
  const { search, sort, filters: setFilters } = address;
  const asked = JSON.stringify({ search, sort, filters: setFilters });
  const [firstAsked] = useState(asked);

  const result = useInfiniteQuery({
    queryKey: [...queryKey, asked],
    queryFn: ({ pageParam, signal }) =>
      fetchPage({ search, sort, filters: setFilters, cursor: pageParam }, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.nextCursor,
    initialData:
      initialPage && asked === firstAsked ? { pages: [initialPage], pageParams: [null] } : undefined,
    placeholderData: keepPreviousData,
  });

  const rows = useMemo(() => result.data?.pages.flatMap((page) => page.rows) ?? noRows, [result.data]);
  const [selection, setSelection] = useState<RowSelectionState>({});

  const tableColumns = useMemo(() => {
    const helper = createColumnHelper<typeof ledgerFeatures, Row>();
    return helper.columns(
      columns.map((column) =>
        helper.accessor((row) => row, {
          id: column.id,
          header: column.header,
          enableSorting: column.sortable ?? false,
          cell: (context) => column.cell(context.row.original),
        }),
      ),
    );
  }, [columns]);

  const table = useTable({
    features: ledgerFeatures,
    columns: tableColumns,
    data: rows,
    getRowId: (row) => row.id,
    manualSorting: true,
    state: {
      sorting: sort ? [{ id: sort.id, desc: sort.descending }] : noRows,
      columnVisibility: Object.fromEntries(
        columns.map((column) => [column.id, column.phone === "title" || address.columns.includes(column.id)]),
      ),
      rowSelection: selection,
    },
    onRowSelectionChange: setSelection,
  });

  const chosen = rows.filter((row) => selection[row.id]);
  const selectable = bulkActions.length > 0;
  const choose = useCallback((id: string) => {
    setSelection((current) => {
      const { [id]: wasChosen, ...others } = current;
      return wasChosen ? others : { ...current, [id]: true };
    });
  }, []);

  const chooseAll = useCallback(
    (on: boolean) => setSelection(on ? Object.fromEntries(rows.map((row) => [row.id, true as const])) : {}),
    [rows],
  );
  const filtered = search !== "" || Object.keys(setFilters).length > 0;

  let body: ReactNode;
  if (result.isPending) {
    body = (
      <LoadingLines
        label={`Loading: ${label}`}
        lines={8}
        row="h-9 phone:h-16"
        className="border-t border-edge"
      />
    );
  } else if (result.isError && rows.length === 0) {
    body = <Failed label={label} error={result.error} onRetry={() => result.refetch()} />;
  } else if (rows.length === 0) {
    body = filtered ? (
      <EmptyState
        title="Nothing fits these filters"
        action={<Button onClick={() => change({ search: "", filters: {} })}>Clear filters</Button>}
      >
        Take a filter away or search for fewer letters.
      </EmptyState>
    ) : (
      empty
    );
  } else {
    body = (
      <>
        <LedgerTable
          table={table}
          label={label}
          columns={columns}
          sort={sort}
          onSort={(id) => change({ sort: nextSort(sort, id, shape.defaultSort) })}
          selectable={selectable}
          selection={selection}
          onChoose={choose}
          onChooseAll={chooseAll}
        />
        <LedgerFoot
          shown={rows.length}
          total={result.data?.pages[0]?.total}
          hasMore={result.hasNextPage}
          waiting={result.isPlaceholderData}
          loadingMore={result.isFetchingNextPage}
          moreFailed={result.isFetchNextPageError}
          onMore={() => result.fetchNextPage()}
          chosen={chosen}
          chosenSummary={chosenSummary}
          bulkActions={bulkActions}
          onClear={() => setSelection({})}
        />
      </>
    );
  }

  return (
    <section aria-label={label} aria-busy={result.isFetching}>
      {rows.length > 0 || filtered || result.isPending ? (
        <LedgerBar
          searchLabel={searchLabel}
          filters={filters}
          columns={columns}
          address={address}
          change={change}
        />
      ) : null}
      {body}
    </section>
  );
}

function Failed({ label, error, onRetry }: { label: string; error: Error; onRetry: () => void }) {
  const again = <Button onClick={onRetry}>Try again</Button>;
  if (error instanceof NetworkError && typeof navigator !== "undefined" && !navigator.onLine) {
    return <OfflineState action={again}>The list is loaded again when the connection is back.</OfflineState>;
  }
  return (
    <ErrorState title={`${label} could not be loaded`} action={again}>
      {error.message}
    </ErrorState>
  );
}
