import type { ReactNode } from "react";
import type { KeyRange } from "./key-geometry";
import type { KeyMark } from "./key-mark";
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
