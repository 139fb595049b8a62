import { describe, expect, test } from "vitest";
import { offeredStart, shownTime, siteTime } from "./times";

function faults(start: string, end: string, zone: string) {
  const read = siteTime({ start, end }, zone);
  return "faults" in read ? read.faults : null;
}

test("a booking opens on the wanted start, or today on the next full hour when that is over", () => {
  expect(offeredStart("2026-05-15", "09:00", "2026-05-14T15:20")).toBe("09:00");
  expect(offeredStart("2026-05-14", "09:00", "2026-05-14T07:20")).toBe("09:00");
  expect(offeredStart("2026-05-14", "09:00", "2026-05-14T15:20")).toBe("16:00");
  expect(offeredStart("2026-05-14", "09:00", "2026-05-14T23:40")).toBe("23:00");
});

describe("a visit's time held against the site's clocks", () => {
  test("an offset that is not the site's then is refused at its field", () => {
    const wrong = faults("2026-05-14T09:00:00+01:00", "2026-05-14T10:00:00+02:00", "Europe/Paris");
    expect(Object.keys(wrong ?? {})).toEqual(["start"]);
    expect(wrong?.start).toContain("+02:00");
  });

  test("a time the clocks jump over is refused whatever its offset", () => {
    for (const offset of ["+01:00", "+02:00"]) {
      const read = faults(`2026-03-29T02:30:00${offset}`, "2026-03-29T04:00:00+02:00", "Europe/Paris");
      expect(read?.start).toContain("jump over");
    }
  });

  test("of two times alike the offset says which", () => {
    const first = siteTime(
      { start: "2026-10-25T02:30:00+02:00", end: "2026-10-25T04:00:00+01:00" },
      "Europe/Paris",
    );
    const second = siteTime(
      { start: "2026-10-25T02:30:00+01:00", end: "2026-10-25T04:00:00+01:00" },
      "Europe/Paris",
    );
    expect(first).toMatchObject({ time: { startsFold: 0 } });
    expect(second).toMatchObject({ time: { startsFold: 1 } });
    if (!("time" in second)) throw new Error("refused");
    expect(shownTime(second.time).start).toBe("2026-10-25T02:30:00+01:00");
  });

  test("a visit ends after it begins, also where clocks go back, and within a day", () => {
    expect(faults("2026-05-14T09:00:00+02:00", "2026-05-14T09:00:00+02:00", "Europe/Paris")).toHaveProperty(
      "end",
    );
    expect(faults("2026-10-25T02:30:00+02:00", "2026-10-25T02:15:00+01:00", "Europe/Paris")).toHaveProperty(
      "end",
    );
    expect(faults("2026-05-14T09:00:00+02:00", "2026-05-15T09:01:00+02:00", "Europe/Paris")).toHaveProperty(
      "end",
    );
    expect(faults("2026-05-14T09:00:00+02:00", "2026-05-15T09:00:00+02:00", "Europe/Paris")).toBeNull();
  });
});
