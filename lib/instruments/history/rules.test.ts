import { describe, expect, it } from "vitest";
import { type HistoryJobFacts, type HistorySheetFacts, historyOf } from "./rules";

const sheet = (facts: Partial<HistorySheetFacts>): HistorySheetFacts => ({
  id: "s",
  stage: "as-found",
  takenAt: "2026-05-14T09:00:00.000Z",
  jobId: null,
  humidityPercent: null,
  cents: null,
  ...facts,
});
const job = (facts: Partial<HistoryJobFacts>): HistoryJobFacts => ({
  jobId: "j",
  visitId: "v",
  startsLocal: "2026-05-14 09:00:00",
  state: "closed",
  work: "Tuning",
  ...facts,
});

describe("an instrument's history", () => {
  it("tells the found and the left of one job as one entry, the raise in between as neither", () => {
    const entries = historyOf(
      [
        sheet({ jobId: "j", stage: "as-left", takenAt: "2026-05-14T11:00:00.000Z", cents: 0.2 }),
        sheet({ jobId: "j", stage: "after-raise", takenAt: "2026-05-14T10:00:00.000Z", cents: 4 }),
        sheet({ jobId: "j", takenAt: "2026-05-14T09:10:00.000Z", cents: -31, humidityPercent: 55 }),
      ],
      [job({ work: "Pitch raise" })],
      "Europe/Dublin",
    );
    expect(entries).toEqual([
      {
        id: "j",
        day: "2026-05-14",
        work: "Pitch raise",
        visitId: "v",
        asFoundCents: -31,
        asLeftCents: 0.2,
        humidityPercent: 55,
      },
    ]);
  });

  it("takes the first sheet as found and the last as left", () => {
    const [entry] = historyOf(
      [
        sheet({ id: "2", takenAt: "2026-05-14T09:30:00.000Z", cents: 2 }),
        sheet({ id: "1", takenAt: "2026-05-14T09:00:00.000Z", cents: 3 }),
        sheet({ id: "3", stage: "as-left", takenAt: "2026-05-14T10:00:00.000Z", cents: 1 }),
        sheet({ id: "4", stage: "as-left", takenAt: "2026-05-14T10:30:00.000Z", cents: 0 }),
      ],
      [],
      "Europe/Dublin",
    );
    expect(entry).toMatchObject({ asFoundCents: 3, asLeftCents: 0 });
  });

  it("gathers sheets without a job by the day at the site, not in UTC", () => {
    const late = sheet({ id: "a", takenAt: "2026-05-14T23:30:00.000Z", cents: 1 });
    const early = sheet({ id: "b", takenAt: "2026-05-15T08:00:00.000Z", stage: "as-left", cents: 0 });
    expect(historyOf([late, early], [], "Europe/Dublin").map((entry) => entry.day)).toEqual(["2026-05-15"]);
    expect(historyOf([late, early], [], "UTC").map((entry) => entry.day)).toEqual([
      "2026-05-15",
      "2026-05-14",
    ]);
  });

  it("counts work done without readings, and no visit that has not begun or came to nothing", () => {
    const jobs = [
      job({ jobId: "done", state: "done" }),
      job({ jobId: "coming", state: "confirmed" }),
      job({ jobId: "off", state: "cancelled" }),
    ];
    expect(historyOf([], jobs, "Europe/Dublin").map((entry) => entry.id)).toEqual(["done"]);
  });

  it("goes from the newest day to the oldest", () => {
    const days = ["2024-11-27", "2026-05-14", "2025-05-21"];
    const jobs = days.map((day) => job({ jobId: day, startsLocal: `${day} 09:00:00` }));
    expect(historyOf([], jobs, "Europe/Dublin").map((entry) => entry.day)).toEqual([
      "2026-05-14",
      "2025-05-21",
      "2024-11-27",
    ]);
  });
});
