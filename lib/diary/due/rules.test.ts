import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addDays } from "@/lib/dates";
import { type DueFacts, dueState, dueWindow, type Rhythm, type ServiceHistory } from "./rules";

const never: ServiceHistory = { lastServed: null, startsOn: "2026-03-10", events: [] };
const served = (day: string): ServiceHistory => ({ ...never, lastServed: day });
const halfYear: Rhythm = { kind: "interval", every: 6, unit: "month" };
const twiceAYear: Rhythm = { kind: "months", months: [10, 4] };

describe("when an instrument is due", () => {
  it("by interval: a twentieth of it early or late, counted from the last service", () => {
    expect(dueWindow(halfYear, served("2026-05-11"), "2026-06-01")).toEqual({
      from: "2026-11-02",
      until: "2026-11-20",
    });
    expect(
      dueWindow({ kind: "interval", every: 2, unit: "week" }, served("2026-05-11"), "2026-05-12"),
    ).toEqual({
      from: "2026-05-22",
      until: "2026-05-28",
    });
  });

  it("a month's interval from the 31st ends with a shorter month", () => {
    const window = dueWindow(halfYear, served("2026-08-31"), "2026-09-01");
    expect(window && addDays(window.from, 9)).toBe("2027-02-28");
  });

  it("without a history counts from the day the plan begins", () => {
    expect(dueWindow(halfYear, never, "2026-03-10")).toEqual({ from: "2026-03-01", until: "2026-03-19" });
    expect(dueWindow(twiceAYear, never, "2026-03-10")).toEqual({ from: "2026-04-01", until: "2026-04-30" });
  });

  it("by season: a visit little before the season counts for it, one long before does not", () => {
    expect(dueWindow(twiceAYear, served("2026-03-20"), "2026-03-21")?.from).toBe("2026-10-01");
    expect(dueWindow(twiceAYear, served("2026-02-20"), "2026-03-21")?.from).toBe("2026-04-01");
    expect(dueWindow(twiceAYear, served("2026-11-05"), "2026-11-06")?.from).toBe("2027-04-01");
  });

  it("by season: one left out stays open until it is made good", () => {
    expect(dueWindow(twiceAYear, served("2025-10-15"), "2026-06-20")).toEqual({
      from: "2026-04-01",
      until: "2026-04-30",
    });
  });

  it("by season: February has its leap day", () => {
    expect(dueWindow({ kind: "months", months: [2] }, served("2027-03-01"), "2027-03-02")?.until).toBe(
      "2028-02-29",
    );
  });

  it("before each event, unless the instrument was served within the days before it", () => {
    const rhythm: Rhythm = { kind: "events", daysBefore: 3 };
    const events = ["2026-06-20", "2026-05-16"];
    expect(dueWindow(rhythm, { ...never, events }, "2026-05-01")).toEqual({
      from: "2026-05-13",
      until: "2026-05-16",
    });
    expect(dueWindow(rhythm, { ...served("2026-05-14"), events }, "2026-05-15")?.until).toBe("2026-06-20");
    expect(dueWindow(rhythm, { ...served("2026-05-14"), events }, "2026-06-21")).toBeNull();
  });

  it("a window never lies before the service it follows", () => {
    const day = fc.integer({ min: 0, max: 3000 }).map((days) => addDays("2020-01-01", days));
    const rhythm = fc.oneof(
      fc.record({
        kind: fc.constant("interval" as const),
        every: fc.integer({ min: 1, max: 60 }),
        unit: fc.constantFrom("week" as const, "month" as const),
      }),
      fc.record({
        kind: fc.constant("months" as const),
        months: fc.uniqueArray(fc.integer({ min: 1, max: 12 }), { minLength: 1 }),
      }),
    );
    fc.assert(
      fc.property(rhythm, day, (each, last) => {
        const window = dueWindow(each, served(last), last);
        expect(window).not.toBeNull();
        expect(window && window.from > last).toBe(true);
        expect(window && window.until >= window.from).toBe(true);
      }),
      { seed: 3 },
    );
  });
});

describe("the state on the due list", () => {
  const facts: DueFacts = {
    window: { from: "2026-11-02", until: "2026-11-20" },
    resting: false,
    bookedOn: null,
    declinedOn: null,
    leadDays: 28,
  };

  it("goes from later over due to overdue with the days", () => {
    expect(dueState(facts, "2026-10-04")).toBe("later");
    expect(dueState(facts, "2026-10-05")).toBe("due");
    expect(dueState(facts, "2026-11-20")).toBe("due");
    expect(dueState(facts, "2026-11-21")).toBe("overdue");
  });

  it("a booked visit is shown as such even while the plan rests", () => {
    expect(dueState({ ...facts, bookedOn: "2026-11-05", resting: true }, "2026-11-01")).toBe("booked");
    expect(dueState({ ...facts, resting: true }, "2026-12-01")).toBe("resting");
  });

  it("an offer declined for this window is not made again; one declined a season ago is forgotten", () => {
    expect(dueState({ ...facts, declinedOn: "2026-10-20" }, "2026-12-01")).toBe("declined");
    expect(dueState({ ...facts, declinedOn: "2026-05-02" }, "2026-12-01")).toBe("overdue");
  });
});
