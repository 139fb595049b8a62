import type { Plugin } from "chart.js";
import type { RefObject } from "react";
import { drawGround, drawTickLabels } from "./draw-ground";
import { drawLabels } from "./draw-labels";
import type { Scene } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

export type Drawing = { scene: Scene; colours: PlotColours; cursor: number | null };

/**
 * Ground and words of one plot. The drawing is read from a ref, not from chart options: Chart.js resolves options
 * through proxies, which would wrap every point of every layer.
 */
export function plotPlugin(drawing: RefObject<Drawing>): Plugin<"line"> {
  return {
    id: "agraffe-plot",
    beforeDatasetsDraw({ ctx }) {
      drawGround(ctx, drawing.current.scene, drawing.current.colours);
    },
    afterDatasetsDraw({ ctx }) {
      const { scene, colours, cursor } = drawing.current;
      drawTickLabels(ctx, scene, colours);
      drawLabels(ctx, scene, colours, cursor);
    },
  };
}
