import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays } from "@/lib/dates";
import { type OpenDay, suggestTimes, type Wanted } from "./rules";

/** A minute a hundredth of a degree, so that figures can be followed by eye. */
const travel = (from: { longitude: number }, to: { longitude: number }) =>
  Math.round(100 * Math.abs(from.longitude - to.longitude));
const at = (minutes: number) => ({ latitude: 52, longitude: minutes / 100 });

const nineToFive = [{ from: 540, until: 1020 }];
const open: OpenDay = { memberId: "ines", day: "2026-05-12", hours: nineToFive, taken: [], base: at(0) };
const wanted: Wanted = {
  length: 90,
  position: at(10),
  due: null,
  technicianId: null,
  wish: { weekdays: [], hours: null },
};

describe("suggested times", () => {
  it("fill an empty day from its first to its last moment", () => {
    expect(suggestTimes([open], wanted, travel)).toMatchObject([
      { from: 540, until: 630, addedTravel: 20 },
      { from: 930, until: 1020, addedTravel: 20 },
    ]);
  });

  it("leave the way from and to the neighbours, on the quarter", () => {
    const taken = [
      { from: 540, until: 660, position: at(30) },
      { from: 840, until: 1020, position: at(20) },
    ];
    const times = suggestTimes([{ ...open, taken }], wanted, travel);
    // 11:00 and 20 minutes' way: 11:30; 14:00 less 10 less 90: 12:15, and the straight way took 10.
    expect(times.map(({ from, addedTravel }) => [from, addedTravel])).toEqual([
      [690, 20],
      [735, 20],
    ]);
  });

  it("prefer a place on the way, the days it is due, its technician and the customer's wish", () => {
    const best = (days: OpenDay[], more: Partial<Wanted>) =>
      suggestTimes(days, { ...wanted, ...more }, travel)[0];
    const nearby: OpenDay = {
      ...open,
      day: "2026-05-13",
      taken: [{ from: 600, until: 720, position: at(10) }],
    };
    expect(best([open, nearby], {})?.day).toBe("2026-05-13");
    const due = { from: "2026-05-18", until: "2026-05-20" };
    expect(best([open, { ...open, day: "2026-05-19" }], { due })).toMatchObject({
      day: "2026-05-19",
      reasons: [{ kind: "on-the-way" }, { kind: "within-due" }],
    });
    expect(best([open, { ...open, memberId: "nadia" }], { technicianId: "nadia" })?.memberId).toBe("nadia");
    const wish = { weekdays: [3], hours: { from: 780, until: 960 } };
    expect(best([open, { ...open, day: "2026-05-13" }], { wish })).toMatchObject({
      day: "2026-05-13",
      from: 780,
      reasons: [{ kind: "on-the-way" }, { kind: "as-wished" }],
    });
  });

  it("say how far a time lies from the days it is due", () => {
    const due = { from: "2026-05-15", until: "2026-05-20" };
    const kinds = (day: string) =>
      suggestTimes([{ ...open, day }], { ...wanted, due }, travel)[0]?.reasons[1];
    expect(kinds("2026-05-12")).toEqual({ kind: "before-due", days: 3 });
    expect(kinds("2026-05-22")).toEqual({ kind: "after-due", days: 2 });
  });

  it("never touch what is taken, leave the hours of work or lack the time of the way", () => {
    const minute = fc.integer({ min: 500, max: 1100 });
    const visit = fc
      .tuple(minute, fc.integer({ min: 15, max: 150 }), fc.integer({ min: 0, max: 40 }))
      .map(([from, length, place]) => ({ from, until: from + length, position: at(place) }));
    const taken = fc
      .array(visit, { maxLength: 5 })
      .map((visits) =>
        visits
          .sort((one, other) => one.from - other.from)
          .filter((one, index, all) => all.slice(0, index).every(({ until }) => until <= one.from)),
      );
    fc.assert(
      fc.property(
        fc.array(taken, { minLength: 1, maxLength: 4 }),
        fc.integer({ min: 15, max: 240 }),
        (many, length) => {
          const days = many.map((each, index) => ({ ...open, day: addDays(open.day, index), taken: each }));
          for (const time of suggestTimes(days, { ...wanted, length }, travel)) {
            expect(time.from).toBeGreaterThanOrEqual(540);
            expect(time.until).toBeLessThanOrEqual(1020);
            expect(time.until - time.from).toBe(length);
            for (const one of days.find(({ day }) => day === time.day)?.taken ?? []) {
              const way = travel(one.position, at(10));
              expect(time.from - way >= one.until || time.until + way <= one.from).toBe(true);
            }
          }
        },
      ),
      { seed: 4 },
    );
  });

  it("are at most as many as asked for, and not all on one day", () => {
    const days = [open, { ...open, day: "2026-05-13" }, { ...open, day: "2026-05-14" }];
    const times = suggestTimes(
      days,
      { ...wanted, wish: { weekdays: [], hours: { from: 660, until: 800 } } },
      travel,
    );
    expect(times).toHaveLength(5);
    expect(new Set(times.map(({ day }) => day)).size).toBe(3);
  });
});
