"use client";

import type { QueryKey } from "@tanstack/react-query";
import { useSearchParams } from "next/navigation";
import { useMemo } from "react";
import { Ledger } from "@/components/tables/ledger";
import type { LedgerColumn, LedgerFilter, LedgerPage } from "@/components/tables/ledger-types";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import { apiQuery } from "@/lib/pages/ledger-request";
import type { ListPage } from "@/lib/pages/list-query";
import type { Archivable } from "./open-visits-dialog";
import { type ArchiveAction, useArchive } from "./use-archive";

export type RecordClock = { locale: string; timeZone: string };

/** What is particular to one list of records; everything else they have in common. At module scope. */
export type RecordList<Row extends Archivable> = {
  label: string;
  /** Of the list in the book, and behind /api/v1: "/customers". */
  path: string;
  /** "customer", "customers". */
  words: readonly [string, string];
  keys: { all: QueryKey; list: (query: Record<string, string | undefined>) => QueryKey };
  /** Before the common filter of what is archived. */
  filters?: readonly LedgerFilter[];
  columns: (clock: RecordClock) => LedgerColumn<Row & { href: string }>[];
  empty: { title: string; text: string; add: { href: string; label: string } };
};

export type RecordsLedgerProps<Row> = {
  first: ListPage<Row>;
  clock: RecordClock;
  /** Whether this person may do what an empty list offers to do first. */
  mayAdd: boolean;
  /** Absent where the person may not. */
  archive?: ArchiveAction | undefined;
};

const archivedFilter: LedgerFilter = {
  id: "archived",
  name: "Show",
  anyLabel: "in use",
  options: [{ value: "only", label: "archived" }],
};
const defaultSort = { id: "name", descending: false };

/** Customers, sites or instruments: sorted, filtered, found, archived and restored alike. */
export function RecordsLedger<Row extends Archivable>({
  list,
  first,
  clock: { locale, timeZone },
  mayAdd,
  archive: action,
}: RecordsLedgerProps<Row> & { list: RecordList<Row> }) {
  const { label, path, words, keys, empty } = list;
  const archived = useSearchParams().get("archived") === "only";
  const columns = useMemo(() => list.columns({ locale, timeZone }), [list, locale, timeZone]);
  const filters = useMemo(() => [...(list.filters ?? []), archivedFilter], [list]);
  const { archive, question } = useArchive({ action, listKey: keys.all, words, locale });
  const bulkActions = action
    ? [
        {
          label: archived ? "Restore" : "Archive",
          run: (rows: Row[]) => archive(rows, !archived),
        },
      ]
    : [];

  const asLedgerPage = ({ items, next }: ListPage<Row>): LedgerPage<Row & { href: string }> => ({
    rows: items.map((row) => ({ ...row, href: `${path}/${row.id}` })),
    nextCursor: next,
  });

  return (
    <>
      <Ledger
        label={label}
        queryKey={keys.list({})}
        columns={columns}
        fetchPage={async (request, signal) =>
          asLedgerPage(await fetchJson<ListPage<Row>>(`/api/v1${path}`, { query: apiQuery(request), signal }))
        }
        initialPage={asLedgerPage(first)}
        filters={filters}
        searchLabel={`Find ${/^[aeiou]/.test(words[0]) ? "an" : "a"} ${words[0]}`}
        defaultSort={defaultSort}
        bulkActions={bulkActions}
        empty={
          <EmptyState
            title={empty.title}
            action={mayAdd ? <LinkButton href={empty.add.href}>{empty.add.label}</LinkButton> : null}
          >
            {empty.text}
          </EmptyState>
        }
      />
      {question}
    </>
  );
}
