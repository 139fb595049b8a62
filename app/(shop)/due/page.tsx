import type { Metadata } from "next";
import { DueLedger } from "@/components/diary/due-ledger";
import { RecordsPage } from "@/components/records/records-page";
import { may } from "@/lib/auth/access";
import { dueQuery } from "@/lib/diary/due/schema";
import { findDue } from "@/lib/diary/due/service";
import { askedIn } from "@/lib/pages/first-page";
import { staffActor } from "@/lib/pages/page-actor";
import { shopClock } from "@/lib/shop-clock/service";
import { bookableTechnicians } from "@/lib/visits/booking/service";

export const metadata: Metadata = { title: "Due" };

export default async function DuePage({ searchParams }: PageProps<"/due">) {
  const actor = await staffActor();
  const asked = askedIn(dueQuery, await searchParams, ["kind", "technicianId", "state"]);
  const [first, technicians, { today, locale, demo }] = await Promise.all([
    findDue(actor, asked),
    bookableTechnicians(actor),
    shopClock(actor),
  ]);
  const { counts } = first;
  const views = [
    { href: "/due", label: `To book, ${counts.due + counts.overdue}` },
    { href: "/due?state=overdue", label: `Overdue, ${counts.overdue}` },
    { href: "/due?state=booked", label: `Booked, ${counts.booked}` },
    { href: "/due?state=declined", label: `Declined, ${counts.declined}` },
    { href: "/due?state=resting", label: `Resting, ${counts.resting}` },
    { href: "/due?state=any", label: "Every service plan" },
  ];
  return (
    <RecordsPage
      title="Due"
      subtitle="Instruments whose next visit is near, by their service plans. A line opens its booking."
      views={views}
      demo={demo}
      add={null}
    >
      <DueLedger
        first={first}
        today={today}
        locale={locale}
        technicians={technicians}
        mayBook={may(actor.role, "visits.change")}
      />
    </RecordsPage>
  );
}
