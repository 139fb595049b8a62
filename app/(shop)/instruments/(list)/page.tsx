import type { Metadata } from "next";
import { InstrumentsLedger } from "@/components/instruments/instruments-ledger";
import { RecordsPage } from "@/components/records/records-page";
import { may } from "@/lib/auth/access";
import { instrumentListQuery } from "@/lib/instruments/schema";
import { findInstruments } from "@/lib/instruments/service";
import { askedIn } from "@/lib/pages/first-page";
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
  const asked = askedIn(instrumentListQuery, await searchParams, ["archived", "kind"]);
  const first = await findInstruments(actor, asked);
  const { demo, locale, timeZone } = await shopClock(actor);
  const mayAdd = may(actor.role, "instruments.create");
  return (
    <RecordsPage
      title="Instruments"
      subtitle="Every piano the shop looks after, with its readings and its history."
      views={views}
      demo={demo}
      add={mayAdd ? { href: "/instruments/new", label: "New instrument" } : null}
    >
      <InstrumentsLedger
        first={first}
        clock={{ locale, timeZone }}
        mayAdd={mayAdd}
        archive={may(actor.role, "instruments.place") ? archiveInstrumentAction : undefined}
      />
    </RecordsPage>
  );
}
