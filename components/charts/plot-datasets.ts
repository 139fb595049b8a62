import type { ChartDataset } from "chart.js";
import { color } from "chart.js/helpers";
import { type Scene, splitAtBreak } from "./plot-scene";
import type { KeyValue, MarkKind } from "./plot-types";
import type { PlotColours } from "./use-plot-colours";

type XY = { x: number; y: number };
export type PlotDataset = ChartDataset<"line", XY[]>;

type Style = Pick<
  PlotDataset,
  "pointStyle" | "pointRadius" | "pointBackgroundColor" | "pointBorderColor" | "pointBorderWidth"
>;

/** Chart.js measures a square by half its diagonal. */
const square = (side: number) => (side / 2) * Math.SQRT2;
/** And a triangle by the radius of the circle around it. */
const triangle = (base: number) => base / Math.sqrt(3);

function faded(colour: string, share: number): string {
  return color(colour).alpha(share).rgbString() ?? colour;
}

function markStyle(mark: MarkKind | "flagged" | "older" | "newer", scene: Scene, c: PlotColours): Style {
  const style = (
    pointStyle: "circle" | "rect" | "rectRot" | "triangle",
    pointRadius: number,
    fill: string,
    border: string,
    pointBorderWidth: number,
  ): Style => ({
    pointStyle,
    pointRadius,
    pointBackgroundColor: fill,
    pointBorderColor: border,
    pointBorderWidth,
  });
  switch (mark) {
    case "measured":
      return style("circle", scene.roomy ? 4.5 : 3.5, c.ink, c.sheet, 1);
    case "predicted":
      return style("circle", 2.5, c.sheet, c["ink-soft"], 1);
    case "as-found":
      return style("rect", square(scene.roomy ? 6 : 5), c.iron, c.iron, 0);
    case "as-left":
      return style("circle", 4, c.felt, c.felt, 0);
    case "anchor":
      return style("rectRot", 5, c.sheet, c.ink, 1.25);
    case "unsure":
      return style("rectRot", 6, c.sheet, c.ink, 1.5);
    case "older":
      return style("rect", square(scene.roomy ? 8 : 6.5), c.sheet, c.iron, 1.5);
    case "newer":
      return style("circle", scene.roomy ? 3.5 : 3, c.felt, c.felt, 0);
    case "flagged":
      return style("triangle", triangle(scene.roomy ? 14 : 12), c.rust, c.sheet, 1);
  }
}

/** Datasets in pixels of the plotting area, from the bottom to the top of the picture. */
export function plotDatasets(scene: Scene, colours: PlotColours): PlotDataset[] {
  const datasets: PlotDataset[] = [];
  const put = (points: readonly KeyValue[], rest: Partial<PlotDataset>) => {
    datasets.push({
      label: `${datasets.length}`,
      data: points.map(({ midi, value }) => ({
        x: scene.layout.x(midi),
        y: scene.scale.y(value, scene.area.height),
      })),
      // Chart.js draws the highest order first.
      order: -datasets.length,
      clip: false,
      ...rest,
    });
  };
  const line = (points: readonly KeyValue[], rest: Partial<PlotDataset>) => {
    for (const run of splitAtBreak(scene.layout.range, points)) put(run, { pointRadius: 0, ...rest });
  };
  const marks = (points: readonly KeyValue[], kind: Parameters<typeof markStyle>[0]) =>
    put(points, { showLine: false, ...markStyle(kind, scene, colours) });

  for (const layer of scene.plot.layers) {
    switch (layer.kind) {
      case "band":
        break;
      case "curve":
        line(layer.points, {
          borderColor: layer.faint && scene.roomy ? faded(colours.ink, 0.35) : colours.ink,
          borderWidth: layer.faint ? 1.25 : 1.5,
        });
        break;
      case "visit":
        line(layer.curve, {
          borderColor: layer.age === "older" ? colours.iron : colours.felt,
          borderWidth: 1.5,
          borderDash: layer.age === "older" ? [5, 3] : [],
        });
        marks(layer.measured, layer.age);
        break;
      case "marks":
        if (layer.mark !== "predicted" || scene.roomy) marks(layer.points, layer.mark);
        break;
      case "flagged":
        marks(layer.points, "flagged");
        break;
    }
  }
  return datasets;
}
