import { describe, expect, it } from "vitest";
import { columnsAt } from "./partial-columns";
import { tableMeasures } from "./table-measures";

/** Widths of six tabular figures with a point, measured in the shipped face. */
const drawn = { 12: 45.6, 14: 53.2, 16: 60.8 } as const;

describe("the sheet's columns", () => {
  it("hold a frequency with its hundredths at every width", () => {
    for (let width = 320; width <= 1400; width += 4) {
      const { low, high } = columnsAt(width);
      for (const columns of [low.length, high.length]) {
        const { cell, figures } = tableMeasures(width, columns);
        expect(cell - 2, `${width} px, ${columns} columns`).toBeGreaterThanOrEqual(drawn[figures]);
      }
    }
  });

  it("leave the quality its word where it stands in the row", () => {
    for (let width = 320; width <= 1400; width += 4) {
      const { wide, fit } = tableMeasures(width, columnsAt(width).low.length);
      if (wide) expect(fit).toBeGreaterThanOrEqual(95);
    }
  });

  it("have B and the quality in the row on a tablet held upright, in figures of 16 px", () => {
    // A page of 820 px keeps 24 px free on either side.
    const { low, high } = columnsAt(772);
    expect([...low, ...high]).toEqual(Array.from({ length: 16 }, (_, index) => index + 1));
    expect(tableMeasures(772, low.length)).toMatchObject({ wide: true, figures: 16 });
  });

  it("show every partial from 1 to 16, whatever the width", () => {
    for (let width = 320; width <= 1400; width += 20) {
      const { low, high } = columnsAt(width);
      expect([...low, ...high].length).toBe(16);
    }
  });
});
