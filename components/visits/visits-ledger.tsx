"use client";

import { useSearchParams } from "next/navigation";
import { useCallback, useMemo, useState } from "react";
import { ActionStrip } from "@/components/shell/action-strip";
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
import { dayInList, hoursOf, instrumentWords } from "./time-words";
import { readSpan } from "./visit-span";
import { VisitStateWord } from "./visit-state";

type Row = VisitRow & { href: string };

function asLedgerPage({ items, next }: ListPage<VisitRow>): LedgerPage<Row> {
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
            {dayInList(row.start, locale, today)}{" "}
            <span className="text-ink-soft">{hoursOf(row, locale)}</span>
          </>
        ),
        sortable: true,
        width: 204,
        phone: "line",
      },
      { id: "site", header: "Where", cell: (row) => row.siteName, phone: "title" },
      {
        id: "instruments",
        header: "Instruments",
        cell: (row) => instrumentWords(row.instruments, row.jobs),
        width: 232,
        from: "xl",
        phone: "none",
      },
      {
        id: "customer",
        header: "Customer",
        cell: (row) => row.customerName,
        width: 160,
        extra: true,
        phone: "none",
      },
      {
        id: "technicians",
        header: "Comes",
        cell: (row) => row.technicians.map(({ name }) => name).join(", "),
        width: 136,
        from: "sm",
        phone: "end",
      },
      {
        id: "state",
        header: "State",
        cell: (row) => <VisitStateWord state={row.state} />,
        width: 116,
        phone: "aside",
      },
    ],
    [locale, today],
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
      <div className="mt-3 mb-2 flex flex-wrap items-center justify-between gap-2 lg:mt-5">
        <SpanBar span={span} />
        {mayBook ? (
          <LinkButton kind="primary" href="/visits/new" className="max-lg:hidden">
            Book a visit
          </LinkButton>
        ) : null}
      </div>
      {mayBook ? (
        <ActionStrip>
          <LinkButton kind="primary" href="/visits/new">
            Book a visit
          </LinkButton>
        </ActionStrip>
      ) : null}
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
          <EmptyState title={span.name === "coming" ? "No visits to come" : "No visits on these days"}>
            {span.name === "coming" ? "Book a visit to see it here." : "Choose other days above."}
          </EmptyState>
        }
      />
    </>
  );
}
