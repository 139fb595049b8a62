import type { Metadata } from "next";
import { listTabs } from "@/components/customers/list-tabs";
import { RecordsPage } from "@/components/records/records-page";
import { Tabs } from "@/components/shell/tabs";
import { SitesLedger } from "@/components/sites/sites-ledger";
import { may } from "@/lib/auth/access";
import { askedIn } from "@/lib/pages/first-page";
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
  const first = await findSites(actor, askedIn(siteListQuery, await searchParams, ["archived"]));
  const { demo, locale, timeZone } = await shopClock(actor);
  const mayChange = may(actor.role, "sites.change");
  return (
    <RecordsPage
      title="Sites"
      subtitle="Addresses with instruments: homes, schools, halls, churches."
      views={views}
      demo={demo}
      tabs={<Tabs label="Customers and sites" items={listTabs} />}
      add={mayChange ? { href: "/sites/new", label: "New site" } : null}
    >
      <SitesLedger
        first={first}
        clock={{ locale, timeZone }}
        // What an empty list leads to, the customers, is everybody's to see.
        mayAdd
        archive={mayChange ? changeSiteAction : undefined}
      />
    </RecordsPage>
  );
}
