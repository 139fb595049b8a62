"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useSearchParams } from "next/navigation";
import { useMemo } from "react";
import { signed } from "@/components/charts/format";
import type { ArchiveAction } from "@/components/records/archive-button";
import { archiveRows } from "@/components/records/archive-rows";
import { Ledger } from "@/components/tables/ledger";
import type { FetchLedgerPage, LedgerColumn, LedgerPage } from "@/components/tables/ledger-types";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import { showDayOf } from "@/lib/dates";
import { instrumentKeys } from "@/lib/instruments/keys";
import { kindLabels, kinds } from "@/lib/instruments/rules";
import type { InstrumentRow } from "@/lib/instruments/schema";
import { apiQuery } from "@/lib/pages/ledger-request";
import type { ListPage } from "@/lib/pages/list-query";

type Row = InstrumentRow & { href: string };

function asLedgerPage({ items, next }: ListPage<InstrumentRow>): LedgerPage<Row> {
  return { rows: items.map((row) => ({ ...row, href: `/instruments/${row.id}` })), nextCursor: next };
}

const fetchPage: FetchLedgerPage<Row> = async (request, signal) =>
  asLedgerPage(
    await fetchJson<ListPage<InstrumentRow>>("/api/v1/instruments", { query: apiQuery(request), signal }),
  );

const filters = [
  { id: "kind", name: "Kind", options: kinds.map((kind) => ({ value: kind, label: kindLabels[kind] })) },
  { id: "archived", name: "Show", anyLabel: "in use", options: [{ value: "only", label: "archived" }] },
];
const defaultSort = { id: "name", descending: false };

export function InstrumentsLedger({
  first,
  locale,
  timeZone,
  mayAdd,
  archive,
}: {
  first: ListPage<InstrumentRow>;
  locale: string;
  timeZone: string;
  mayAdd: boolean;
  /** Absent where the person may not. */
  archive?: ArchiveAction;
}) {
  const client = useQueryClient();
  const archived = useSearchParams().get("archived") === "only";
  const columns = useMemo<LedgerColumn<Row>[]>(
    () => [
      {
        id: "name",
        header: "Instrument",
        cell: (row) => row.name,
        sortable: true,
        phone: "title",
      },
      {
        id: "place",
        header: "Where",
        cell: (row) => (
          <>
            {row.siteName}
            {row.room ? <span className="text-ink-soft">, {row.room}</span> : null}
          </>
        ),
        sortable: true,
        width: 190,
        phone: "line",
      },
      {
        id: "owner",
        header: "Owner",
        cell: (row) => row.ownerName,
        sortable: true,
        width: 120,
        from: "xl",
        phone: "none",
      },
      {
        id: "kind",
        header: "Kind",
        cell: (row) => [kindLabels[row.kind], row.year].filter(Boolean).join(", "),
        extra: true,
        phone: "none",
      },
      { id: "serial", header: "Serial", cell: (row) => row.serial, extra: true, phone: "none" },
      {
        id: "found",
        header: "Found, cents",
        cell: (row) =>
          row.lastFoundCents === null ? (
            <span className="text-ink-soft">–</span>
          ) : (
            <>
              {signed(row.lastFoundCents, 1)}
              <span className="text-ink-soft sm:hidden"> cents</span>
            </>
          ),
        align: "right",
        width: 92,
        phone: "aside",
      },
      {
        id: "read",
        header: "Last read",
        cell: (row) =>
          row.lastSheetAt ? (
            showDayOf(row.lastSheetAt, locale, timeZone)
          ) : (
            <span className="text-ink-soft">not yet</span>
          ),
        align: "right",
        width: 96,
        from: "xl",
        phone: "end",
      },
      {
        id: "updated",
        header: "Changed",
        cell: (row) => showDayOf(row.updatedAt, locale, timeZone),
        sortable: true,
        extra: true,
        phone: "none",
      },
    ],
    [locale, timeZone],
  );
  const bulkActions = useMemo(
    () =>
      archive
        ? [
            {
              label: archived ? "Restore" : "Archive",
              run: (rows: Row[]) =>
                archiveRows(rows, !archived, {
                  action: archive,
                  client,
                  listKey: instrumentKeys.all,
                  words: ["instrument", "instruments"],
                }),
            },
          ]
        : [],
    [archive, archived, client],
  );
  return (
    <Ledger
      label="Instruments"
      queryKey={instrumentKeys.list({})}
      columns={columns}
      fetchPage={fetchPage}
      initialPage={asLedgerPage(first)}
      filters={filters}
      searchLabel="Find an instrument"
      defaultSort={defaultSort}
      bulkActions={bulkActions}
      empty={
        <EmptyState
          title="No instruments yet"
          action={mayAdd ? <LinkButton href="/instruments/new">Add an instrument</LinkButton> : null}
        >
          Each stands at a customer’s site. Add the customer and the site first, then the instrument.
        </EmptyState>
      }
    />
  );
}
