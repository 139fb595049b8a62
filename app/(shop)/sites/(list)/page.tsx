import type { Metadata } from "next";
import { listTabs } from "@/components/customers/list-tabs";
import { KeptViews } from "@/components/shell/kept-views";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { Tabs } from "@/components/shell/tabs";
import { SitesLedger } from "@/components/sites/sites-ledger";
import { LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { may } from "@/lib/auth/access";
import { addressQuery } from "@/lib/pages/ledger-request";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { siteListQuery } from "@/lib/sites/schema";
import { findSites } from "@/lib/sites/service";
import { changeSiteAction } from "../actions";

const views = [
  { href: "/sites", label: "All in use" },
  { href: "/sites?sort=city", label: "By town" },
  { href: "/sites?sort=-updated", label: "Changed last" },
  { href: "/sites?archived=only", label: "Archived" },
];

export const metadata: Metadata = { title: "Sites" };

export default async function SitesPage({ searchParams }: PageProps<"/sites">) {
  const actor = await staffActor();
  const asked = siteListQuery.safeParse(addressQuery(await searchParams, ["archived"]));
  const first = await findSites(actor, asked.success ? asked.data : siteListQuery.parse({}));
  const { locale, timeZone, demo } = await shopClock(actor);
  const mayChange = may(actor.role, "sites.change");
  return (
    <Spread
      left={
        <LeftPage
          title="Sites"
          subtitle="Addresses with instruments: homes, schools, halls, churches."
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
            title="Sites"
            unseen
            actions={
              mayChange ? (
                <LinkButton kind="primary" href="/sites/new">
                  New site
                </LinkButton>
              ) : null
            }
          />
          <SitesLedger
            first={first}
            locale={locale}
            timeZone={timeZone}
            archive={mayChange ? changeSiteAction : undefined}
          />
        </RightPage>
      }
    />
  );
}
