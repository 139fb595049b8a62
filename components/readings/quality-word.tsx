import { StateWord } from "@/components/ui/state-word";
import type { FitResult } from "@/lib/acoustics/types";

const kinds = { good: "done", usable: "unsure", repeat: "attention" } as const;

/** In a word where the row has room for no more; aloud in full. */
export function qualityWords({ quality, warnings }: Pick<FitResult, "quality" | "warnings">): {
  word: string;
  full: string;
} {
  const tooFew = warnings.includes("exact-no-check") || warnings.includes("single-reading");
  return tooFew ? { word: "too few", full: "too few partials to check" } : { word: quality, full: quality };
}

/** How far the fit can be relied on, as a sign and a word. */
export function QualityWord({ fit }: { fit: Pick<FitResult, "quality" | "warnings"> }) {
  const { quality } = fit;
  const { word, full } = qualityWords(fit);
  return (
    <StateWord kind={kinds[quality]} className={quality === "usable" ? "text-ink-soft!" : undefined}>
      {word}
      {full === word ? null : <span className="sr-only">{full.slice(word.length)}</span>}
    </StateWord>
  );
}
