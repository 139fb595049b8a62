"use client";

import {
  Chart as ChartJs,
  type ChartOptions,
  LinearScale,
  LineController,
  LineElement,
  LogarithmicScale,
  PointElement,
} from "chart.js";
import { type PointerEvent, useEffect, useLayoutEffect, useMemo, useRef } from "react";
import { Chart } from "react-chartjs-2";
import { nearestKey } from "./key-geometry";
import { CursorRings, CursorString } from "./plot-cursor";
import { type PlotDataset, plotDatasets } from "./plot-datasets";
import { type Drawing, plotPlugin } from "./plot-plugin";
import type { Scene } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

ChartJs.register(LineController, LineElement, PointElement, LinearScale, LogarithmicScale);

type XY = { x: number; y: number };
type Props = {
  scene: Scene;
  colours: PlotColours;
  cursor: number | null;
  onCursor?: (midi: number) => void;
};

/** The chart's area is exactly the scene's: nothing of Chart.js's own takes room or moves. */
function chartOptions(scene: Scene): ChartOptions<"line"> {
  const { area, scale, width, height } = scene;
  return {
    responsive: false,
    maintainAspectRatio: false,
    animation: false,
    events: [],
    parsing: false,
    normalized: true,
    layout: {
      autoPadding: false,
      padding: {
        left: area.x,
        top: area.y,
        right: width - area.x - area.width,
        bottom: height - area.y - area.height,
      },
    },
    scales: {
      x: { type: "linear", display: false, min: 0, max: area.width },
      y: {
        type: scale.log ? "logarithmic" : "linear",
        display: false,
        min: scale.low,
        max: scale.high,
      },
    },
  };
}

export function KeyPlotCanvas({ scene, colours, cursor, onCursor }: Props) {
  const chart = useRef<ChartJs<"line", XY[]> | null>(null);
  const drawing = useRef<Drawing>({ scene, colours, cursor });
  const plugins = useMemo(() => [plotPlugin(drawing)], []);
  const options = useMemo(() => chartOptions(scene), [scene]);
  const data = useMemo(
    (): { datasets: PlotDataset[] } => ({ datasets: plotDatasets(scene, colours) }),
    [scene, colours],
  );

  // Before the chart's own effects, which draw.
  useLayoutEffect(() => {
    drawing.current = { scene, colours, cursor };
  }, [scene, colours, cursor]);

  useEffect(() => {
    chart.current?.resize(scene.width, scene.height);
  }, [scene.width, scene.height]);

  // Words make way for the cursor, so the picture depends on it although its data do not.
  useEffect(() => {
    chart.current?.draw();
  }, [cursor]);

  function point(event: PointerEvent<HTMLDivElement>) {
    const left = event.currentTarget.getBoundingClientRect().left;
    const midi = nearestKey(scene.layout, event.clientX - left - scene.area.x);
    if (midi !== cursor) onCursor?.(midi);
  }

  return (
    <div
      className="relative"
      style={{ height: scene.height, touchAction: "pan-y", cursor: onCursor ? "crosshair" : undefined }}
      onPointerDown={(event) => {
        if (!onCursor) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        point(event);
      }}
      onPointerMove={(event) => {
        if (event.buttons > 0) point(event);
      }}
    >
      {cursor !== null && <CursorString scene={scene} midi={cursor} />}
      <Chart
        ref={chart}
        type="line"
        data={data}
        options={options}
        plugins={plugins}
        aria-label={`${scene.plot.title}, plotted over the keys. The same numbers stand in its table.`}
        className="relative block"
      />
      {cursor !== null && <CursorRings scene={scene} midi={cursor} />}
    </div>
  );
}
