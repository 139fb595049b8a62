"use client";

import { useSearchParams } from "next/navigation";
import { useCallback, useMemo, useState } from "react";
import { Ledger } from "@/components/tables/ledger";
import type { FetchLedgerPage, LedgerColumn, LedgerPage } from "@/components/tables/ledger-types";
import { LinkButton } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { fetchJson } from "@/lib/client/fetch-json";
import type { Day } from "@/lib/dates";
import type { ListPage } from "@/lib/pages/list-query";
import { visitKeys } from "@/lib/visits/keys";
import { visitStates } from "@/lib/visits/rules";
import type { VisitRow } from "@/lib/visits/schema";
import { stateWords } from "@/lib/visits/words";
import { SpanBar } from "./span-bar";
import { dayWithYear, hoursOf, instrumentWords } from "./time-words";
import { readSpan } from "./visit-span";
import { VisitStateWord } from "./visit-state";

type Row = VisitRow & { href: string };

export function asLedgerPage({ items, next }: ListPage<VisitRow>): LedgerPage<Row> {
  return { rows: items.map((row) => ({ ...row, href: `/visits/${row.id}` })), nextCursor: next };
}

export function VisitsLedger({
  today,
  locale,
  technicians,
  first,
  mayBook,
}: {
  today: Day;
  locale: string;
  technicians: readonly { id: string; name: string }[];
  /** The first page as the server read it for this address. */
  first: ListPage<VisitRow>;
  mayBook: boolean;
}) {
  const params = useSearchParams();
  const span = useMemo(() => readSpan(params, today), [params, today]);
  const { from, to, latestFirst } = span;
  const asked = `${from}|${to}|${latestFirst}`;
  const [firstAsked] = useState(asked);

  const columns = useMemo<LedgerColumn<Row>[]>(
    () => [
      {
        id: "start",
        header: "When",
        cell: (row) => (
          <>
            {dayWithYear(row.start, locale)} <span className="text-ink-soft">{hoursOf(row, locale)}</span>
          </>
        ),
        sortable: true,
        width: 1.7,
        phone: "line",
      },
      { id: "site", header: "Where", cell: (row) => row.siteName, width: 1.6, phone: "title" },
      {
        id: "instruments",
        header: "Instruments",
        cell: (row) => instrumentWords(row.instruments, row.jobs),
        width: 1.8,
        from: "xl",
        phone: "none",
      },
      {
        id: "customer",
        header: "Customer",
        cell: (row) => row.customerName,
        extra: true,
        phone: "none",
      },
      {
        id: "technicians",
        header: "Comes",
        cell: (row) => row.technicians.map(({ name }) => name).join(", "),
        from: "sm",
        phone: "end",
      },
      { id: "state", header: "State", cell: (row) => <VisitStateWord state={row.state} />, phone: "aside" },
    ],
    [locale],
  );

  const filters = useMemo(
    () => [
      {
        id: "state",
        name: "State",
        options: visitStates.map((state) => ({ value: state, label: stateWords[state] })),
      },
      {
        id: "technician",
        name: "Technician",
        options: technicians.map(({ id, name }) => ({ value: id, label: name })),
      },
    ],
    [technicians],
  );

  const fetchPage = useCallback<FetchLedgerPage<Row>>(
    async ({ sort, filters: set, cursor }, signal) =>
      asLedgerPage(
        await fetchJson<ListPage<VisitRow>>("/api/v1/visits", {
          query: {
            from,
            to,
            direction: (sort?.descending ?? latestFirst) ? "desc" : "asc",
            state: set.state,
            technicianId: set.technician,
            cursor,
          },
          signal,
        }),
      ),
    [from, to, latestFirst],
  );

  return (
    <>
      <SpanBar span={span} />
      <Ledger
        key={asked}
        label="Visits"
        queryKey={visitKeys.list(asked)}
        columns={columns}
        filters={filters}
        fetchPage={fetchPage}
        initialPage={asked === firstAsked ? asLedgerPage(first) : undefined}
        defaultSort={{ id: "start", descending: latestFirst }}
        empty={
          <EmptyState
            title={span.name === "coming" ? "No visits to come" : "No visits on these days"}
            action={
              mayBook ? (
                <LinkButton kind="primary" href="/visits/new">
                  Book a visit
                </LinkButton>
              ) : null
            }
          >
            {span.name === "coming"
              ? "Book one from here, or from an instrument’s page."
              : "Choose other days above."}
          </EmptyState>
        }
      />
    </>
  );
}
