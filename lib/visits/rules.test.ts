import * as fc from "fast-check";
import { describe, expect, test } from "vitest";
import { roles } from "@/lib/auth/access";
import {
  cameFrom,
  inHand,
  isLive,
  isOver,
  mayCorrect,
  movesOf,
  moveTo,
  nearestFree,
  type VisitState,
  visitStates,
} from "./rules";

/** Every allowed move, written out a second time: forward ones, and (back) ones with the state they return to. */
const allowed: Record<VisitState, string> = {
  offered: "confirmed declined moved cancelled",
  confirmed: "on-the-way in-progress moved cancelled missed (offered)",
  "on-the-way": "in-progress moved cancelled missed (confirmed)",
  "in-progress": "done (confirmed) (on-the-way)",
  done: "closed (in-progress)",
  closed: "(done)",
  declined: "(offered)",
  moved: "",
  cancelled: "(offered) (confirmed) (on-the-way)",
  missed: "(confirmed) (on-the-way)",
};

describe("the life of a visit", () => {
  test("every pair of states, whatever came before: only the moves of the table", () => {
    for (const from of visitStates) {
      for (const before of [null, ...visitStates]) {
        for (const to of visitStates) {
          const words = allowed[from].split(" ");
          const forward = words.includes(to);
          const back = before === to && words.includes(`(${to})`);
          expect(Boolean(moveTo("office", from, to, before)), `${before} > ${from} > ${to}`).toBe(
            forward || back,
          );
        }
      }
    }
  });

  test("going back leads only to where the visit came from", () => {
    expect(moveTo("office", "cancelled", "confirmed", "offered")).toBeUndefined();
    expect(moveTo("office", "cancelled", "offered", "offered")?.back).toBe(true);
  });

  test("a moved visit cannot be brought back: its time belongs to the successor", () => {
    for (const before of visitStates) expect(movesOf("owner", "moved", before)).toEqual([]);
  });

  test("a reason is asked exactly where the customer was let down or changed their mind", () => {
    for (const from of visitStates) {
      for (const move of movesOf("owner", from, null)) {
        expect(move.asksReason, move.to).toBe(["declined", "moved", "cancelled", "missed"].includes(move.to));
      }
    }
  });

  test("a technician does all but reopen a closed visit; a customer does nothing here", () => {
    for (const state of visitStates) {
      for (const before of [null, ...visitStates]) {
        const office = movesOf("office", state, before);
        expect(movesOf("owner", state, before)).toEqual(office);
        expect(movesOf("technician", state, before)).toEqual(state === "closed" ? [] : office);
        expect(movesOf("customer", state, before)).toEqual([]);
      }
    }
    expect(roles).toHaveLength(4);
  });

  test("where a visit came from is read past its corrections", () => {
    const history = [
      { from: null, to: "offered" },
      { from: "offered", to: "confirmed" },
      { from: "confirmed", to: "on-the-way" },
      { from: "on-the-way", to: "confirmed" },
    ] as const;
    expect(cameFrom("confirmed", history)).toBe("offered");
    expect(cameFrom("on-the-way", history)).toBe("confirmed");
    expect(cameFrom("offered", history)).toBeNull();
  });

  test("what can be corrected narrows as the visit goes on", () => {
    expect(visitStates.filter((state) => mayCorrect(state, "time"))).toEqual(["offered", "confirmed"]);
    expect(visitStates.filter((state) => mayCorrect(state, "work"))).toEqual(
      visitStates.filter((state) => !isOver(state)),
    );
    expect(visitStates.filter((state) => !isLive(state))).toEqual([
      "declined",
      "moved",
      "cancelled",
      "missed",
    ]);
  });
});

describe("free times near a refused one", () => {
  const hours = { opens: 480, closes: 1140, most: 3 };

  test("the gap right after the clash comes first, and touching ends are free", () => {
    const free = nearestFree([{ start: 600, end: 690 }], { length: 60, wanted: 660, ...hours });
    expect(free[0]).toBe(690);
    expect(free).toHaveLength(3);
  });

  test("a full day offers nothing", () => {
    expect(nearestFree([{ start: 0, end: 1440 }], { length: 30, wanted: 600, ...hours })).toEqual([]);
    expect(nearestFree([], { length: 700, wanted: 600, ...hours })).toEqual([]);
  });

  test("never offers a time that would clash or leave the hours, and finds one wherever one exists", () => {
    const busyDay = fc.array(
      fc.record({ start: fc.integer({ min: 0, max: 1400 }), length: fc.integer({ min: 5, max: 300 }) }),
      { maxLength: 8 },
    );
    fc.assert(
      fc.property(
        busyDay,
        fc.integer({ min: 15, max: 240 }),
        fc.integer({ min: 0, max: 1439 }),
        (day, length, wanted) => {
          const busy = day.map(({ start, length: busyFor }) => ({ start, end: start + busyFor }));
          const fits = (start: number) =>
            start >= hours.opens &&
            start + length <= hours.closes &&
            busy.every(({ start: from, end }) => start >= end || start + length <= from);
          const free = nearestFree(busy, { length, wanted, ...hours });
          expect(free.every(fits)).toBe(true);
          const anyMinute = Array.from({ length: 1440 }, (_, start) => start).some(fits);
          expect(free.length > 0).toBe(anyMinute);
        },
      ),
      { seed: 7, numRuns: 200 },
    );
  });
});

describe("the visit in hand", () => {
  const visit = (id: string, state: VisitState, start: number) => ({
    id,
    state,
    start: `2026-05-14T${String(start).padStart(2, "0")}:00:00+02:00`,
    end: `2026-05-14T${String(start + 1).padStart(2, "0")}:00:00+02:00`,
  });
  const noon = "2026-05-14T10:00:00Z";

  test("what is under way goes before what the clock says", () => {
    const day = [visit("a", "closed", 8), visit("b", "in-progress", 9), visit("c", "confirmed", 14)];
    expect(inHand(day, noon)?.id).toBe("b");
  });

  test("else the next one not over; cancelled ones never", () => {
    const day = [visit("a", "closed", 8), visit("b", "cancelled", 13), visit("c", "confirmed", 14)];
    expect(inHand(day, noon)?.id).toBe("c");
  });

  test("at the end of the day, the one done and not yet closed", () => {
    expect(inHand([visit("a", "done", 8), visit("b", "closed", 9)], noon)?.id).toBe("a");
    expect(inHand([visit("b", "closed", 9)], noon)).toBeUndefined();
  });
});
