import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { NewInstrumentForm } from "@/components/instruments/new-instrument-form";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { may } from "@/lib/auth/access";
import { getCustomer } from "@/lib/customers/service";
import { newId } from "@/lib/ids";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { siteListQuery } from "@/lib/sites/schema";
import { findSites, getSite } from "@/lib/sites/service";
import { createInstrumentAction } from "../actions";

export const metadata: Metadata = { title: "New instrument" };

/** From a site's or a customer's page the place comes along: ?site= or ?customer=. */
export default async function NewInstrumentPage({ searchParams }: PageProps<"/instruments/new">) {
  const actor = await staffActor();
  if (!may(actor.role, "instruments.create")) redirect("/instruments");
  const { site: siteId, customer: customerId } = await searchParams;
  const [clock, place] = await Promise.all([
    shopClock(actor),
    typeof siteId === "string"
      ? orNotFound(siteId, (id) => getSite(actor, id))
      : typeof customerId === "string"
        ? onlySiteOf(customerId)
        : null,
  ]);
  const owner =
    typeof customerId === "string" ? await orNotFound(customerId, (id) => getCustomer(actor, id)) : null;
  const back = place ? `/sites/${place.id}` : owner ? `/customers/${owner.id}` : "/instruments";
  return (
    <Spread
      left={
        <LeftPage
          crumb={[{ label: "Instruments", href: "/instruments" }, { label: "New" }]}
          title="New instrument"
          subtitle={place ? `At ${place.name}` : "At the site where it stands."}
        />
      }
      right={
        <RightPage>
          <WorkHead title="Where it stands and what it is" />
          <NewInstrumentForm
            action={createInstrumentAction}
            newId={newId()}
            today={clock.today}
            referenceHz={clock.referenceHz}
            site={place ? { id: place.id, label: place.name } : null}
            owner={owner ? { id: owner.id, label: owner.name } : null}
            back={back}
          />
        </RightPage>
      }
    />
  );

  /** With one site there is nothing to choose. */
  async function onlySiteOf(id: string) {
    const sites = await findSites(actor, siteListQuery.parse({ customerId: id, most: 2 }));
    return sites.items.length === 1 ? (sites.items[0] ?? null) : null;
  }
}
