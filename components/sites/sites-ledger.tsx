"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useSearchParams } from "next/navigation";
import { useMemo } from "react";
import type { ArchiveAction } from "@/components/records/archive-button";
import { archiveRows } from "@/components/records/archive-rows";
import { Ledger } from "@/components/tables/ledger";
import type { FetchLedgerPage, LedgerColumn, LedgerPage } from "@/components/tables/ledger-types";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import { showDayOf } from "@/lib/dates";
import { apiQuery } from "@/lib/pages/ledger-request";
import type { ListPage } from "@/lib/pages/list-query";
import { siteKeys } from "@/lib/sites/keys";
import type { SiteRow } from "@/lib/sites/schema";

type Row = SiteRow & { href: string };

function asLedgerPage({ items, next }: ListPage<SiteRow>): LedgerPage<Row> {
  return { rows: items.map((row) => ({ ...row, href: `/sites/${row.id}` })), nextCursor: next };
}

const fetchPage: FetchLedgerPage<Row> = async (request, signal) =>
  asLedgerPage(await fetchJson<ListPage<SiteRow>>("/api/v1/sites", { query: apiQuery(request), signal }));

const filters = [
  { id: "archived", name: "Show", anyLabel: "in use", options: [{ value: "only", label: "archived" }] },
];
const defaultSort = { id: "name", descending: false };

export function SitesLedger({
  first,
  locale,
  timeZone,
  archive,
}: {
  first: ListPage<SiteRow>;
  locale: string;
  timeZone: string;
  /** Absent where the person may not. */
  archive?: ArchiveAction;
}) {
  const client = useQueryClient();
  const archived = useSearchParams().get("archived") === "only";
  const columns = useMemo<LedgerColumn<Row>[]>(
    () => [
      { id: "name", header: "Site", cell: (row) => row.name, sortable: true, phone: "title" },
      {
        id: "street",
        header: "Street",
        cell: (row) => row.street,
        width: 140,
        extra: true,
        phone: "none",
      },
      {
        id: "city",
        header: "Town",
        cell: (row) => [row.postalCode, row.city].filter(Boolean).join(" "),
        sortable: true,
        width: 160,
        phone: "line",
      },
      {
        id: "customer",
        header: "Customer",
        cell: (row) => row.customerName,
        sortable: true,
        width: 150,
        from: "xl",
        phone: "end",
      },
      {
        id: "instruments",
        header: "Instruments",
        cell: (row) => (
          <>
            {row.instruments}
            <span className="text-ink-soft sm:hidden">
              {row.instruments === 1 ? " instrument" : " instruments"}
            </span>
          </>
        ),
        align: "right",
        width: 88,
        phone: "aside",
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
                  listKey: siteKeys.all,
                  words: ["site", "sites"],
                }),
            },
          ]
        : [],
    [archive, archived, client],
  );
  return (
    <Ledger
      label="Sites"
      queryKey={siteKeys.list({})}
      columns={columns}
      fetchPage={fetchPage}
      initialPage={asLedgerPage(first)}
      filters={filters}
      searchLabel="Find a site"
      defaultSort={defaultSort}
      bulkActions={bulkActions}
      empty={
        <EmptyState
          title="No sites yet"
          action={<LinkButton href="/customers">See the customers</LinkButton>}
        >
          A site is an address where instruments stand. It is added on its customer’s page.
        </EmptyState>
      }
    />
  );
}
