"use client";

import dynamic from "next/dynamic";
import type { KeyPlotsProps } from "./key-plots-props";

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
