import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { SiteAbout } from "@/components/sites/site-about";
import { SiteForm } from "@/components/sites/site-form";
import { may } from "@/lib/auth/access";
import { staffActor } from "@/lib/pages/page-actor";
import { countryChoices, timeZoneChoices } from "@/lib/shop/choices";
import { shopClock } from "@/lib/shop-clock/service";
import { changeSiteAction } from "../../actions";
import { siteOf } from "../site-of";

export const metadata: Metadata = { title: "Change a site" };

export default async function EditSitePage({ params }: PageProps<"/sites/[id]/edit">) {
  const site = await siteOf((await params).id);
  const actor = await staffActor();
  if (!may(actor.role, "sites.change")) redirect(`/sites/${site.id}`);
  return (
    <Spread
      left={<SiteAbout site={site} clock={await shopClock(actor)} />}
      right={
        <RightPage>
          <WorkHead title="Change the site" />
          <SiteForm
            action={changeSiteAction}
            record={site}
            countries={countryChoices()}
            timeZones={timeZoneChoices()}
          />
        </RightPage>
      }
    />
  );
}
