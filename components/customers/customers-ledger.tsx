"use client";

import { changedOn, instrumentCount } from "@/components/records/record-columns";
import { type RecordList, RecordsLedger, type RecordsLedgerProps } from "@/components/records/records-ledger";
import { customerKeys } from "@/lib/customers/keys";
import type { CustomerRow } from "@/lib/customers/schema";

const customers: RecordList<CustomerRow> = {
  label: "Customers",
  path: "/customers",
  words: ["customer", "customers"],
  keys: customerKeys,
  columns: (clock) => [
    { id: "name", header: "Name", cell: (row) => row.name, sortable: true, phone: "title" },
    {
      id: "contact",
      header: "Contact",
      cell: (row) => row.contactName ?? "",
      width: 130,
      extra: true,
      phone: "none",
    },
    { id: "phone", header: "Telephone", cell: (row) => row.phone ?? "", width: 152, phone: "line" },
    {
      id: "email",
      header: "E-mail",
      cell: (row) => row.email ?? "",
      width: 200,
      from: "xl",
      phone: "none",
    },
    instrumentCount(),
    {
      id: "sites",
      header: "Sites",
      cell: (row) => row.sites,
      align: "right",
      width: 56,
      from: "xl",
      phone: "none",
    },
    changedOn(clock),
  ],
  empty: {
    title: "No customers yet",
    text: "A customer is a person or an organisation. Sites and instruments hang on it.",
    add: { href: "/customers/new", label: "Add a customer" },
  },
};

export function CustomersLedger(props: RecordsLedgerProps<CustomerRow>) {
  return <RecordsLedger list={customers} {...props} />;
}
