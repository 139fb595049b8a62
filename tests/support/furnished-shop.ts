import { newId } from "@/lib/ids";
import {
  makeCustomer,
  makeInstrument,
  makeShop,
  makeSite,
  makeVisit,
  owner,
  type TestShop,
} from "./factories";

/** A shop with at least one row in every table of the shops, and a second customer beside the first. */
export type FurnishedShop = TestShop & {
  customerId: string;
  neighbourId: string;
  siteId: string;
  neighbourSiteId: string;
  instrumentId: string;
  neighbourInstrumentId: string;
  visitId: string;
  jobId: string;
  neighbourVisitId: string;
  sheetId: string;
  planId: string;
  styleId: string;
  invitationId: string;
};

export async function furnishShop(): Promise<FurnishedShop> {
  const sql = owner();
  const shop = await makeShop();
  const { shopId } = shop;
  const customerId = await makeCustomer(shopId, "Mairead Lynn");
  const neighbourId = await makeCustomer(shopId, "Owen Tark");
  const siteId = await makeSite(shopId, customerId, "Lynn's home");
  const neighbourSiteId = await makeSite(shopId, neighbourId, "Tark's home");
  const instrumentId = await makeInstrument(shopId, { siteId, ownerId: customerId });
  const neighbourInstrumentId = await makeInstrument(shopId, {
    siteId: neighbourSiteId,
    ownerId: neighbourId,
  });
  const { visitId, jobId } = await makeVisit(shopId, {
    siteId,
    instrumentId,
    memberId: shop.technician.memberId,
  });
  const neighbour = await makeVisit(shopId, {
    siteId: neighbourSiteId,
    instrumentId: neighbourInstrumentId,
    memberId: shop.technician.memberId,
    starts: "2026-03-03 09:00",
  });
  await sql`insert into visit_event (shop_id, id, visit_id, to_state, by_member_id)
    values (${shopId}, ${newId()}, ${visitId}, 'confirmed', ${shop.office.memberId})`;
  const styleId = newId();
  await sql`insert into house_style (shop_id, id, name, intervals, smoothness)
    values (${shopId}, ${styleId}, 'Even harbour', ${sql.json([])}, 20)`;
  const invitationId = newId();
  await sql`insert into invitation (shop_id, id, email, role, token_hash, invited_by, expires_at)
    values (${shopId}, ${invitationId}, ${`${invitationId}@example.org`}, 'office', ${invitationId},
      ${shop.owner.memberId}, now() + interval '1 day')`;
  await sql`insert into instrument_string (shop_id, instrument_id, midi, strings, wound)
    values (${shopId}, ${instrumentId}, 69, 3, false)`;
  await sql`insert into service_plan (shop_id, instrument_id, rhythm, every, unit, starts_on)
    values (${shopId}, ${instrumentId}, 'interval', 6, 'month', '2026-01-10')`;
  await sql`insert into site_event (shop_id, id, site_id, day, name)
    values (${shopId}, ${newId()}, ${siteId}, '2026-06-20', 'Summer concert')`;
  const sheetId = newId();
  await sql`insert into reading_sheet (shop_id, id, instrument_id, job_id, stage, taken_at, taken_by, reference_hz)
    values (${shopId}, ${sheetId}, ${instrumentId}, ${jobId}, 'as-found', now(), ${shop.technician.memberId}, 440)`;
  await sql`insert into note_reading (shop_id, id, sheet_id, midi, partials, hz, sigma_cents, f1_hz, fit, fit_version)
    values (${shopId}, ${newId()}, ${sheetId}, 69, '{1}', '{440}', '{null}', 440, ${sql.json({})}, 1)`;
  const planId = newId();
  await sql`insert into stretch_plan (shop_id, id, sheet_id, job_id, style_name, style, temperament, reference_hz,
      first_midi, stretch_cents, band_cents, target_hz, listen_partial, listen_hz, b, ln_b_sigma, computation_version)
    values (${shopId}, ${planId}, ${sheetId}, ${jobId}, 'Even', ${sql.json({})}, ${sql.json("equal")}, 440,
      69, '{0}', '{1}', '{440}', '{1}', '{440}', '{0.0007}', '{0.1}', 1)`;
  return {
    ...shop,
    customerId,
    neighbourId,
    siteId,
    neighbourSiteId,
    instrumentId,
    neighbourInstrumentId,
    visitId,
    jobId,
    neighbourVisitId: neighbour.visitId,
    sheetId,
    planId,
    styleId,
    invitationId,
  };
}
