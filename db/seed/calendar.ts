import type { Chance } from "./random";
import type { SeedCustomer, SeedInstrument } from "./scenario";

export type VisitState =
  | "offered"
  | "confirmed"
  | "on-the-way"
  | "in-progress"
  | "done"
  | "closed"
  | "declined"
  | "cancelled"
  | "missed";

export type SeedVisit = {
  customer: SeedCustomer;
  instruments: SeedInstrument[];
  /** Index of the technician. */
  technician: number;
  day: string;
  startMinute: number;
  minutes: number;
  state: VisitState;
};

const slots = [
  { startMinute: 8 * 60 + 30, minutes: 120 },
  { startMinute: 11 * 60, minutes: 120 },
  { startMinute: 14 * 60, minutes: 120 },
] as const;

const technicians = 3;
const seasons = 6;
const daysBetweenSeasons = 182;
/** Six pianos make a technician's day at the conservatory. */
const mostInstruments = 6;

function shift(day: string, days: number): string {
  const at = new Date(`${day}T12:00:00Z`);
  at.setUTCDate(at.getUTCDate() + days);
  return at.toISOString().slice(0, 10);
}

function isWeekend(day: string): boolean {
  return [0, 6].includes(new Date(`${day}T12:00:00Z`).getUTCDay());
}

/** Takes one place after the other, so that no technician is ever in two. */
function places(firstDay: string) {
  let day = firstDay;
  let next = 0;
  return () => {
    while (isWeekend(day)) day = shift(day, 1);
    const slot = slots[Math.floor(next / technicians) % slots.length] ?? slots[0];
    const place = { day, technician: next % technicians, ...slot };
    next += 1;
    if (next % (technicians * slots.length) === 0) day = shift(day, 1);
    return place;
  };
}

function groups(customer: SeedCustomer): SeedInstrument[][] {
  const all = customer.instruments;
  return Array.from({ length: Math.ceil(all.length / mostInstruments) }, (_, index) =>
    all.slice(index * mostInstruments, (index + 1) * mostInstruments),
  );
}

/** Three years of visits twice a year, today's, and the next fortnight's. */
export function demoVisits(chance: Chance, customers: readonly SeedCustomer[], today: string): SeedVisit[] {
  const past = Array.from({ length: seasons }, (_, index) => seasons - index).flatMap((season) => {
    const take = places(shift(today, -season * daysBetweenSeasons));
    return customers.flatMap((customer) =>
      groups(customer).map(
        (instruments): SeedVisit => ({ customer, instruments, ...take(), state: "closed" }),
      ),
    );
  });
  // The chapel's piano was only looked at, once.
  const kept = past.filter(
    ({ customer }, index) => customer.key !== "chapel" || index >= past.length - past.length / seasons,
  );
  return [...kept, ...todaysVisits(customers, today), ...comingVisits(chance, customers, today)];
}

function byKey(customers: readonly SeedCustomer[], key: string): SeedCustomer {
  const found = customers.find((customer) => customer.key === key);
  if (!found) throw new Error(`No customer ${key}`);
  return found;
}

function todaysVisits(customers: readonly SeedCustomer[], today: string): SeedVisit[] {
  const plan: { key: string; technician: number; slot: number; state: VisitState; count: number }[] = [
    { key: "conservatory", technician: 0, slot: 0, state: "in-progress", count: 1 },
    { key: "home-1", technician: 0, slot: 1, state: "confirmed", count: 9 },
    { key: "hall", technician: 0, slot: 2, state: "confirmed", count: 1 },
    { key: "home-8", technician: 1, slot: 0, state: "done", count: 9 },
    { key: "home-12", technician: 1, slot: 1, state: "on-the-way", count: 9 },
    { key: "church", technician: 2, slot: 1, state: "confirmed", count: 2 },
  ];
  return plan.map(({ key, technician, slot, state, count }) => {
    const customer = byKey(customers, key);
    const time = slots[slot] ?? slots[0];
    return {
      customer,
      instruments: customer.instruments.slice(0, count),
      technician,
      day: today,
      ...time,
      state,
    };
  });
}

function comingVisits(chance: Chance, customers: readonly SeedCustomer[], today: string): SeedVisit[] {
  const take = places(shift(today, 1));
  return customers
    .filter((customer) => customer.kind === "person")
    .slice(14, 38)
    .map((customer, index) => ({
      customer,
      instruments: customer.instruments,
      ...take(),
      state:
        index === 3
          ? "declined"
          : index === 8
            ? "cancelled"
            : chance.uniform() < 0.5
              ? "confirmed"
              : "offered",
    }));
}
