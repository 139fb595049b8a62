"use client";

import { signed } from "@/components/charts/format";
import { changedOn } from "@/components/records/record-columns";
import { type RecordList, RecordsLedger, type RecordsLedgerProps } from "@/components/records/records-ledger";
import { showDayOf } from "@/lib/dates";
import { instrumentKeys } from "@/lib/instruments/keys";
import { kindLabels, kinds } from "@/lib/instruments/rules";
import type { InstrumentRow } from "@/lib/instruments/schema";

const instruments: RecordList<InstrumentRow> = {
  label: "Instruments",
  path: "/instruments",
  words: ["instrument", "instruments"],
  keys: instrumentKeys,
  filters: [
    { id: "kind", name: "Kind", options: kinds.map((kind) => ({ value: kind, label: kindLabels[kind] })) },
  ],
  columns: (clock) => [
    { id: "name", header: "Instrument", cell: (row) => row.name, sortable: true, phone: "title" },
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
      width: 248,
      phone: "line",
    },
    {
      id: "owner",
      header: "Owner",
      cell: (row) => row.ownerName,
      sortable: true,
      width: 152,
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
          showDayOf(row.lastSheetAt, clock.locale, clock.timeZone)
        ) : (
          <span className="text-ink-soft">not yet</span>
        ),
      align: "right",
      width: 96,
      from: "xl",
      phone: "end",
    },
    changedOn(clock),
  ],
  empty: {
    title: "No instruments yet",
    text: "Each stands at a customer’s site. Add the customer and the site first, then the instrument.",
    add: { href: "/instruments/new", label: "Add an instrument" },
  },
};

export function InstrumentsLedger(props: RecordsLedgerProps<InstrumentRow>) {
  return <RecordsLedger list={instruments} {...props} />;
}
