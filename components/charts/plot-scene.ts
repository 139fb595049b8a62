import { type KeyLayout, type KeyRange, layOutKeys } from "./key-geometry";
import { holds, type Point, type Rect } from "./place-words";
import { logScale, symmetricScale, type Tick, type ValueScale } from "./plot-scale";
import type { KeyPlot, KeyValue, PlotLayer } from "./plot-types";

/** Everything needed to draw one plot at one width: measures, scales and where its points fall. Pure. */

export type Scene = {
  plot: KeyPlot;
  layout: KeyLayout;
  scale: ValueScale;
  /** The plotting area within the canvas. */
  area: Rect;
  width: number;
  height: number;
  compact: boolean;
  /** Room for hollow dots; under 6 px a key they become the line. */
  roomy: boolean;
  first: boolean;
  last: boolean;
};

/** From the plotting area of the last plot down to the ribbon. */
const TO_RIBBON = 12;
const AXIS_WIDTH = 56;
/** On a phone the numbers stand on their lines: the uppermost needs this much above it, clear of the legend. */
const TICK_LABEL_RISE = 16;

export const isCompact = (width: number) => width < 560;
export const axisWidth = (width: number) => (isCompact(width) ? 0 : AXIS_WIDTH);

function layerValues(layer: PlotLayer): number[] {
  switch (layer.kind) {
    case "curve":
      return layer.points.flatMap(({ value, low, high }) => [value, low ?? value, high ?? value]);
    case "band":
      return layer.points.flatMap(({ low, high }) => [low, high]);
    case "visit":
      return [...layer.curve, ...layer.measured].map((point) => point.value);
    default:
      return layer.points.map((point) => point.value);
  }
}

function plotScale(plot: KeyPlot): ValueScale {
  const values = plot.layers.flatMap(layerValues);
  return plot.axis.kind === "log" ? logScale(values, plot.axis) : symmetricScale(values, plot.axis.atLeast);
}

function plotHeight(plot: KeyPlot, compact: boolean): number {
  return compact ? (plot.phoneHeight ?? 176) : (plot.height ?? 276);
}

type SceneInput = { plot: KeyPlot; range: KeyRange; width: number; first: boolean; last: boolean };

export function makeScene({ plot, range, width, first, last }: SceneInput): Scene {
  const compact = isCompact(width);
  const left = axisWidth(width);
  const top = first ? 30 : compact ? TICK_LABEL_RISE + 4 : 16;
  const height = plotHeight(plot, compact);
  const layout = layOutKeys(range, width - left);
  return {
    plot,
    layout,
    scale: plotScale(plot),
    area: { x: left, y: top, width: width - left, height },
    width,
    height: top + height + (last ? TO_RIBBON : 16),
    compact,
    roomy: layout.pitch >= 6,
    first,
    last,
  };
}

export function pointAt(scene: Scene, midi: number, value: number): Point {
  return {
    x: scene.area.x + scene.layout.x(midi),
    y: scene.area.y + scene.scale.y(value, scene.area.height),
  };
}

/** Further apart than this, the points of a line would leave holes that words could fall into. */
const DENSE = 8;

function along(run: readonly Point[]): Point[] {
  return run.flatMap((point, index) => {
    const next = run[index + 1];
    if (!next) return [point];
    const steps = Math.max(1, Math.ceil(Math.hypot(next.x - point.x, next.y - point.y) / DENSE));
    return Array.from({ length: steps }, (_, step) => ({
      x: point.x + ((next.x - point.x) * step) / steps,
      y: point.y + ((next.y - point.y) * step) / steps,
    }));
  });
}

