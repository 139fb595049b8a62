import { describe, expect, it } from "vitest";
import {
  addDays,
  addMonths,
  dayOf,
  isDay,
  isTimeZone,
  showDay,
  showDayOf,
  showTime,
  showWallTime,
  showWeekday,
} from "./dates";

describe("dates", () => {
  it("puts one instant on different days in different zones", () => {
    expect(dayOf("2026-05-14T23:30:00Z", "Europe/London")).toBe("2026-05-15");
    expect(dayOf("2026-05-14T23:30:00Z", "America/New_York")).toBe("2026-05-14");
  });

  it("take a year of another age for a slip", () => {
    expect(["9999-01-01", "0206-05-14", "2026-05-14"].map(isDay)).toEqual([false, false, true]);
  });

  it("counts months as calendars do: a short one ends earlier, and a year turns", () => {
    expect(addMonths("2026-08-31", 6)).toBe("2027-02-28");
    expect(addMonths("2027-08-31", 6)).toBe("2028-02-29");
    expect(addMonths("2026-12-15", 1)).toBe("2027-01-15");
    expect(addMonths("2026-03-31", -1)).toBe("2026-02-28");
  });

  it("keeps the day on both sides of a clock change", () => {
    expect(dayOf("2026-03-28T23:59:59Z", "Europe/London")).toBe("2026-03-28");
    expect(dayOf("2026-03-29T23:30:00Z", "Europe/London")).toBe("2026-03-30");
  });

  it("writes the month as a word in every language it is asked for", () => {
    for (const locale of ["en-GB", "en-US", "de-DE", "fr-FR", "nl-NL", "es-ES"]) {
      expect(showDay("2026-04-03", locale)).toMatch(/\p{L}{3,}/u);
      expect(showDay("2026-04-03", locale)).toContain("2026");
    }
    expect(showDay("2026-04-03", "en-GB")).toBe("3 Apr 2026");
  });

  it("does not shift a calendar day or a wall time through a zone", () => {
    expect(showDay("2026-01-01", "en-GB")).toBe("1 Jan 2026");
    expect(showWallTime("2026-05-14 09:40:00", "en-GB")).toBe("14 May 2026, 09:40");
    expect(showDayOf("2026-01-01T04:00:00Z", "en-GB", "America/New_York")).toBe("31 Dec 2025");
  });

  it("refuses days that are not in the calendar", () => {
    expect(isDay("2026-02-29")).toBe(false);
    expect(isDay("2024-02-29")).toBe(true);
    expect(isDay("26-02-01")).toBe(false);
    expect(isDay("2026-2-1")).toBe(false);
  });

  it("knows time zones from nonsense", () => {
    expect(isTimeZone("Europe/Dublin")).toBe(true);
    expect(isTimeZone("Europe/Port_Averil")).toBe(false);
    expect(isTimeZone("+01:00")).toBe(false);
  });

  it("counts days over months, leap days and clock changes", () => {
    expect(addDays("2024-02-28", 1)).toBe("2024-02-29");
    expect(addDays("2026-03-28", 2)).toBe("2026-03-30");
    expect(addDays("2026-01-01", -1)).toBe("2025-12-31");
  });

  it("shows the weekday with the day, and a written time as it was written", () => {
    expect(showWeekday("2026-05-14", "en-GB")).toBe("Thursday 14 May");
    expect(showTime("2026-05-14T09:05:00+02:00", "en-GB")).toBe("9:05");
    expect(showTime("2026-05-14T23:05:00-10:00", "en-GB")).toBe("23:05");
  });
});
