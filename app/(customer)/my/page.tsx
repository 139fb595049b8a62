import type { Metadata } from "next";
import { signOutAction } from "@/app/(auth)/sign-out/actions";
import { SignOutButton } from "@/components/people/sign-out-button";
import { CustomerPage } from "@/components/shell/customer-page";
import { LinkButton } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { CustomerInstruments } from "@/components/visits/customer-instruments";
import { CustomerVisits, NextVisit } from "@/components/visits/customer-visits";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { customerActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { isToCome } from "@/lib/visits/rules";
import { visitListQuery } from "@/lib/visits/schema";
import { findVisits } from "@/lib/visits/service";

export const metadata: Metadata = { title: "Your instruments and visits" };

const mostListed = 100;

export default async function OwnPage() {
  const actor = await customerActor();
  const clock = await shopClock(actor);
  const instruments = await findInstruments(actor, instrumentListQuery.parse({ most: mostListed }));
  const { items: coming } = await findVisits(
    actor,
    visitListQuery.parse({ from: clock.today, direction: "asc", most: mostListed }),
  );
  const { items: before } = await findVisits(actor, visitListQuery.parse({ most: mostListed }));
  const ahead = coming.filter(({ state }) => isToCome(state));
  const past = before.filter(({ id, state }) => state !== "moved" && !ahead.some((one) => one.id === id));
  const [next, ...later] = ahead;
  return (
    <CustomerPage shop={{ name: actor.shopName, line: actor.name }}>
      <h1>Your instruments and visits</h1>
      {clock.demo ? <DemoBadge /> : null}
      {next ? (
        <NextVisit visit={next} locale={clock.locale} />
      ) : (
        <p className="mt-6 text-ink-soft">
          No visit is planned. {actor.shopName} will write when the next one is due.
        </p>
      )}
      <CustomerVisits title="After that" visits={later} locale={clock.locale} />
      <CustomerInstruments instruments={instruments.items} shopName={actor.shopName} />
      <CustomerVisits title="Visits until now" visits={past} locale={clock.locale} />
      <div className="mt-10 flex flex-wrap items-center gap-2">
        <LinkButton href="/my/account">Your account</LinkButton>
        <SignOutButton action={signOutAction} />
      </div>
    </CustomerPage>
  );
}
