"use client";

import dynamic from "next/dynamic";
import type { ReactNode } from "react";
import type { KeyRange } from "./key-geometry";
import type { KeyMark } from "./keyboard-ribbon";
import type { KeyPlot } from "./plot-types";

export type KeyPlotsProps = {
  range: KeyRange;
  plots: readonly KeyPlot[];
  /** Marks on the ribbon. */
  marks?: readonly KeyMark[];
  cursor?: number | null;
  onCursor?: (midi: number) => void;
  /** Enter on the ribbon. */
  onEnter?: (midi: number) => void;
  /** Name of the ribbon for screen readers: "Key in hand". */
  label?: string;
  /** A button on each plot, or all tables shown or hidden by a button of the page. */
  tables?: "buttons" | "shown" | "hidden";
  /** Stands under the ribbon: the readout. */
  children?: ReactNode;
};

/** Heights of titles, plots and ribbon, so that nothing jumps when the charts arrive. */
function Waiting() {
  return (
    <div
      role="status"
      className="flex min-h-[420px] items-center justify-center text-14 text-ink-soft sm:min-h-[600px]"
    >
      Drawing the plots…
    </div>
  );
}

/** Chart.js is loaded with the first plot that is shown, never with the page. */
export const KeyPlots = dynamic<KeyPlotsProps>(
  () => import("./key-plot-stack").then((module) => module.KeyPlotStack),
  { ssr: false, loading: Waiting },
);
