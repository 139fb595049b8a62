import { expect, it } from "vitest";
import { pastWords } from "./past";

const dublin = { now: "2026-05-14T08:30:00Z", timeZone: "Europe/Dublin" };

it("says how long ago a visit would have begun, counting the days of the site's calendar", () => {
  expect(pastWords("2026-05-11T09:00:00+01:00", dublin)).toBe("This is 3 days ago.");
  expect(pastWords("2026-05-13T23:59:00+01:00", dublin)).toBe("This was yesterday.");
  expect(pastWords("2026-05-14T09:29:00+01:00", dublin)).toBe("This is earlier today.");
  // Already the 14th in Dublin, still the 13th in Chicago.
  expect(
    pastWords("2026-05-13T20:00:00-05:00", { now: "2026-05-14T03:00:00Z", timeZone: "America/Chicago" }),
  ).toBe("This is earlier today.");
  // Two days with the hour the clocks take in between.
  expect(pastWords("2026-03-28T09:00:00Z", { now: "2026-03-30T08:00:00Z", timeZone: "Europe/Dublin" })).toBe(
    "This is 2 days ago.",
  );
});

it("asks nothing of what begins now or later", () => {
  expect(pastWords("2026-05-14T09:30:00+01:00", dublin)).toBeNull();
  expect(pastWords("2026-05-15T09:00:00+01:00", dublin)).toBeNull();
});
