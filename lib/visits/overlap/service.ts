import "server-only";
import { type Tx, withShop } from "@/db/client";
import { busyOn, overlapping } from "@/db/queries/visit-booking";
import { lockTechnicians } from "@/db/queries/visit-writes";
import type { Actor } from "@/lib/auth/actor";
import { violationOf } from "@/lib/database-errors";
import { AppError, invalid } from "@/lib/errors";
import { minuteOfDay, timeOfMinute } from "@/lib/wall-time";
import { nearestFree } from "../rules";
import type { Overlap } from "../schema";
import { type SiteTime, shownTime } from "../times";

/** Between these, free times are offered; a visit may be booked outside them by hand. */
const hours = { opens: 8 * 60, closes: 19 * 60 };
const offered = 3;

/** A time asked of technicians, by a visit that is not in its own way. */
export type Booking = { visitId: string; technicianIds: readonly string[]; time: SiteTime };

/**
 * Runs a write in one transaction. Where the database refuses it because a technician is taken, the answer
 * names the visit in the way. `asked` is read after the write failed, so the write may still be filling it.
 */
export async function guardOverlap<T>(
  actor: Actor,
  asked: { booking?: Booking },
  write: (tx: Tx) => Promise<T>,
): Promise<T> {
  try {
    return await withShop(actor, write);
  } catch (error) {
    const violation = violationOf(error);
    if (violation?.constraint !== "visit_overlap" || !asked.booking) throw error;
    throw await overlapError(actor, asked.booking);
  }
}

/** Locks those who are to come, or says which of them cannot be booked. Those who are `settled` may stay. */
export async function requireBookable(
  tx: Tx,
  actor: Actor,
  ids: readonly string[],
  settled: readonly string[] = [],
): Promise<void> {
  const accepted = new Set([...settled, ...(await lockTechnicians(tx, actor.shopId, ids))]);
  const faults = Object.fromEntries(
    ids.flatMap((id, index) =>
      accepted.has(id) ? [] : [[`technicianIds.${index}`, "This person cannot be booked in this shop."]],
    ),
  );
  if (Object.keys(faults).length > 0) throw invalid(faults);
}

async function overlapError(actor: Actor, { visitId, technicianIds, time }: Booking): Promise<AppError> {
  const asked = shownTime(time);
  const day = time.startsLocal.slice(0, 10);
  const { other, busy } = await withShop(actor, async (tx) => ({
    other: await overlapping(tx, actor.shopId, {
      technicianIds,
      start: asked.start,
      end: asked.end,
      exceptId: visitId,
    }),
    busy: await busyOn(tx, actor.shopId, {
      technicianIds,
      day,
      timeZone: time.timeZone,
      exceptId: visitId,
    }),
  }));
  if (!other) {
    return new AppError("visit-overlap", "Another visit took this time a moment ago. Try once more.");
  }
  const length = (Date.parse(asked.end) - Date.parse(asked.start)) / 60_000;
  const wanted = minuteOfDay(time.startsLocal);
  const free = nearestFree(busy, { length, wanted, ...hours, most: offered }).map(timeOfMinute);
  const { start, end } = shownTime(other);
  const current: Overlap = {
    visitId: other.visitId,
    siteName: other.siteName,
    start,
    end,
    technicianId: other.technicianId,
    technicianName: other.technicianName,
    free,
  };
  const from = other.startsLocal.slice(11);
  const to = other.endsLocal.slice(11);
  return new AppError(
    "visit-overlap",
    `${other.technicianName} is at ${other.siteName} from ${from} to ${to}. Choose another time or another technician.`,
    { current },
  );
}