/** Points that words must not cover: marks and stems, and lines and edges of bands all along. */
export function drawnPoints(scene: Scene): Point[] {
  const line = (points: readonly KeyValue[]) =>
    splitAtBreak(scene.layout.range, points).flatMap((run) =>
      along(run.map(({ midi, value }) => pointAt(scene, midi, value))),
    );
  const edges = (points: readonly { midi: number; low?: number | null; high?: number | null }[]) =>
    (["low", "high"] as const).flatMap((edge) =>
      line(
        points.flatMap((point) => (point[edge] == null ? [] : [{ midi: point.midi, value: point[edge] }])),
      ),
    );
  return scene.plot.layers.flatMap((layer): Point[] => {
    switch (layer.kind) {
      case "curve":
        return [...line(layer.points), ...edges(layer.points)];
      case "band":
        return edges(layer.points);
      case "visit":
        return [
          ...line(layer.curve),
          ...layer.measured.map(({ midi, value }) => pointAt(scene, midi, value)),
        ];
      default:
        return layer.points.flatMap(({ midi, value }) => {
          const mark = pointAt(scene, midi, value);
          return layer.stems ? along([mark, pointAt(scene, midi, 0)]) : [mark];
        });
    }
  });
}

/** On a phone only zero and the outermost lines of a cents axis are named. */
export function tickIsNamed(scene: Scene, tick: Tick): boolean {
  if (tick.label === null) return false;
  if (!scene.compact || scene.scale.log || tick.value === 0) return true;
  return Math.abs(tick.value) === Math.max(...scene.scale.ticks.map(({ value }) => Math.abs(value)));
}

/** Where the numbers of a phone's axis stand, on their lines inside the plot. */
export function tickLabelRects(scene: Scene, side: "left" | "right"): Rect[] {
  const { area, scale } = scene;
  const width = scale.log ? 46 : 26;
  return scale.ticks
    .filter((tick) => tickIsNamed(scene, tick))
    .map((tick) => ({
      x: side === "left" ? area.x : area.x + area.width - width,
      y: area.y + scale.y(tick.value, area.height) - TICK_LABEL_RISE,
      width,
      height: 14,
    }));
}

/** The end of the lines where those numbers cover fewer points. */
export function tickSide(scene: Scene): "left" | "right" {
  const points = drawnPoints(scene);
  const covered = (side: "left" | "right") => {
    const rects = tickLabelRects(scene, side);
    return points.filter((point) => rects.some((rect) => holds(rect, point))).length;
  };
  return covered("right") < covered("left") ? "right" : "left";
}

export type CursorRing = Point & {
  /** Around a mark that stands there, instead of in place of a hollow dot. */
  around: boolean;
};

/** Where the cursor's rings go: on each curve, or around the mark of the key in hand. */
export function cursorRings(scene: Scene, midi: number): CursorRing[] {
  const rings: CursorRing[] = [];
  for (const layer of scene.plot.layers) {
    if (layer.kind === "curve") {
      const point = layer.points.find((candidate) => candidate.midi === midi);
      if (point && !markAt(scene.plot, midi))
        rings.push({ ...pointAt(scene, midi, point.value), around: false });
    }
    if (layer.kind === "marks" && (layer.mark === "measured" || layer.mark === "anchor")) {
      const point = layer.points.find((candidate) => candidate.midi === midi);
      if (point) rings.push({ ...pointAt(scene, midi, point.value), around: true });
    }
  }
  return rings;
}

function markAt(plot: KeyPlot, midi: number): boolean {
  return plot.layers.some(
    (layer) =>
      layer.kind === "marks" &&
      (layer.mark === "measured" || layer.mark === "anchor") &&
      layer.points.some((point) => point.midi === midi),
  );
}

/** Runs of points that may be joined: the break parts them. */
export function splitAtBreak<P extends { midi: number }>(range: KeyRange, points: readonly P[]): P[][] {
  const sorted = points.toSorted((a, b) => a.midi - b.midi);
  const { breakMidi } = range;
  if (breakMidi == null) return sorted.length > 0 ? [sorted] : [];
  return [
    sorted.filter((point) => point.midi < breakMidi),
    sorted.filter((point) => point.midi >= breakMidi),
  ].filter((run) => run.length > 0);
}
