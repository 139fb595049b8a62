import { describe, expect, test } from "vitest";
import { addMinutes, isWallTime, offsetsAt, parseOffsetTime, timeOfMinute, withOffset } from "./wall-time";

// Transition days of 2026 as the IANA time zone database gives them (zic/zdump of tzdata), from memory.
describe("wall time and its offsets", () => {
  test("an ordinary time has one offset", () => {
    expect(offsetsAt("2026-05-14T09:00", "Europe/Paris")).toEqual([120]);
    expect(offsetsAt("2026-01-14T09:00", "America/New_York")).toEqual([-300]);
    expect(offsetsAt("2026-05-14T09:00", "Asia/Kolkata")).toEqual([330]);
  });

  test("a time the clocks jump over has none", () => {
    expect(offsetsAt("2026-03-29T02:30", "Europe/Paris")).toEqual([]);
    expect(offsetsAt("2026-03-08T02:30", "America/New_York")).toEqual([]);
    expect(offsetsAt("2026-03-29T02:00", "Europe/Paris")).toEqual([]);
    expect(offsetsAt("2026-03-29T03:00", "Europe/Paris")).toEqual([120]);
  });

  test("a time that occurs twice has two, the first occurrence first", () => {
    expect(offsetsAt("2026-10-25T02:30", "Europe/Paris")).toEqual([120, 60]);
    expect(offsetsAt("2026-11-01T01:30", "America/New_York")).toEqual([-240, -300]);
    expect(withOffset("2026-10-25T02:30", "Europe/Paris", 0)).toBe("2026-10-25T02:30:00+02:00");
    expect(withOffset("2026-10-25T02:30", "Europe/Paris", 1)).toBe("2026-10-25T02:30:00+01:00");
  });

  test("half-hour zones and half-hour daylight saving are not rounded to hours", () => {
    expect(offsetsAt("2026-04-05T01:45", "Australia/Lord_Howe")).toEqual([660, 630]);
    expect(withOffset("2026-06-01T10:00", "America/St_Johns", 0)).toBe("2026-06-01T10:00:00-02:30");
  });

  test("RFC 3339 is read in whole minutes, and nothing else is", () => {
    expect(parseOffsetTime("2026-05-14T09:00:00+02:00")).toEqual({
      wall: "2026-05-14T09:00",
      offsetMinutes: 120,
    });
    expect(parseOffsetTime("2026-05-14T09:00Z")).toEqual({ wall: "2026-05-14T09:00", offsetMinutes: 0 });
    for (const text of [
      "2026-05-14T09:00:30+02:00",
      "2026-05-14T09:00:00",
      "2026-02-30T09:00:00+01:00",
      "2026-05-14T24:00:00+02:00",
      "2026-05-14 09:00+02:00",
      "soon",
    ]) {
      expect(parseOffsetTime(text), text).toBeNull();
    }
  });

  test("adding minutes crosses midnight and years", () => {
    expect(addMinutes("2026-12-31T23:30", 90)).toBe("2027-01-01T01:00");
    expect(timeOfMinute(13 * 60 + 5)).toBe("13:05");
    expect(isWallTime("2026-13-01T00:00")).toBe(false);
  });
});
