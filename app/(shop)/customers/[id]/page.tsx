import type { Metadata } from "next";
import { CustomerAbout } from "@/components/customers/customer-about";
import { SiteLines } from "@/components/customers/site-lines";
import { InstrumentLines } from "@/components/instruments/instrument-lines";
import { ArchiveButton } from "@/components/records/archive-button";
import { NextAction, NextActionStrip } from "@/components/shell/next-action";
import { PageSection } from "@/components/shell/page-section";
import { RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { LinkButton } from "@/components/ui/button";
import { may } from "@/lib/auth/access";
import { customerKeys } from "@/lib/customers/keys";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { siteListQuery } from "@/lib/sites/schema";
import { findSites } from "@/lib/sites/service";
import { changeCustomerAction } from "../actions";
import { customerOf } from "./customer-of";

type Props = PageProps<"/customers/[id]">;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: (await customerOf((await params).id)).name };
}

export default async function CustomerPage({ params }: Props) {
  const customer = await customerOf((await params).id);
  const actor = await staffActor();
  const [clock, sites, instruments] = await Promise.all([
    shopClock(actor),
    findSites(actor, siteListQuery.parse({ customerId: customer.id, most: 100 })),
    findInstruments(actor, instrumentListQuery.parse({ ownerId: customer.id, sort: "place", most: 100 })),
  ]);
  const mayChange = may(actor.role, "customers.change");
  const add = { href: `/sites/new?customer=${customer.id}`, label: "Add a site" };
  const mayAdd = may(actor.role, "instruments.create");
  return (
    <Spread
      left={<CustomerAbout customer={customer} clock={clock} />}
      right={
        <RightPage>
          <WorkHead
            title="Sites and instruments"
            actions={
              mayChange ? (
                <>
                  <ArchiveButton
                    record={customer}
                    action={changeCustomerAction}
                    listKey={customerKeys.all}
                    listHref="/customers"
                    words={["customer", "customers"]}
                    locale={clock.locale}
                  />
                  <LinkButton href={`/customers/${customer.id}/edit`}>Change</LinkButton>
                  <NextAction {...add} />
                </>
              ) : null
            }
          />
          <div className="grid gap-8">
            <PageSection title="Sites" aside={sites.next ? "the first 100" : undefined}>
              <SiteLines
                sites={sites.items}
                empty="No address yet. Instruments stand at sites: add one first."
              />
            </PageSection>
            <PageSection title="Instruments" aside={instruments.next ? "the first 100" : undefined}>
              <InstrumentLines instruments={instruments.items} clock={clock} showPlace />
              {mayAdd && sites.items.length > 0 ? (
                <LinkButton className="mt-3" href={`/instruments/new?customer=${customer.id}`}>
                  Add an instrument
                </LinkButton>
              ) : null}
            </PageSection>
          </div>
          {mayChange ? <NextActionStrip {...add} /> : null}
        </RightPage>
      }
    />
  );
}
