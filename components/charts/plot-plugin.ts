import type { Plugin } from "chart.js";
import type { RefObject } from "react";
import { drawCursorRings, drawCursorString } from "./draw-cursor";
import { drawGround } from "./draw-ground";
import { drawLabels } from "./draw-labels";
import type { Scene } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

export type Drawing = { scene: Scene; colours: PlotColours; cursor: number | null };

/**
 * Ground, cursor and words of one plot. The drawing is read from a ref, not from chart options: Chart.js resolves options
 * through proxies, which would wrap every point of every layer.
 */
export function plotPlugin(drawing: RefObject<Drawing>): Plugin<"line"> {
  return {
    id: "agraffe-plot",
    beforeDatasetsDraw({ ctx }) {
      const { scene, colours, cursor } = drawing.current;
      drawGround(ctx, scene, colours);
      if (cursor !== null) drawCursorString(ctx, scene, colours, cursor);
    },
    afterDatasetsDraw({ ctx }) {
      const { scene, colours, cursor } = drawing.current;
      if (cursor !== null) drawCursorRings(ctx, scene, colours, cursor);
      drawLabels(ctx, scene, colours, cursor);
    },
  };
}
