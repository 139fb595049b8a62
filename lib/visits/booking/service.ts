import "server-only";
import { withShop } from "@/db/client";
import { bookableMembers, instrumentsAt } from "@/db/queries/visit-booking";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { type Day, dayOf } from "@/lib/dates";
import { invalid, needsConfirming } from "@/lib/errors";
import { addMinutes, withOffset } from "@/lib/wall-time";
import { pastWords } from "../past";
import { instrumentName } from "../record";
import type { VisitPlan, VisitRecord } from "../schema";
import { bookableSite, createVisit, readVisit } from "../service";
import { siteTime } from "../times";

export type BookingChoices = {
  site: { id: string; name: string; timeZone: string; today: Day };
  instruments: { id: string; name: string; room: string; serial: string }[];
  technicians: { id: string; name: string }[];
};

type Standing = Awaited<ReturnType<typeof instrumentsAt>>[number];

function choice(instrument: Standing) {
  const { id, room, serial } = instrument;
  return { id, name: instrumentName(instrument), room, serial };
}

/** What a visit at this site can be made of. */
export async function bookingChoices(actor: Actor, siteId: string): Promise<BookingChoices> {
  authorise(actor, "visits.change");
  return withShop(actor, async (tx) => {
    const { id, name, timeZone } = await bookableSite(tx, actor, siteId);
    const instruments = await instrumentsAt(tx, actor.shopId, siteId);
    return {
      site: { id, name, timeZone, today: dayOf(new Date(), timeZone) },
      instruments: instruments.map(choice),
      technicians: await bookableMembers(tx, actor.shopId),
    };
  });
}

/** What a visit can still be made of: what is on it already, and what stands at the site today. */
export async function correctionChoices(actor: Actor, id: string) {
  authorise(actor, "visits.change");
  return withShop(actor, async (tx) => {
    const visit = await readVisit(tx, actor, id);
    const there = await instrumentsAt(tx, actor.shopId, visit.site.id);
    const bookable = await bookableMembers(tx, actor.shopId);
    const onIt = visit.jobs.map((job) => ({
      id: job.instrumentId,
      name: job.instrument,
      room: job.room,
      serial: "",
    }));
    return {
      visit,
      instruments: [
        ...there.map(choice),
        ...onIt.filter((one) => !there.some((other) => other.id === one.id)),
      ],
      technicians: [
        ...bookable,
        ...visit.technicians.filter((one) => !bookable.some((other) => other.id === one.id)),
      ],
    };
  });
}

export async function bookableTechnicians(actor: Actor): Promise<{ id: string; name: string }[]> {
  authorise(actor, "visits.read");
  return withShop(actor, (tx) => bookableMembers(tx, actor.shopId));
}

/** Books are sometimes brought up to date, so a start in the past is asked about once and then taken. */
export function askAboutPast(start: string, timeZone: string, confirm: boolean | undefined): void {
  const words = confirm ? null : pastWords(start, { now: new Date().toISOString(), timeZone });
  if (words) throw needsConfirming(words, {});
}

/** Books by the site's wall clock. Where a time occurs twice, the first is meant; the API can say the second. */
export async function planVisit(actor: Actor, plan: VisitPlan): Promise<VisitRecord> {
  authorise(actor, "visits.change");
  const { date, time, minutes, confirm, ...fields } = plan;
  const { timeZone } = await withShop(actor, (tx) => bookableSite(tx, actor, plan.siteId));
  const wall = `${date}T${time}`;
  const start = withOffset(wall, timeZone, 0);
  const end = withOffset(addMinutes(wall, minutes), timeZone, 0);
  const read = siteTime({ start, end }, timeZone);
  if ("faults" in read) {
    throw invalid({
      ...(read.faults.start ? { time: read.faults.start } : {}),
      ...(read.faults.end ? { minutes: read.faults.end } : {}),
    });
  }
  askAboutPast(start, timeZone, confirm);
  return createVisit(actor, { ...fields, start, end });
}
