"use client";

import { changedOn, instrumentCount } from "@/components/records/record-columns";
import { type RecordList, RecordsLedger, type RecordsLedgerProps } from "@/components/records/records-ledger";
import { siteKeys } from "@/lib/sites/keys";
import type { SiteRow } from "@/lib/sites/schema";

const sites: RecordList<SiteRow> = {
  label: "Sites",
  path: "/sites",
  words: ["site", "sites"],
  keys: siteKeys,
  columns: (clock) => [
    { id: "name", header: "Site", cell: (row) => row.name, sortable: true, phone: "title" },
    { id: "street", header: "Street", cell: (row) => row.street, width: 140, extra: true, phone: "none" },
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
    instrumentCount(),
    changedOn(clock),
  ],
  empty: {
    title: "No sites yet",
    text: "A site is an address where instruments stand. It is added on its customer’s page.",
    add: { href: "/customers", label: "See the customers" },
  },
};

export function SitesLedger(props: RecordsLedgerProps<SiteRow>) {
  return <RecordsLedger list={sites} {...props} />;
}
