import { describe, expect, it } from "vitest";
import {
  centsWithBand,
  copyable,
  exponentOfB,
  fixed,
  hertz,
  inharmonicity,
  percentWithBand,
  plainDecimal,
  signed,
  signedCents,
} from "./format";

describe("numbers as printed", () => {
  it("uses the true minus, which is as wide as the plus, and never the hyphen", () => {
    expect(signedCents(-6.4)).toBe("−6.4");
    expect(signedCents(3.8)).toBe("+3.8");
    expect(fixed(-12.05, 1)).not.toContain("-");
  });

  it("never prints a signed zero", () => {
    expect(signed(0, 1)).toBe("0.0");
    expect(signed(-0.04, 1)).toBe("0.0");
    expect(signed(0.04, 1)).toBe("0.0");
    expect(fixed(-0.001, 2)).toBe("0.00");
  });

  it("keeps the decimals fixed, so that columns line up", () => {
    expect([9, 10, 100.25].map((value) => hertz(value))).toEqual(["9.00", "10.00", "100.25"]);
  });

  it("prints a dash for what is not known, not a zero", () => {
    expect(signedCents(null)).toBe("–");
    expect(hertz(undefined)).toBe("–");
    expect(inharmonicity(Number.NaN)).toBe("–");
    expect(centsWithBand(null, 2)).toBe("–");
  });

  it("prints B in tenths of thousandths with its error", () => {
    expect(inharmonicity(2.12e-4, 0.18e-4)).toBe("2.12 ± 0.18");
    expect(inharmonicity(23.1e-4)).toBe("23.1");
    expect(inharmonicity(5.6e-3, 0.39e-3, -3)).toBe("5.60 ± 0.39");
  });

  it("reports a negative B as it came out, since clipping would hide its error", () => {
    expect(inharmonicity(-0.03e-4, 0.1e-4)).toBe("−0.03 ± 0.10");
  });

  it("chooses the power of ten that leaves one digit before the point", () => {
    expect([2.12e-4, 5.6e-3, 0.001, 9.99e-4, 0, -3e-4].map(exponentOfB)).toEqual([-4, -3, -3, -4, -4, -4]);
  });

  it("joins a value and its half-width at 95 %", () => {
    expect(centsWithBand(-1.42, 0.2)).toBe("−1.4 ± 0.2");
    expect(centsWithBand(43.7, null)).toBe("+43.7");
    expect(percentWithBand(38, 8)).toBe("+38 ± 8 %");
  });

  it("labels a logarithmic axis in plain decimals", () => {
    expect([0.0001, 0.001, 0.01, 0.1, 1, 0.0002].map(plainDecimal)).toEqual([
      "0.0001",
      "0.001",
      "0.01",
      "0.1",
      "1",
      "0.0002",
    ]);
  });

  it("copies numbers that a spreadsheet reads as numbers", () => {
    expect(copyable(-6.4, 1)).toBe("-6.4");
    expect(Number(copyable(-1.25, 2))).toBe(-1.25);
    expect(copyable(null, 1)).toBe("");
  });
});
