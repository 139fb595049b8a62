import type { ReactNode } from "react";
import { SharpText } from "./note-name";
import type { KeyPlot, MarkKind, PlotLayer } from "./plot-types";

/** Title and key of a plot, one line above it. */
export function PlotTitle({ plot, roomy, end }: { plot: KeyPlot; roomy: boolean; end?: ReactNode }) {
  // Without room there are no hollow dots, and what does not belong is named in the plot.
  const hidden = (layer: PlotLayer) =>
    !roomy && (layer.kind === "flagged" || (layer.kind === "marks" && layer.mark === "predicted"));
  const shown = plot.layers.filter((layer) => layer.name && !hidden(layer));
  return (
    <div className="flex min-h-5 flex-wrap items-center gap-x-3 gap-y-1 sm:gap-x-5">
      <span className="font-semibold">{plot.title}</span>
      {shown.map((layer) => (
        <span
          key={`${layer.kind} ${layer.name}`}
          className="inline-flex items-center gap-1.5 text-12 text-ink-soft"
        >
          <Swatch layer={layer} />
          <SharpText text={layer.name ?? ""} />
        </span>
      ))}
      <span className="ml-auto flex items-center gap-3 text-12 text-ink-soft">
        {plot.aside}
        {end}
      </span>
    </div>
  );
}

function Swatch({ layer }: { layer: PlotLayer }) {
  const wide = layer.kind === "visit";
  const width = wide ? 28 : 16;
  return (
    <svg width={width} height={12} viewBox={`0 0 ${width} 12`} aria-hidden="true" className="flex-none">
      <SwatchShape layer={layer} />
    </svg>
  );
}

function SwatchShape({ layer }: { layer: PlotLayer }) {
  switch (layer.kind) {
    case "band":
      return <path d="M0 2h16v8H0z" fill={layer.soft ? "var(--band-soft)" : "var(--band)"} />;
    case "curve":
      return (
        <>
          {layer.points.some((point) => point.low != null) && <path d="M0 2h16v8H0z" fill="var(--band)" />}
          <path d="M0 6h16" stroke="var(--ink)" strokeWidth={1.25} />
        </>
      );
    case "visit":
      return layer.age === "older" ? (
        <>
          <path d="M0 6h28" stroke="var(--iron)" strokeWidth={1.5} strokeDasharray="5 3" />
          <rect
            x={10}
            y={2}
            width={8}
            height={8}
            fill="var(--sheet)"
            stroke="var(--iron)"
            strokeWidth={1.5}
          />
        </>
      ) : (
        <>
          <path d="M0 6h28" stroke="var(--felt)" strokeWidth={1.5} />
          <circle cx={14} cy={6} r={3.5} fill="var(--felt)" />
        </>
      );
    case "flagged":
      return <path d="M8 1l5.5 9.5h-11z" fill="var(--rust)" />;
    case "marks":
      return <MarkShape mark={layer.mark} />;
  }
}

function MarkShape({ mark }: { mark: MarkKind }) {
  switch (mark) {
    case "measured":
      return <circle cx={8} cy={6} r={4} fill="var(--ink)" />;
    case "predicted":
      return <circle cx={8} cy={6} r={2.5} fill="var(--sheet)" stroke="var(--ink-soft)" />;
    case "as-found":
      return <rect x={5} y={3} width={6} height={6} fill="var(--iron)" />;
    case "as-left":
      return <circle cx={8} cy={6} r={4} fill="var(--felt)" />;
    case "anchor":
    case "unsure":
      return <path d="M8 1l5 5-5 5-5-5z" fill="var(--sheet)" stroke="var(--ink)" strokeWidth={1.25} />;
  }
}
