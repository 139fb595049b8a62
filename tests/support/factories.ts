import postgres from "postgres";
import type { Role } from "@/lib/auth/access";
import type { Actor } from "@/lib/auth/actor";
import { newId } from "@/lib/ids";

/**
 * Records made as the owner of the tables, for what the services under test take as given. Every test makes
 * a shop of its own, so that tests cannot meet.
 */
let sql: postgres.Sql | undefined;

export function owner(): postgres.Sql {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) throw new Error("TEST_DATABASE_URL is not set");
  sql ??= postgres(url, { max: 2, onnotice: () => {} });
  return sql;
}

export async function closeFactories(): Promise<void> {
  await sql?.end({ timeout: 5 });
  sql = undefined;
}

export type TestShop = {
  shopId: string;
  owner: Actor;
  office: Actor;
  technician: Actor;
  otherTechnician: Actor;
  /** A sign-in for one of the shop's customers. */
  customer: (customerId: string) => Promise<Actor>;
};

export async function makeShop(options: { timeZone?: string; locale?: string } = {}): Promise<TestShop> {
  const shopId = newId();
  const { timeZone = "Europe/Dublin", locale = "en-GB" } = options;
  await owner()`insert into shop (id, name, time_zone, country, currency, locale)
    values (${shopId}, 'Larch and Wren', ${timeZone}, 'IE', 'EUR', ${locale})`;
  return {
    shopId,
    owner: await makeMember(shopId, "owner"),
    office: await makeMember(shopId, "office"),
    technician: await makeMember(shopId, "technician"),
    otherTechnician: await makeMember(shopId, "technician"),
    customer: (customerId) => makeMember(shopId, "customer", customerId),
  };
}

export async function makeMember(
  shopId: string,
  role: Role,
  customerId: string | null = null,
): Promise<Actor> {
  const memberId = newId();
  const personId = newId();
  const name = `${role} ${memberId.slice(-4)}`;
  await owner()`insert into member (shop_id, id, person_id, role, name, email, customer_id, bookable)
    values (${shopId}, ${memberId}, ${personId}, ${role}, ${name}, ${`${memberId}@example.org`}, ${customerId},
      ${role === "technician"})`;
  return {
    personId,
    sessionId: newId(),
    shopId,
    memberId,
    role,
    customerId,
    name,
    shopName: "Larch and Wren",
  };
}

export async function makeCustomer(shopId: string, name = "Mairead Lynn"): Promise<string> {
  const id = newId();
  await owner()`insert into customer (shop_id, id, name) values (${shopId}, ${id}, ${name})`;
  return id;
}

export async function makeSite(
  shopId: string,
  customerId: string,
  name = "Home",
  address: { street?: string; postalCode?: string; city?: string } = {},
): Promise<string> {
  const id = newId();
  await owner()`insert into site (shop_id, id, customer_id, name, street, postal_code, city, country, time_zone)
    values (${shopId}, ${id}, ${customerId}, ${name}, ${address.street ?? ""}, ${address.postalCode ?? ""},
      ${address.city ?? ""}, 'IE', 'Europe/Dublin')`;
  return id;
}

export async function makeInstrument(
  shopId: string,
  place: { siteId: string; ownerId: string; since?: string },
  fields: { maker?: string; model?: string; serial?: string } = {},
): Promise<string> {
  const id = newId();
  await owner()`insert into instrument (shop_id, id, maker, model, serial, kind)
    values (${shopId}, ${id}, ${fields.maker ?? "Castellan"}, ${fields.model ?? "186"}, ${fields.serial ?? ""}, 'grand')`;
  await owner()`insert into instrument_holding (shop_id, id, instrument_id, site_id, owner_id, since)
    values (${shopId}, ${newId()}, ${id}, ${place.siteId}, ${place.ownerId}, ${place.since ?? "2020-01-01"})`;
  return id;
}

/** A visit of one technician with one job. */
export async function makeVisit(
  shopId: string,
  what: { siteId: string; instrumentId: string; memberId: string; starts?: string; state?: string },
): Promise<{ visitId: string; jobId: string }> {
  const visitId = newId();
  const jobId = newId();
  const starts = what.starts ?? "2026-03-02 09:00";
  await owner()`insert into visit (shop_id, id, site_id, customer_id, state, starts_local, ends_local, time_zone)
    select s.shop_id, ${visitId}, s.id, s.customer_id, ${what.state ?? "confirmed"}, ${starts}::text::timestamp,
      ${starts}::text::timestamp + interval '2 hours', 'Europe/Dublin'
    from site s where s.shop_id = ${shopId} and s.id = ${what.siteId}`;
  await owner()`insert into visit_technician (shop_id, visit_id, member_id)
    values (${shopId}, ${visitId}, ${what.memberId})`;
  await owner()`insert into job (shop_id, id, visit_id, instrument_id) values (${shopId}, ${jobId}, ${visitId}, ${what.instrumentId})`;
  return { visitId, jobId };
}
