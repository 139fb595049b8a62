import { describe, expect, it } from "vitest";
import { tableMeasures } from "./sheet-table";

/** Widths of six tabular figures with a point, measured in the shipped face. */
const drawn = { 12: 45.6, 14: 53.2, 16: 60.8 } as const;

describe("the sheet's columns", () => {
  it("hold a frequency with its hundredths at every width", () => {
    for (let width = 320; width <= 1400; width += 4) {
      for (const columns of [10, 6]) {
        const { cell, figures } = tableMeasures(width, columns);
        expect(cell - 2, `${width} px, ${columns} columns`).toBeGreaterThanOrEqual(drawn[figures]);
      }
    }
  });

  it("leave the quality its word where it stands in the row", () => {
    for (let width = 320; width <= 1400; width += 4) {
      const { wide, fit } = tableMeasures(width, 10);
      if (wide) expect(fit).toBeGreaterThanOrEqual(95);
    }
  });
});
