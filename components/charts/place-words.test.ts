import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { holds, overlap, placeWords } from "./place-words";

const area = { x: 56, y: 30, width: 800, height: 276 };
const small = { width: 90, height: 13, reach: "near", area, points: [], taken: [] } as const;

describe("where words go", () => {
  it("stay inside the plot wherever their point lies", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 56, max: 856, noNaN: true }),
        fc.double({ min: 30, max: 306, noNaN: true }),
        fc.constantFrom("near" as const, "far" as const),
        (x, y, reach) => {
          const place = placeWords({ ...small, at: { x, y }, reach });
          expect(place.x).toBeGreaterThanOrEqual(area.x - 1e-6);
          expect(place.x + place.width).toBeLessThanOrEqual(area.x + area.width + 1e-6);
          expect(place.y).toBeGreaterThanOrEqual(area.y - 1e-6);
          expect(place.y + place.height).toBeLessThanOrEqual(area.y + area.height + 1e-6);
        },
      ),
      { seed: 20260514 },
    );
  });

  it("never cover the point they belong to", () => {
    fc.assert(
      fc.property(fc.integer({ min: 56, max: 856 }), fc.integer({ min: 30, max: 306 }), (x, y) => {
        expect(holds(placeWords({ ...small, at: { x, y } }), { x, y })).toBe(false);
      }),
      { seed: 20260514 },
    );
  });

  it("move off a curve that runs through their first choice", () => {
    const at = { x: 400, y: 150 };
    const first = placeWords({ ...small, at });
    const curve = Array.from({ length: 40 }, (_, index) => ({ x: 300 + index * 5, y: first.y + 6 }));
    const moved = placeWords({ ...small, at, points: curve });
    expect(curve.some((point) => holds(moved, point))).toBe(false);
  });

  it("move off the string of the cursor", () => {
    const at = { x: 400, y: 150 };
    const moved = placeWords({ ...small, at, cursorX: 400 });
    expect(moved.x > 400 || moved.x + moved.width < 400).toBe(true);
  });

  it("do not fall on other words", () => {
    const at = { x: 400, y: 150 };
    const first = placeWords({ ...small, at });
    const second = placeWords({ ...small, at: { x: 405, y: 150 }, taken: [first] });
    expect(overlap(first, second)).toBe(false);
  });
});
