import { describe, expect, it } from "vitest";
import type { ComparisonRecord } from "@/lib/plans/compare/schema";
import { verdictOf } from "./compare-plots";

const changed = (percent: number): ComparisonRecord["notes"][number] => ({
  midi: 60,
  verdict: "changed",
  reason: null,
  deltaLnB: Math.log(1 + percent / 100),
  deltaLnBSigma: 0.01,
  low: null,
  high: null,
  dof: 6,
  t: 5,
  pValue: 0.001,
  adjustedPValue: 0.01,
  detectableChange: 0.03,
  matchedPartials: [1, 2, 3, 4],
  pitchCents: 0,
});

describe("what a changed stiffness is said to mean", () => {
  it("asks about the wire only where the change is near a wire size", () => {
    expect(verdictOf(changed(12))).toBe("changed: stiffer. Wire changed?");
    expect(verdictOf(changed(-11))).toBe("changed: less stiff. Wire changed?");
    expect(verdictOf(changed(8.1))).toContain("Wire");
    expect(verdictOf(changed(7.9))).toBe("changed a little: read it again");
    expect(verdictOf(changed(-4))).toBe("changed a little: read it again");
  });
});
