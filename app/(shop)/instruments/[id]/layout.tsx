import type { Metadata } from "next";
import { InstrumentAbout } from "@/components/instruments/instrument-about";
import { InstrumentTabs } from "@/components/instruments/instrument-tabs";
import { RightPage, Spread } from "@/components/shell/spread";
import { getHistory } from "@/lib/instruments/history/service";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { instrumentOf } from "./instrument-of";

type Props = LayoutProps<"/instruments/[id]">;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { name } = await instrumentOf((await params).id);
  return { title: { default: name, template: `%s · ${name} · Agraffe` } };
}

/** The instrument lies open: what it is on the left, one of its tabs on the right. */
export default async function InstrumentLayout({ children, params }: Props) {
  const { id } = await params;
  const instrument = await instrumentOf(id);
  const actor = await staffActor();
  const [history, clock] = await Promise.all([getHistory(actor, id), shopClock(actor)]);
  return (
    <Spread
      left={<InstrumentAbout instrument={instrument} history={history} clock={clock} />}
      right={
        <RightPage>
          <InstrumentTabs id={id} name={instrument.name} />
          {children}
        </RightPage>
      }
    />
  );
}
