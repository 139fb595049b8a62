"use client";

import {
  Chart as ChartJs,
  type ChartOptions,
  LinearScale,
  LineController,
  LineElement,
  PointElement,
} from "chart.js";
import { type PointerEvent, useEffect, useLayoutEffect, useMemo, useRef } from "react";
import { Chart } from "react-chartjs-2";
import { nearestKey } from "./key-geometry";
import { type PlotDataset, plotDatasets } from "./plot-datasets";
import { type Drawing, plotPlugin } from "./plot-plugin";
import type { Scene } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

ChartJs.register(LineController, LineElement, PointElement, LinearScale);

type XY = { x: number; y: number };
type Props = {
  scene: Scene;
  colours: PlotColours;
  cursor: number | null;
  onCursor?: (midi: number) => void;
};

/**
 * Chart.js is given pixels and draws them one to one. Its own scales know neither keys with a gap at the break nor
 * a range it does not round, and rings and words must meet the points exactly.
 */
function chartOptions(scene: Scene): ChartOptions<"line"> {
  const { area, width, height } = scene;
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
      y: { type: "linear", display: false, min: 0, max: area.height, reverse: true },
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

  // The string is drawn between grid and data, and words make way for it.
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
      <Chart
        ref={chart}
        type="line"
        data={data}
        options={options}
        plugins={plugins}
        aria-label={`${scene.plot.title}, plotted over the keys. The same numbers stand in its table.`}
        className="block"
      />
    </div>
  );
}
