import type { Handle } from "@/db/client";
import { servicePlan, siteEvent } from "@/db/schema";
import { addDays, type Day } from "@/lib/dates";
import { chance as chanceFrom } from "./random";
import type { SeedCustomer } from "./scenario";
import type { PlaceIds } from "./write-places";

type Rhythm = Pick<typeof servicePlan.$inferInsert, "rhythm" | "every" | "unit" | "months" | "daysBefore">;

const halfYearly: Rhythm = { rhythm: "interval", every: 6, unit: "month" };
const yearly: Rhythm = { rhythm: "interval", every: 12, unit: "month" };
const springAndAutumn: Rhythm = { rhythm: "months", months: [4, 10] };
const beforeConcerts: Rhythm = { rhythm: "events", daysBefore: 2 };

const concerts = [
  { inDays: 9, name: "Chamber players" },
  { inDays: 31, name: "New year's concert" },
  { inDays: 58, name: "Song recital" },
];

/** When each instrument is to be served, and what the hall plays. Has a chance of its own, so that nothing else of the demo moves. */
export async function writeServicePlans(
  db: Handle,
  shopId: string,
  customers: readonly SeedCustomer[],
  ids: PlaceIds,
  technicians: readonly string[],
  { begin, today }: { begin: Date; today: Day },
): Promise<void> {
  const chance = chanceFrom(27_500);
  const startsOn = begin.toISOString().slice(0, 10);
  const rhythmOf = ({ key, kind }: SeedCustomer): Rhythm => {
    if (key === "hall") return beforeConcerts;
    if (key === "chapel") return yearly;
    if (key === "church") return springAndAutumn;
    return kind === "person" && chance.uniform() < 0.25 ? yearly : halfYearly;
  };
  const rows = customers.flatMap((customer, index) => {
    const rhythm = rhythmOf(customer);
    const resting = customer.kind === "person" && index % 23 === 11;
    const technicianId = chance.uniform() < 0.6 ? (technicians[index % technicians.length] ?? null) : null;
    return customer.instruments.map(({ key }) => ({
      ...rhythm,
      shopId,
      instrumentId: ids.instruments.get(key) ?? "",
      startsOn,
      rests: resting,
      restsUntil: resting && index % 2 === 0 ? addDays(today, 120) : null,
      technicianId,
      workMinutes: customer.key === "hall" ? 120 : 90,
      createdAt: begin,
      updatedAt: begin,
    }));
  });
  await db.insert(servicePlan).values(rows);
  const hall = ids.sites.get("hall");
  if (!hall) return;
  await db.insert(siteEvent).values(
    concerts.map(({ inDays, name }) => ({
      shopId,
      id: chance.id(begin),
      siteId: hall,
      day: addDays(today, inDays),
      name,
      createdAt: begin,
      updatedAt: begin,
    })),
  );
}
