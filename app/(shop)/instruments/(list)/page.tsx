import type { Metadata } from "next";
import { InstrumentsLedger } from "@/components/instruments/instruments-ledger";
import { KeptViews } from "@/components/shell/kept-views";
import { LeftPage, RightPage, Spread, WorkHead } from "@/components/shell/spread";
import { LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { may } from "@/lib/auth/access";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { addressQuery } from "@/lib/pages/ledger-request";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { archiveInstrumentAction } from "../actions";

const views = [
  { href: "/instruments", label: "All in use" },
  { href: "/instruments?kind=grand", label: "Grands" },
  { href: "/instruments?kind=upright", label: "Uprights" },
  { href: "/instruments?sort=place", label: "By place" },
  { href: "/instruments?sort=-updated", label: "Changed last" },
  { href: "/instruments?archived=only", label: "Archived" },
];

export const metadata: Metadata = { title: "Instruments" };

export default async function InstrumentsPage({ searchParams }: PageProps<"/instruments">) {
  const actor = await staffActor();
  const asked = instrumentListQuery.safeParse(addressQuery(await searchParams, ["archived", "kind"]));
  const first = await findInstruments(actor, asked.success ? asked.data : instrumentListQuery.parse({}));
  const { locale, timeZone, demo } = await shopClock(actor);
  const mayAdd = may(actor.role, "instruments.create");
  return (
    <Spread
      left={
        <LeftPage
          title="Instruments"
          subtitle="Every piano the shop looks after, with its readings and its history."
          aside={demo ? <DemoBadge /> : null}
          fold="Views"
        >
          <KeptViews views={views} />
        </LeftPage>
      }
      right={
        <RightPage>
          <WorkHead
            title="Instruments"
            unseen
            actions={
              mayAdd ? (
                <LinkButton kind="primary" href="/instruments/new">
                  New instrument
                </LinkButton>
              ) : null
            }
          />
          <InstrumentsLedger
            first={first}
            locale={locale}
            timeZone={timeZone}
            mayAdd={mayAdd}
            archive={may(actor.role, "instruments.place") ? archiveInstrumentAction : undefined}
          />
        </RightPage>
      }
    />
  );
}
