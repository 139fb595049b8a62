import "server-only";
import { type Tx, withShop } from "@/db/client";
import { memberById } from "@/db/queries/people";
import {
  deleteServicePlan,
  insertServicePlan,
  servicePlanOf,
  updateServicePlan,
} from "@/db/queries/service-plans";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { type FieldErrors, invalid, notFound, stale } from "@/lib/errors";
import { readInstrument } from "@/lib/instruments/service";
import { clockWithin } from "@/lib/shop-clock/service";
import { columnsOf, rhythmOf } from "./rhythm-columns";
import type { ServicePlanInput, ServicePlanRecord } from "./schema";

export async function getServicePlan(actor: Actor, instrumentId: string): Promise<ServicePlanRecord | null> {
  authorise(actor, "service-plans.read");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    return readPlan(tx, actor, instrumentId);
  });
}

export async function saveServicePlan(
  actor: Actor,
  instrumentId: string,
  input: ServicePlanInput,
): Promise<ServicePlanRecord> {
  authorise(actor, "service-plans.change");
  return withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    const { today } = await clockWithin(tx, actor.shopId);
    await refuseFaults(tx, actor, input, today);
    const before = await readPlan(tx, actor, instrumentId);
    const { version, rhythm, hours, startsOn, ...fields } = input;
    const columns = {
      ...fields,
      ...columnsOf(rhythm),
      instrumentId,
      startsOn: startsOn ?? before?.startsOn ?? today,
      hoursFrom: hours?.from ?? null,
      hoursUntil: hours?.until ?? null,
      restsUntil: fields.rests ? fields.restsUntil : null,
    };
    const written =
      version === 0
        ? await insertServicePlan(tx, actor.shopId, columns)
        : await updateServicePlan(tx, actor.shopId, { ...columns, version });
    const after = await readPlan(tx, actor, instrumentId);
    if (!written) throw stale("service plan", after);
    if (!after) throw notFound("service plan");
    return after;
  });
}

export async function removeServicePlan(actor: Actor, instrumentId: string, version: number): Promise<void> {
  authorise(actor, "service-plans.change");
  await withShop(actor, async (tx) => {
    await readInstrument(tx, actor, instrumentId);
    if (await deleteServicePlan(tx, actor.shopId, instrumentId, version)) return;
    const now = await readPlan(tx, actor, instrumentId);
    throw now ? stale("service plan", now) : notFound("service plan");
  });
}

async function refuseFaults(tx: Tx, actor: Actor, input: ServicePlanInput, today: string): Promise<void> {
  const faults: FieldErrors = {};
  if (input.servedBefore && input.servedBefore > today) faults.servedBefore = "This day has not come yet.";
  if (input.rests && input.restsUntil && input.restsUntil <= today)
    faults.restsUntil = "Choose a day to come, or leave it open.";
  if (input.technicianId) {
    const technician = await memberById(tx, actor.shopId, input.technicianId);
    if (!technician?.bookable || technician.endedAt)
      faults.technicianId = "Choose somebody of the shop who goes to visits.";
  }
  if (Object.keys(faults).length > 0) throw invalid(faults);
}

async function readPlan(tx: Tx, { shopId }: Actor, instrumentId: string): Promise<ServicePlanRecord | null> {
  const row = await servicePlanOf(tx, shopId, instrumentId);
  if (!row) return null;
  const { rhythm: _, every: _e, unit: _u, months: _m, daysBefore: _d, hoursFrom, hoursUntil, ...plain } = row;
  return {
    ...plain,
    rhythm: rhythmOf(row),
    hours: hoursFrom !== null && hoursUntil !== null ? { from: hoursFrom, until: hoursUntil } : null,
  };
}
