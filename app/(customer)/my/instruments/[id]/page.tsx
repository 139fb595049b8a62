import type { Metadata } from "next";
import { cache } from "react";
import { OwnHistory } from "@/components/instruments/own-history";
import { CustomerPage } from "@/components/shell/customer-page";
import { AppLink } from "@/components/ui/app-link";
import { DemoBadge } from "@/components/ui/demo-badge";
import { NextVisit } from "@/components/visits/customer-visits";
import { getHistory } from "@/lib/instruments/history/service";
import { kindLabels } from "@/lib/instruments/rules";
import { getInstrument } from "@/lib/instruments/service";
import { orNotFound } from "@/lib/pages/or-not-found";
import { customerActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { isToCome } from "@/lib/visits/rules";
import { visitListQuery } from "@/lib/visits/schema";
import { findVisits } from "@/lib/visits/service";

type Props = PageProps<"/my/instruments/[id]">;

const ownInstrument = cache(async (id: string) => {
  const actor = await customerActor();
  return orNotFound(id, (known) => getInstrument(actor, known));
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  return { title: (await ownInstrument((await params).id)).name };
}

/** One of a customer's own instruments: when somebody comes next, and what was found and done so far. */
export default async function OwnInstrumentPage({ params }: Props) {
  const instrument = await ownInstrument((await params).id);
  const actor = await customerActor();
  const clock = await shopClock(actor);
  const [history, { items: coming }] = await Promise.all([
    getHistory(actor, instrument.id),
    findVisits(
      actor,
      visitListQuery.parse({ instrumentId: instrument.id, from: clock.today, direction: "asc" }),
    ),
  ]);
  const next = coming.find(({ state }) => isToCome(state));
  const { kind, year, serial, place, room } = instrument;
  return (
    <CustomerPage shop={{ name: actor.shopName, line: actor.name }}>
      <h1>{instrument.name}</h1>
      <p className="text-ink-soft">
        {[
          kindLabels[kind],
          year ? `made in ${year}` : "",
          serial ? `no. ${serial}` : "",
          place?.siteName ?? "",
          room,
        ]
          .filter(Boolean)
          .join(", ")}
      </p>
      {clock.demo ? (
        <p className="mt-2">
          <DemoBadge />
        </p>
      ) : null}
      {next ? <NextVisit visit={next} locale={clock.locale} /> : null}
      <OwnHistory history={history} locale={clock.locale} shopName={actor.shopName} />
      <p className="mt-9">
        <AppLink href="/my" className="link inline-flex min-h-11 items-center">
          Back to your instruments and visits
        </AppLink>
      </p>
    </CustomerPage>
  );
}
