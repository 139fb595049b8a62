import { expect, it } from "vitest";
import { versionInAddress, versionOrNone, versionSeen } from "./version";

it("refuses a version larger than the database can hold", () => {
  expect(versionSeen.safeParse(2_147_483_648).success).toBe(false);
  expect(versionOrNone.safeParse(Number.MAX_SAFE_INTEGER).success).toBe(false);
  expect(versionInAddress.safeParse("2147483648").success).toBe(false);
  expect(versionInAddress.parse("7")).toBe(7);
  expect(versionOrNone.parse(0)).toBe(0);
});
