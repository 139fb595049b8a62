import type { ResidualPoint } from "@/components/charts/residual-lane";
import type { FitResult } from "@/lib/acoustics/types";
import { editedReading, type ReadingUnit, shownReading } from "@/lib/readings/typed-number";
import type { Live } from "./live-fit";
import { type Cell, cellFault, cellHz, type Row } from "./sheet-row";

export type CellLook = "plain" | "left-out" | "asked" | "wrong";

/** How a cell stands: its own fault first, then the question, then what the fit made of it. */
export function cellLook(row: Row, partial: number, live: Live): CellLook {
  if (cellFault(row, partial)) return "wrong";
  if (live.questions.some((question) => question.partial === partial)) return "asked";
  return live.fit?.rejected.some((one) => one.partial === partial) ? "left-out" : "plain";
}

/**
 * The text in a cell. What was typed stands as typed in the unit it was typed in; turning the view to the
 * other unit shows the same frequency there, and leaves what is no number alone.
 */
export function cellText(
  row: Row,
  partial: number,
  view: { unit: ReadingUnit; referenceHz: number; inHand: boolean },
): string {
  const cell: Cell | undefined = row.cells[partial];
  if (!cell) return "";
  if (cell.kind === "typed" && cell.unit === view.unit) return cell.text;
  const hz = cellHz(row, partial, view.referenceHz);
  if (hz === null) return cell.kind === "typed" ? cell.text : "";
  const harmonic = { partial, midi: row.place.midi, referenceHz: view.referenceHz };
  return (view.inHand ? editedReading : shownReading)(hz, view.unit, harmonic);
}

/** Distances from the curve, those left out marked as such. */
export function residualPoints(fit: FitResult | null): ResidualPoint[] {
  if (!fit || fit.used.length < 2) return [];
  const leftOut = new Set(fit.rejected.map(({ partial }) => partial));
  return fit.residuals.map(({ partial, cents }) => ({ partial, cents, leftOut: leftOut.has(partial) }));
}

/** Half of the 95 % interval of B, in the middle of which the estimate lies as nearly as matters on the page. */
export function halfB(fit: FitResult): number | null {
  return fit.bLow === null || fit.bHigh === null ? null : (fit.bHigh - fit.bLow) / 2;
}
