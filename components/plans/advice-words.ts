import { fixed } from "@/components/charts/format";
import { noteText } from "@/components/charts/note-spelling";
import type { AnalysisRecord } from "@/lib/plans/schema";

const registerWords = {
  bass: "the bass",
  tenor: "the tenor",
  middle: "the middle",
  treble: "the treble",
  top: "the top",
} as const;

/** "Mean band ± 1.0 cents: enough, F6 would gain 0.17." or what to read next and where it is widest. */
export function adviceSentence({ advice, priorOnly }: Pick<AnalysisRecord, "advice" | "priorOnly">): string {
  const band = `Mean band ± ${fixed(advice.meanBandCents, 1)} cents`;
  const best = advice.next[0];
  if (!best) return `${band}: every note is read.`;
  const gain = fixed(advice.meanBandCents - best.meanBandCents, 2);
  const name = noteText(best.midi);
  if (priorOnly) return `${band}, from what pianos are like: read ${name} first.`;
  if (advice.enough) return `${band}: enough, ${name} would gain ${gain}.`;
  return `${band}, widest in ${registerWords[advice.widest.register]}: ${name} would gain ${gain}.`;
}
