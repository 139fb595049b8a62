import { describe, expect, it } from "vitest";
import { restWords, rhythmWords, showWindow, weekdayName } from "./words";

describe("the diary in words", () => {
  it("writes a window with the year once, or at both ends where it turns", () => {
    expect(showWindow({ from: "2026-11-02", until: "2026-11-20" }, "en-IE")).toBe("2 Nov – 20 Nov 2026");
    expect(showWindow({ from: "2026-12-23", until: "2027-01-10" }, "en-IE")).toBe(
      "23 Dec 2026 – 10 Jan 2027",
    );
  });

  it("uses no blank that a server and a browser might write differently", () => {
    expect(showWindow({ from: "2026-11-02", until: "2026-12-20" }, "en-US")).not.toMatch(/[\u2009\u202f]/);
  });

  it("says every rhythm, one and many", () => {
    const words = (rhythm: Parameters<typeof rhythmWords>[0]["rhythm"]) => rhythmWords({ rhythm }, "en-GB");
    expect(words({ kind: "interval", every: 1, unit: "month" })).toBe("every month");
    expect(words({ kind: "interval", every: 6, unit: "month" })).toBe("every 6 months");
    expect(words({ kind: "months", months: [4, 10] })).toBe("in April and October");
    expect(words({ kind: "events", daysBefore: 0 })).toBe("on the day of each event");
    expect(words({ kind: "events", daysBefore: 2 })).toBe("within 2 days before each event");
  });

  it("counts weekdays from Monday, and says until when a plan rests", () => {
    expect([weekdayName(1, "en-GB"), weekdayName(7, "en-GB")]).toEqual(["Monday", "Sunday"]);
    expect(restWords({ rests: true, restsUntil: "2027-03-01" }, "en-GB")).toBe("rests until 1 Mar 2027");
    expect(restWords({ rests: false, restsUntil: null }, "en-GB")).toBeNull();
  });
});
