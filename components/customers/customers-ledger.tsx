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
import { customerKeys } from "@/lib/customers/keys";
import type { CustomerRow } from "@/lib/customers/schema";
import { showDayOf } from "@/lib/dates";
import { apiQuery } from "@/lib/pages/ledger-request";
import type { ListPage } from "@/lib/pages/list-query";

type Row = CustomerRow & { href: string };

function asLedgerPage({ items, next }: ListPage<CustomerRow>): LedgerPage<Row> {
  return { rows: items.map((row) => ({ ...row, href: `/customers/${row.id}` })), nextCursor: next };
}

const fetchPage: FetchLedgerPage<Row> = async (request, signal) =>
  asLedgerPage(
    await fetchJson<ListPage<CustomerRow>>("/api/v1/customers", { query: apiQuery(request), signal }),
  );

const filters = [
  { id: "archived", name: "Show", anyLabel: "in use", options: [{ value: "only", label: "archived" }] },
];
const defaultSort = { id: "name", descending: false };

export function CustomersLedger({
  first,
  locale,
  timeZone,
  archive,
}: {
  first: ListPage<CustomerRow>;
  locale: string;
  timeZone: string;
  /** Absent where the person may not. */
  archive?: ArchiveAction;
}) {
  const client = useQueryClient();
  const archived = useSearchParams().get("archived") === "only";
  const columns = useMemo<LedgerColumn<Row>[]>(
    () => [
      { id: "name", header: "Name", cell: (row) => row.name, sortable: true, phone: "title" },
      {
        id: "contact",
        header: "Contact",
        cell: (row) => row.contactName ?? "",
        width: 130,
        extra: true,
        phone: "none",
      },
      { id: "phone", header: "Telephone", cell: (row) => row.phone ?? "", width: 140, phone: "line" },
      {
        id: "email",
        header: "E-mail",
        cell: (row) => row.email ?? "",
        width: 200,
        from: "xl",
        phone: "none",
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
        id: "sites",
        header: "Sites",
        cell: (row) => row.sites,
        align: "right",
        width: 56,
        from: "xl",
        phone: "none",
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
                  listKey: customerKeys.all,
                  words: ["customer", "customers"],
                }),
            },
          ]
        : [],
    [archive, archived, client],
  );
  return (
    <Ledger
      label="Customers"
      queryKey={customerKeys.list({})}
      columns={columns}
      fetchPage={fetchPage}
      initialPage={asLedgerPage(first)}
      filters={filters}
      searchLabel="Find a customer"
      defaultSort={defaultSort}
      bulkActions={bulkActions}
      empty={
        <EmptyState
          title="No customers yet"
          action={archive ? <LinkButton href="/customers/new">Add a customer</LinkButton> : null}
        >
          A customer is a person or an organisation. Sites and instruments hang on it.
        </EmptyState>
      }
    />
  );
}
