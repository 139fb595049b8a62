import "server-only";
import { withShop } from "@/db/client";
import { firstRecords } from "@/db/queries/first-records";
import { firstDayWithVisits, visitsBetween } from "@/db/queries/visits";
import type { Actor } from "@/lib/auth/actor";
import { authorise } from "@/lib/auth/authorise";
import { addDays, type Day } from "@/lib/dates";
import { clockWithin } from "@/lib/shop-clock/service";
import { type FirstRecords, firstStep, type VisitState, visitStates } from "../rules";
import type { VisitRow } from "../schema";
import { rowsOf } from "../service";

export type DayVisit = VisitRow & { accessNotes: string | null };

export type WorkDay = {
  day: Day;
  today: Day;
  locale: string;
  demo: boolean;
  /** "own": a technician's; "all": the whole shop's. */
  reach: "own" | "all";
  visits: DayVisit[];
  /** The next day within three weeks that has visits. */
  next: { day: Day; visits: number } | null;
  /** For the whole shop: offers without an answer, and visits of past days still open. */
  unanswered: VisitRow[];
  leftOpen: VisitRow[];
  /** While the book has nothing to visit: what it has so far. */
  beginning: FirstRecords | null;
};

/** A visit that moved on is seen where it went; one declined never was of this day. */
const onTheDay = visitStates.filter((state) => state !== "moved" && state !== "declined");
const toCome: readonly VisitState[] = ["offered", "confirmed", "on-the-way", "in-progress"];
const unfinished: readonly VisitState[] = ["confirmed", "on-the-way", "in-progress", "done"];
const mostOfDay = 300;
const listed = 8;
const lookAhead = 21;

export async function workDay(actor: Actor, asked?: Day): Promise<WorkDay> {
  authorise(actor, "visits.read");
  const own = actor.role === "technician";
  const whose = own ? { technicianId: actor.memberId } : {};
  return withShop(actor, async (tx) => {
    const { today, locale, demo } = await clockWithin(tx, actor.shopId);
    const day = asked ?? today;
    const find = (filter: Parameters<typeof visitsBetween>[2]) =>
      visitsBetween(tx, actor.shopId, { ...whose, ...filter });
    const ofDay = await find({ states: onTheDay, from: day, before: addDays(day, 1), most: mostOfDay });
    const next = await firstDayWithVisits(tx, actor.shopId, {
      ...whose,
      states: toCome,
      from: addDays(day, 1),
      before: addDays(day, 1 + lookAhead),
    });
    const unanswered = own ? [] : await find({ states: ["offered"], from: today, most: listed });
    const leftOpen = await find({ states: unfinished, before: today, most: listed, latestFirst: true });
    const rows = await rowsOf(tx, actor, ofDay);
    const records = ofDay.length === 0 && !next ? await firstRecords(tx, actor.shopId) : null;
    return {
      day,
      today,
      locale,
      demo,
      reach: own ? "own" : "all",
      visits: rows.map((row, index) => ({ ...row, accessNotes: ofDay[index]?.accessNotes ?? null })),
      next,
      unanswered: await rowsOf(tx, actor, unanswered),
      leftOpen: await rowsOf(tx, actor, leftOpen),
      beginning: records && firstStep(records) ? records : null,
    };
  });
}
