import type { Metadata } from "next";
import { KeptViews } from "@/components/shell/kept-views";
import { LeftPage, RightPage, Spread } from "@/components/shell/spread";
import { DemoBadge } from "@/components/ui/demo-badge";
import { readSpan } from "@/components/visits/visit-span";
import { VisitsLedger } from "@/components/visits/visits-ledger";
import { may } from "@/lib/auth/access";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { bookableTechnicians } from "@/lib/visits/booking/service";
import { visitListQuery } from "@/lib/visits/schema";
import { findVisits } from "@/lib/visits/service";

const views = [
  { href: "/visits", label: "From today on" },
  { href: "/visits?state=offered", label: "Offered" },
  { href: "/visits?state=confirmed", label: "Confirmed" },
  { href: "/visits?state=done", label: "Done, not closed" },
  { href: "/visits?state=cancelled", label: "Cancelled" },
];

export const metadata: Metadata = { title: "Visits" };

export default async function VisitsPage({ searchParams }: PageProps<"/visits">) {
  const actor = await staffActor();
  const params = oneOfEach(await searchParams);
  const { today, locale, demo } = await shopClock(actor);
  const { from, to, latestFirst } = readSpan(params, today);
  const sort = params.get("sort");
  const descending = sort === "start" || sort === "-start" ? sort === "-start" : latestFirst;
  // An address somebody typed may hold anything; what is no filter is left out, as the ledger itself does.
  const asked = visitListQuery.safeParse({
    from,
    to,
    direction: descending ? "desc" : "asc",
    state: params.get("state") ?? undefined,
    technicianId: params.get("technician") ?? undefined,
  });
  const first = await findVisits(actor, asked.success ? asked.data : visitListQuery.parse({ from, to }));
  const technicians = await bookableTechnicians(actor);
  return (
    <Spread
      left={
        <LeftPage
          title="Visits"
          subtitle="Every appointment, from offered to closed."
          aside={demo ? <DemoBadge /> : null}
          fold="Views"
        >
          <KeptViews views={views} />
        </LeftPage>
      }
      right={
        <RightPage>
          <VisitsLedger
            today={today}
            locale={locale}
            technicians={technicians}
            first={first}
            mayBook={may(actor.role, "visits.change")}
          />
        </RightPage>
      }
    />
  );
}

function oneOfEach(params: Record<string, string | string[] | undefined>): URLSearchParams {
  return new URLSearchParams(
    Object.entries(params).flatMap(([name, value]) =>
      typeof value === "string" ? [[name, value] as [string, string]] : [],
    ),
  );
}
