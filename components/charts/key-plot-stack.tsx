"use client";

import { useId, useMemo, useRef, useState } from "react";
import { KeyPlotCanvas } from "./key-plot-canvas";
import type { KeyPlotsProps } from "./key-plots-props";
import { KeyboardRibbon } from "./keyboard-ribbon";
import { PlotTitle } from "./plot-legend";
import { axisWidth, isCompact, makeScene } from "./plot-scene";
import { NumbersButton, NumbersTable } from "./plot-table";
import type { KeyPlot } from "./plot-types";
import { usePlotColours } from "./use-plot-colours";
import { useWidth } from "./use-width";

/** Several plots over one ribbon with one cursor. Loaded by KeyPlots when first needed. */
export function KeyPlotStack(props: KeyPlotsProps) {
  const {
    range,
    plots,
    marks,
    cursor = null,
    onCursor,
    onEnter,
    label,
    tables = "buttons",
    children,
  } = props;
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, 800);
  const colours = usePlotColours();
  const [opened, setOpened] = useState<readonly string[]>([]);
  const baseId = useId();
  const tableId = (id: string) => `${baseId}-${id}`;
  const { firstMidi, lastMidi, breakMidi } = range;

  const scenes = useMemo(
    () =>
      plots.map((plot, index) =>
        makeScene({
          plot,
          range: { firstMidi, lastMidi, breakMidi },
          width,
          first: index === 0,
          last: index === plots.length - 1,
        }),
      ),
    [plots, firstMidi, lastMidi, breakMidi, width],
  );

  const isOpen = (id: string) => tables === "shown" || (tables === "buttons" && opened.includes(id));
  const toggle = (id: string) =>
    setOpened((ids) => (ids.includes(id) ? ids.filter((other) => other !== id) : [...ids, id]));

  const compact = isCompact(width);
  const button = ({ id, title }: KeyPlot, words?: string) => (
    <NumbersButton key={id} open={isOpen(id)} controls={tableId(id)} title={title} onClick={() => toggle(id)}>
      {words}
    </NumbersButton>
  );

  return (
    <div ref={box}>
      {scenes.map((scene) => (
        <div key={scene.plot.id}>
          <PlotTitle
            plot={scene.plot}
            roomy={scene.roomy}
            end={tables === "buttons" && !compact && button(scene.plot)}
          />
          <KeyPlotCanvas scene={scene} colours={colours} cursor={cursor} onCursor={onCursor} />
        </div>
      ))}
      <div style={{ marginLeft: axisWidth(width) }}>
        <KeyboardRibbon
          firstMidi={firstMidi}
          lastMidi={lastMidi}
          breakMidi={breakMidi}
          marks={marks}
          cursor={cursor}
          onCursor={onCursor}
          onEnter={onEnter}
          height={compact ? 36 : 44}
          label={label}
        />
      </div>
      {children}
      {tables === "buttons" && compact && (
        <div className="flex min-h-11 flex-wrap items-center gap-x-5 text-12 text-ink-soft">
          Numbers: {plots.map((plot) => button(plot, plot.title))}
        </div>
      )}
      {plots
        .filter((plot) => isOpen(plot.id))
        .map((plot) => (
          <NumbersTable
            key={plot.id}
            id={tableId(plot.id)}
            title={plot.title}
            table={plot.table}
            cursor={cursor}
            onCursor={onCursor}
          />
        ))}
    </div>
  );
}
