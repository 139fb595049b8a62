import { expect, it } from "vitest";
import { sheetNames } from "./stage-words";

const sheet = (id: string, takenAt: string) => ({ id, takenAt, stage: "as-found" as const });

it("tells two sheets of one day and stage apart by the hour, and no others", () => {
  const sheets = [
    sheet("a", "2026-12-01T08:40:00Z"),
    sheet("b", "2026-12-01T14:05:00Z"),
    sheet("c", "2026-06-02T08:40:00Z"),
  ];
  const name = sheetNames(sheets, "en-GB", "UTC");
  expect(sheets.map(name)).toEqual([
    "1 Dec 2026, 08:40, as found",
    "1 Dec 2026, 14:05, as found",
    "2 Jun 2026, as found",
  ]);
});
