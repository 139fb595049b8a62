import { StateWord } from "@/components/ui/state-word";
import type { Quality } from "@/lib/acoustics/types";

const kinds = { good: "done", usable: "unsure", repeat: "attention" } as const;

/** How far the fit can be relied on, as a sign and a word. */
export function QualityWord({ quality }: { quality: Quality }) {
  return (
    <StateWord kind={kinds[quality]} className={quality === "usable" ? "text-ink-soft!" : undefined}>
      {quality}
    </StateWord>
  );
}
