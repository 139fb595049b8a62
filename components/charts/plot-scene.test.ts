import { describe, expect, it } from "vitest";
import {
  cursorRings,
  drawnPoints,
  makeScene,
  pointAt,
  splitAtBreak,
  tickLabelRects,
  tickSide,
} from "./plot-scene";
import type { KeyPlot } from "./plot-types";

const range = { firstMidi: 21, lastMidi: 108, breakMidi: 41 };
const keys = Array.from({ length: 88 }, (_, index) => 21 + index);
const curve = keys.map((midi) => ({ midi, value: midi - 60, low: midi - 62, high: midi - 58 }));
const table = { columns: [], rows: [] };

function plot(layers: KeyPlot["layers"]): KeyPlot {
  return { id: "s", title: "Stretch, cents", axis: { kind: "symmetric" }, layers, table };
}

const scene = (layers: KeyPlot["layers"], width = 856) =>
  makeScene({ plot: plot(layers), range, width, first: true, last: true });

describe("one plot at one width", () => {
  it("spans all values, bands included, so that nothing is cut off", () => {
    const { scale } = scene([{ kind: "curve", points: curve }]);
    expect(scale.high).toBeGreaterThan(50);
  });

  it("never joins the bridges across the break", () => {
    const runs = splitAtBreak(range, curve.toReversed());
    expect(runs.map((run) => [run[0]?.midi, run.at(-1)?.midi])).toEqual([
      [21, 40],
      [41, 108],
    ]);
    expect(splitAtBreak({ ...range, breakMidi: null }, curve)).toHaveLength(1);
    expect(splitAtBreak(range, [])).toEqual([]);
  });

  it("stands hollow dots only where a key has six pixels", () => {
    expect(scene([], 856).roomy).toBe(true);
    expect(scene([], 358).roomy).toBe(false);
  });

  it("gives the phone's plot the whole width", () => {
    expect(scene([], 358).area.x).toBe(0);
    expect(scene([], 856).area.x).toBe(56);
  });

  it("rings the curve at a predicted key, and the mark itself at a measured one", () => {
    const layers: KeyPlot["layers"] = [
      { kind: "curve", points: curve },
      { kind: "marks", mark: "measured", points: [{ midi: 69, value: 12 }] },
    ];
    const drawn = scene(layers);
    expect(cursorRings(drawn, 61)).toEqual([{ ...pointAt(drawn, 61, 1), around: false }]);
    expect(cursorRings(drawn, 69)).toEqual([{ ...pointAt(drawn, 69, 12), around: true }]);
  });

  it("leaves no holes along a band of few points, into which words could fall", () => {
    const drawn = scene([
      {
        kind: "band",
        points: [
          { midi: 50, low: -8, high: 8 },
          { midi: 100, low: -8, high: 8 },
        ],
      },
    ]);
    const upper = drawnPoints(drawn)
      .filter((point) => point.y < pointAt(drawn, 50, 0).y)
      .map((point) => point.x)
      .sort((a, b) => a - b);
    for (let index = 1; index < upper.length; index++) {
      expect((upper[index] ?? 0) - (upper[index - 1] ?? 0)).toBeLessThanOrEqual(8.001);
    }
  });

  it("puts the phone's numbers at the end where fewer points lie", () => {
    const atStart = keys.slice(0, 6).map((midi) => ({ midi, value: 2.3 }));
    const atEnd = keys.slice(-6).map((midi) => ({ midi, value: 2.3 }));
    const mark = (points: typeof atStart) => scene([{ kind: "marks", mark: "measured", points }], 358);
    expect(tickSide(mark(atStart))).toBe("right");
    expect(tickSide(mark(atEnd))).toBe("left");
  });

  it("keeps the uppermost number of a phone's axis clear of the legend above the plot", () => {
    for (const first of [true, false]) {
      for (const value of [0.5, 2.68, 3.01, 9, 26.8, 90]) {
        const layers: KeyPlot["layers"] = [{ kind: "curve", points: [{ midi: 60, value }] }];
        const below = makeScene({ plot: plot(layers), range, width: 358, first, last: false });
        const tops = tickLabelRects(below, "left").map((rect) => rect.y);
        expect(Math.min(...tops)).toBeGreaterThanOrEqual(4);
      }
    }
  });
});
