import type { Handle } from "@/db/client";
import { customer, instrument, instrumentHolding, site } from "@/db/schema";
import type { Chance } from "./random";
import type { SeedCustomer } from "./scenario";

export type PlaceIds = {
  customers: Map<string, string>;
  sites: Map<string, string>;
  instruments: Map<string, string>;
};

/** Customers with their sites, instruments and where each stands since `since`. */
export async function writePlaces(
  db: Handle,
  chance: Chance,
  shop: { id: string; country: string; timeZone: string },
  customers: readonly SeedCustomer[],
  since: Date,
): Promise<PlaceIds> {
  const shopId = shop.id;
  const stamps = { createdAt: since, updatedAt: since };
  const ids: PlaceIds = { customers: new Map(), sites: new Map(), instruments: new Map() };
  for (const { key, instruments } of customers) {
    ids.customers.set(key, chance.id(since));
    ids.sites.set(key, chance.id(since));
    for (const { key: name } of instruments) ids.instruments.set(name, chance.id(since));
  }
  const idOf = (map: Map<string, string>, key: string) => {
    const id = map.get(key);
    if (!id) throw new Error(`No id for ${key}`);
    return id;
  };

  await db.insert(customer).values(
    customers.map(({ key, kind, name, contactName, email, phone }) => ({
      shopId,
      id: idOf(ids.customers, key),
      kind,
      name,
      contactName,
      email,
      phone,
      ...stamps,
    })),
  );
  await db.insert(site).values(
    customers.map((owner) => ({
      shopId,
      id: idOf(ids.sites, owner.key),
      customerId: idOf(ids.customers, owner.key),
      country: shop.country,
      timeZone: shop.timeZone,
      ...owner.site,
      ...stamps,
    })),
  );
  const all = customers.flatMap((owner) => owner.instruments.map((piano) => ({ owner, piano })));
  await db.insert(instrument).values(
    all.map(({ piano }) => ({
      shopId,
      id: idOf(ids.instruments, piano.key),
      maker: piano.maker,
      model: piano.model,
      serial: piano.serial,
      year: piano.year,
      kind: piano.kind,
      room: piano.room,
      firstMidi: piano.firstMidi,
      lastMidi: piano.lastMidi,
      breakMidi: piano.breakMidi,
      standingNote: piano.standingNote,
      ...stamps,
    })),
  );
  await db.insert(instrumentHolding).values(
    all.map(({ owner, piano }) => ({
      shopId,
      id: chance.id(since),
      instrumentId: idOf(ids.instruments, piano.key),
      siteId: idOf(ids.sites, owner.key),
      ownerId: idOf(ids.customers, owner.key),
      since: since.toISOString().slice(0, 10),
      ...stamps,
    })),
  );
  return ids;
}
