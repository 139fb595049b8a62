import { type KeyLayout, type KeyRange, layOutKeys } from "./key-geometry";
import type { Point, Rect } from "./place-words";
import { logScale, symmetricScale, type ValueScale } from "./plot-scale";
import type { KeyPlot, PlotLayer } from "./plot-types";

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

export const TITLE_LINE = 20;
/** From the plotting area of the last plot down to the ribbon. */
export const TO_RIBBON = 12;
const AXIS_WIDTH = 56;

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

export function plotScale(plot: KeyPlot): ValueScale {
  const values = plot.layers.flatMap(layerValues);
  return plot.axis.kind === "log" ? logScale(values, plot.axis) : symmetricScale(values, plot.axis.atLeast);
}

export function plotHeight(plot: KeyPlot, compact: boolean): number {
  return compact ? (plot.phoneHeight ?? 176) : (plot.height ?? 276);
}

type SceneInput = { plot: KeyPlot; range: KeyRange; width: number; first: boolean; last: boolean };

export function makeScene({ plot, range, width, first, last }: SceneInput): Scene {
  const compact = isCompact(width);
  const left = axisWidth(width);
  const top = first ? 30 : compact ? 8 : 16;
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

/** Points that words must not cover. */
export function drawnPoints(scene: Scene): Point[] {
  const at = (midi: number, value: number) => pointAt(scene, midi, value);
  return scene.plot.layers.flatMap((layer): Point[] => {
    switch (layer.kind) {
      case "curve":
        return layer.points.flatMap(({ midi, value, low, high }) => [
          at(midi, value),
          ...(low != null && high != null ? [at(midi, low), at(midi, high)] : []),
        ]);
      case "band":
        return layer.points.flatMap(({ midi, low, high }) => [at(midi, low), at(midi, high)]);
      case "visit":
        return [...layer.curve, ...layer.measured].map(({ midi, value }) => at(midi, value));
      default:
        return layer.points.map(({ midi, value }) => at(midi, value));
    }
  });
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
    sorted.filter((point) => point.midi <= breakMidi),
    sorted.filter((point) => point.midi > breakMidi),
  ].filter((run) => run.length > 0);
}
