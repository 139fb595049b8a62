import { sql } from "drizzle-orm";
import type { Handle } from "@/db/client";
import { houseStyle, instrumentString, shop } from "@/db/schema";
import { registerStyles, styleFromRegisters } from "@/lib/acoustics";
import { demoVisits } from "./calendar";
import { harbourStreet, larchAndWren, writeMember, writeShop } from "./people";
import { chance as chanceFrom } from "./random";
import { demoCustomers, type SeedCustomer } from "./scenario";
import { wrongWireKey } from "./story";
import { type PlaceIds, writePlaces } from "./write-places";
import { writeServicePlans } from "./write-service-plans";
import { writeVisits } from "./write-visits";

const years = 3.2;

/**
 * The demo: invented throughout, and the same for the same day. Runs as the owner of the database, inside the
 * caller's transaction, and only on an empty database.
 */
export async function seedDemo(db: Handle, today: string): Promise<boolean> {
  const [existing] = await db.select({ one: sql`1` }).from(shop).limit(1);
  if (existing) return false;
  const begin = new Date(new Date(`${today}T08:00:00Z`).getTime() - years * 365.25 * 86_400_000);
  await seedLarchAndWren(db, today, begin);
  await seedHarbourStreet(db, today, begin);
  return true;
}

const averil = { country: "IE", timeZone: "Europe/Dublin", currency: "EUR", locale: "en-IE" };

async function seedLarchAndWren(db: Handle, today: string, begin: Date): Promise<void> {
  const chance = chanceFrom(48_213);
  const shopId = chance.id(begin);
  const styleId = chance.id(begin);
  await writeShop(db, {
    id: shopId,
    name: "Larch & Wren Piano Service",
    ...averil,
    defaultStyle: styleId,
    demo: true,
    createdAt: begin,
  });
  const evenHarbour = { ...registerStyles.even, smoothness: 30, toleranceCents: 1.5 };
  await db.insert(houseStyle).values({
    shopId,
    id: styleId,
    name: "Even harbour",
    intervals: [...evenHarbour.intervals],
    smoothness: evenHarbour.smoothness,
    toleranceCents: evenHarbour.toleranceCents,
  });

  const members: string[] = [];
  for (const someone of larchAndWren) members.push(await writeMember(db, chance, shopId, someone, begin));
  const [, office = "", ...technicians] = members;

  const customers = demoCustomers();
  const ids = await writePlaces(db, chance, { id: shopId, ...averil }, customers, begin);
  await writeCustomerSignIns(db, chance, shopId, customers, ids, begin);
  await writeTrebleScale(db, shopId, ids);
  await writeVisits(
    db,
    chance,
    { id: shopId, timeZone: averil.timeZone },
    demoVisits(chance, customers, today),
    ids,
    { technicians, office },
    { ref: styleId, name: "Even harbour", style: styleFromRegisters(evenHarbour, 21, 108) },
  );
  await writeServicePlans(db, shopId, customers, ids, technicians, { begin, today });
}

async function writeCustomerSignIns(
  db: Handle,
  chance: ReturnType<typeof chanceFrom>,
  shopId: string,
  customers: readonly SeedCustomer[],
  ids: PlaceIds,
  begin: Date,
): Promise<void> {
  for (const key of ["home-1", "conservatory"]) {
    const owner = customers.find((candidate) => candidate.key === key);
    const customerId = ids.customers.get(key);
    if (!owner?.email || !customerId) throw new Error(`No customer ${key}`);
    const name = owner.contactName ?? owner.name;
    await writeMember(
      db,
      chance,
      shopId,
      { name, email: owner.email, role: "customer", bookable: false, customerId },
      begin,
    );
  }
}

/** Part of the scale of the instrument whose strings were replaced, as its technician measured it. */
async function writeTrebleScale(db: Handle, shopId: string, ids: PlaceIds): Promise<void> {
  const instrumentId = ids.instruments.get("castellan-186");
  if (!instrumentId) throw new Error("No instrument castellan-186");
  await db.insert(instrumentString).values(
    Array.from({ length: 7 }, (_, index) => {
      const midi = wrongWireKey - 3 + index;
      return {
        shopId,
        instrumentId,
        midi,
        strings: 3,
        wound: false,
        speakingLengthMm: Math.round(1520 * 2 ** (-(midi - 60) / 12.6)) / 10 + 95,
        diameterMm: midi === wrongWireKey ? 0.975 : 0.875,
      };
    }),
  );
}

async function seedHarbourStreet(db: Handle, today: string, begin: Date): Promise<void> {
  const chance = chanceFrom(60_317);
  const shopId = chance.id(begin);
  await writeShop(db, { id: shopId, name: "Harbour Street Pianos", ...averil, demo: true, createdAt: begin });
  const owner = harbourStreet[0];
  if (!owner) throw new Error("Harbour Street needs an owner");
  const ownerId = await writeMember(db, chance, shopId, owner, begin);
  const customers = demoCustomers().slice(-6);
  const ids = await writePlaces(db, chance, { id: shopId, ...averil }, customers, begin);
  const visits = demoVisits(chance, demoCustomers(), today)
    .filter(({ customer, state }) => state === "closed" && ids.customers.has(customer.key))
    .map((visit) => ({ ...visit, technician: 0 }));
  await writeVisits(
    db,
    chance,
    { id: shopId, timeZone: averil.timeZone },
    withoutClashes(visits),
    ids,
    { technicians: [ownerId], office: ownerId },
    { ref: "even", name: "Even", style: styleFromRegisters(registerStyles.even, 21, 108) },
  );
}

/** One technician takes what three did: the first at each hour stays. */
function withoutClashes<Visit extends { day: string; startMinute: number }>(
  visits: readonly Visit[],
): Visit[] {
  const taken = new Set<string>();
  return visits.filter(({ day, startMinute }) => {
    const slot = `${day} ${startMinute}`;
    if (taken.has(slot)) return false;
    taken.add(slot);
    return true;
  });
}
