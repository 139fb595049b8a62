"use client";

import { useCallback, useMemo } from "react";
import { Ledger } from "@/components/tables/ledger";
import type {
  FetchLedgerPage,
  LedgerColumn,
  LedgerFilter,
  LedgerPage,
} from "@/components/tables/ledger-types";
import { type StateKind, StateWord } from "@/components/ui/state-word";
import { EmptyState } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import { type Day, showDay } from "@/lib/dates";
import type { DueItem, DueList } from "@/lib/diary/due/schema";
import { dueKeys } from "@/lib/diary/keys";
import { showWindow } from "@/lib/diary/words";
import { kindLabels, kinds } from "@/lib/instruments/rules";
import { apiQuery } from "@/lib/pages/ledger-request";

type Row = DueItem & { id: string; href: string };

const looks: Record<DueItem["state"], StateKind> = {
  due: "waiting",
  overdue: "attention",
  booked: "done",
  declined: "stopped",
  resting: "returned",
  later: "draft",
};

/** What wants a visit. A row opens what comes next: the visit that is booked, or the form that books one. */
export function DueLedger({
  first,
  today,
  locale,
  technicians,
  mayBook,
}: {
  /** The first page as the server read it for this address. */
  first: DueList;
  today: Day;
  locale: string;
  technicians: readonly { id: string; name: string }[];
  mayBook: boolean;
}) {
  const asPage = useCallback(
    ({ items, next }: DueList): LedgerPage<Row> => ({
      rows: items.map((item) => ({ ...item, id: item.instrumentId, href: hrefOf(item, { today, mayBook }) })),
      nextCursor: next,
    }),
    [today, mayBook],
  );

  const columns = useMemo<LedgerColumn<Row>[]>(
    () => [
      {
        id: "name",
        header: "Instrument",
        cell: (row) => row.instrument,
        sortable: true,
        phone: "title",
      },
      {
        id: "place",
        header: "Where",
        cell: (row) => [row.room, row.site, row.city].filter(Boolean).join(", "),
        sortable: true,
        width: 264,
        phone: "line",
      },
      {
        id: "due",
        header: "Due",
        cell: (row) =>
          row.window ? (
            showWindow(row.window, locale)
          ) : (
            <span className="text-ink-soft">no event to come</span>
          ),
        sortable: true,
        width: 184,
        phone: "end",
      },
      {
        id: "served",
        header: "Last served",
        cell: (row) =>
          row.lastServed ? showDay(row.lastServed, locale) : <span className="text-ink-soft">not yet</span>,
        align: "right",
        width: 104,
        from: "xl",
        phone: "none",
      },
      {
        id: "technician",
        header: "Prefers",
        cell: (row) => row.technician ?? <span className="text-ink-soft">anybody</span>,
        width: 120,
        extra: true,
        phone: "none",
      },
      {
        id: "state",
        header: "State",
        cell: (row) => <StateWord kind={looks[row.state]}>{row.state}</StateWord>,
        width: 104,
        phone: "aside",
      },
    ],
    [locale],
  );

  const filters = useMemo<LedgerFilter[]>(
    () => [
      { id: "kind", name: "Kind", options: kinds.map((kind) => ({ value: kind, label: kindLabels[kind] })) },
      {
        id: "technicianId",
        name: "Technician",
        options: technicians.map(({ id, name }) => ({ value: id, label: name })),
      },
      {
        id: "state",
        name: "State",
        anyLabel: "to book",
        options: [
          ...(["overdue", "due", "booked", "declined", "resting", "later"] as const).map((state) => ({
            value: state,
            label: state,
          })),
          { value: "any", label: "any" },
        ],
      },
    ],
    [technicians],
  );

  const fetchPage = useCallback<FetchLedgerPage<Row>>(
    async (request, signal) =>
      asPage(await fetchJson<DueList>("/api/v1/due", { query: apiQuery(request), signal })),
    [asPage],
  );

  return (
    <Ledger
      label="Due list"
      queryKey={dueKeys.all}
      columns={columns}
      filters={filters}
      searchLabel="Find in the list"
      fetchPage={fetchPage}
      initialPage={asPage(first)}
      defaultSort={{ id: "due", descending: false }}
      empty={
        <EmptyState title="Nothing is due">
          An instrument comes here by its service plan, which stands in its record.
        </EmptyState>
      }
    />
  );
}

function hrefOf(item: DueItem, { today, mayBook }: { today: Day; mayBook: boolean }): string {
  if (item.bookedVisitId) return `/visits/${item.bookedVisitId}`;
  if (!mayBook) return `/instruments/${item.instrumentId}`;
  const date = item.window && item.window.from > today ? item.window.from : today;
  return `/visits/new?${new URLSearchParams({ site: item.siteId, instrument: item.instrumentId, date })}`;
}
