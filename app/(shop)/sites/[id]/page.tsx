import type { Metadata } from "next";
import { SiteEvents } from "@/components/diary/site-events";
import { InstrumentLines } from "@/components/instruments/instrument-lines";
import { ArchiveButton } from "@/components/records/archive-button";
import { NextAction, NextActionStrip } from "@/components/shell/next-action";
import { RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { SiteAbout } from "@/components/sites/site-about";
import { LinkButton } from "@/components/ui/button";
import { may } from "@/lib/auth/access";
import { findSiteEvents } from "@/lib/diary/events/service";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { siteKeys } from "@/lib/sites/keys";
import { addSiteEventAction, changeSiteAction, removeSiteEventAction } from "../actions";
import { siteOf } from "./site-of";

type Props = PageProps<"/sites/[id]">;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: (await siteOf((await params).id)).name };
}

export default async function SitePage({ params }: Props) {
  const site = await siteOf((await params).id);
  const actor = await staffActor();
  const [clock, instruments, events] = await Promise.all([
    shopClock(actor),
    findInstruments(actor, instrumentListQuery.parse({ siteId: site.id, most: 100 })),
    findSiteEvents(actor, site.id),
  ]);
  const count = instruments.items.length;
  const mayAdd = may(actor.role, "instruments.create");
  const add = { href: `/instruments/new?site=${site.id}`, label: "Add an instrument" };
  return (
    <Spread
      left={<SiteAbout site={site} clock={clock} />}
      right={
        <RightPage>
          <WorkHead
            title="Standing here"
            summary={
              count === 1 ? "1 instrument" : `${count}${instruments.next ? " and more" : ""} instruments`
            }
            actions={
              <>
                {may(actor.role, "sites.change") ? (
                  <>
                    <ArchiveButton
                      record={site}
                      action={changeSiteAction}
                      listKey={siteKeys.all}
                      listHref="/sites"
                      words={["site", "sites"]}
                      locale={clock.locale}
                    />
                    <LinkButton href={`/sites/${site.id}/edit`}>Change</LinkButton>
                  </>
                ) : null}
                {may(actor.role, "visits.change") ? (
                  <LinkButton href={`/visits/new?site=${site.id}`}>Book a visit</LinkButton>
                ) : null}
                {mayAdd ? <NextAction {...add} /> : null}
              </>
            }
          />
          <InstrumentLines instruments={instruments.items} clock={clock} showOwner />
          <SiteEvents
            siteId={site.id}
            events={events.items}
            today={clock.today}
            locale={clock.locale}
            {...(may(actor.role, "service-plans.change")
              ? { change: { add: addSiteEventAction, remove: removeSiteEventAction } }
              : {})}
          />
          {mayAdd ? <NextActionStrip {...add} /> : null}
        </RightPage>
      }
    />
  );
}
