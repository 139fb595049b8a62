import { expect, it } from "vitest";
import type { AnalysisRecord } from "@/lib/plans/schema";
import { notBelongingWords } from "./fit-words";

const key = (b: number, expectedB: number | null, z: number | null): AnalysisRecord["keys"][number] => ({
  midi: 88,
  b,
  bLow: b * 0.9,
  bHigh: b * 1.1,
  lnBSigma: 0.05,
  source: "measured",
  flag: "does-not-belong",
  expectedB,
  z,
  detectableChange: null,
});

it("says by how much a note that does not belong stands off its neighbours", () => {
  expect(notBelongingWords(key(1.25e-3, 1e-3, 4.5))).toBe(
    "does not belong, 25 % above its neighbours, z = 4.5",
  );
  expect(notBelongingWords(key(0.8e-3, 1e-3, -3.1))).toMatch(/^does not belong, 20 % below its neighbours/);
  expect(notBelongingWords(key(1e-3, null, null))).toBe("does not belong, off the curve of its neighbours");
});
