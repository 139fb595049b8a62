import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { SiteForm } from "@/components/sites/site-form";
import { may } from "@/lib/auth/access";
import { getCustomer } from "@/lib/customers/service";
import { newId } from "@/lib/ids";
import { orNotFound } from "@/lib/pages/or-not-found";
import { staffActor } from "@/lib/pages/page-actor";
import { countryChoices, timeZoneChoices } from "@/lib/shop/choices";
import { shopClock } from "@/lib/shop-clock/service";
import { createSiteAction } from "../actions";

export const metadata: Metadata = { title: "New site" };

/** From a customer's page the customer comes along: ?customer=. */
export default async function NewSitePage({ searchParams }: PageProps<"/sites/new">) {
  const actor = await staffActor();
  if (!may(actor.role, "sites.change")) redirect("/sites");
  const { customer: customerId } = await searchParams;
  const customer =
    typeof customerId === "string" ? await orNotFound(customerId, (id) => getCustomer(actor, id)) : null;
  const { country, timeZone } = await shopClock(actor);
  return (
    <Spread
      left={
        <LeftPage
          crumb={
            customer
              ? [
                  { label: "Customers", href: "/customers" },
                  { label: customer.name, href: `/customers/${customer.id}` },
                ]
              : [{ label: "Sites", href: "/sites" }, { label: "New" }]
          }
          title="New site"
          subtitle={customer ? `Of ${customer.name}` : "An address where instruments stand."}
        />
      }
      right={
        <RightPage>
          <WorkHead title="Where it is" />
          <SiteForm
            action={createSiteAction}
            beginning={{
              id: newId(),
              customer: customer ? { id: customer.id, label: customer.name } : null,
              country,
              timeZone,
            }}
            countries={countryChoices()}
            timeZones={timeZoneChoices()}
          />
        </RightPage>
      }
    />
  );
}
