import type { Metadata } from "next";
import { CustomersLedger } from "@/components/customers/customers-ledger";
import { listTabs } from "@/components/customers/list-tabs";
import { RecordsPage } from "@/components/records/records-page";
import { Tabs } from "@/components/shell/tabs";
import { may } from "@/lib/auth/access";
import { customerListQuery } from "@/lib/customers/schema";
import { findCustomers } from "@/lib/customers/service";
import { askedIn } from "@/lib/pages/first-page";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { changeCustomerAction } from "../actions";

const views = [
  { href: "/customers", label: "All in use" },
  { href: "/customers?sort=-updated", label: "Changed last" },
  { href: "/customers?archived=only", label: "Archived" },
];

export const metadata: Metadata = { title: "Customers" };

export default async function CustomersPage({ searchParams }: PageProps<"/customers">) {
  const actor = await staffActor();
  const first = await findCustomers(actor, askedIn(customerListQuery, await searchParams, ["archived"]));
  const { demo, locale, timeZone } = await shopClock(actor);
  const mayChange = may(actor.role, "customers.change");
  return (
    <RecordsPage
      title="Customers"
      subtitle="People and organisations whose instruments the shop looks after."
      views={views}
      demo={demo}
      tabs={<Tabs label="Customers and sites" items={listTabs} />}
      add={mayChange ? { href: "/customers/new", label: "New customer" } : null}
    >
      <CustomersLedger
        first={first}
        clock={{ locale, timeZone }}
        mayAdd={mayChange}
        archive={mayChange ? changeCustomerAction : undefined}
      />
    </RecordsPage>
  );
}
