import type { Metadata } from "next";
import { CustomersLedger } from "@/components/customers/customers-ledger";
import { listTabs } from "@/components/customers/list-tabs";
import { KeptViews } from "@/components/shell/kept-views";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { Tabs } from "@/components/shell/tabs";
import { LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { may } from "@/lib/auth/access";
import { customerListQuery } from "@/lib/customers/schema";
import { findCustomers } from "@/lib/customers/service";
import { addressQuery } from "@/lib/pages/ledger-request";
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
  const asked = customerListQuery.safeParse(addressQuery(await searchParams, ["archived"]));
  const first = await findCustomers(actor, asked.success ? asked.data : customerListQuery.parse({}));
  const { locale, timeZone, demo } = await shopClock(actor);
  const mayChange = may(actor.role, "customers.change");
  return (
    <Spread
      left={
        <LeftPage
          title="Customers"
          subtitle="People and organisations whose instruments the shop looks after."
          aside={demo ? <DemoBadge /> : null}
          fold="Views"
        >
          <KeptViews views={views} />
        </LeftPage>
      }
      right={
        <RightPage>
          <Tabs label="Customers and sites" items={listTabs} />
          <WorkHead
            title="Customers"
            unseen
            actions={
              mayChange ? (
                <LinkButton kind="primary" href="/customers/new">
                  New customer
                </LinkButton>
              ) : null
            }
          />
          <CustomersLedger
            first={first}
            locale={locale}
            timeZone={timeZone}
            archive={mayChange ? changeCustomerAction : undefined}
          />
        </RightPage>
      }
    />
  );
}
