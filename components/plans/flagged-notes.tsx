import { SharpText } from "@/components/charts/note-name";
import { noteText } from "@/components/charts/note-spelling";
import { StateWord } from "@/components/ui/state-word";
import type { AnalysisRecord } from "@/lib/plans/schema";
import { flaggedKeys, flagWords } from "./analysis-plots";

/** Which notes the plan does not take at their reading, and what it takes instead. */
export function FlaggedNotes({ analysis }: { analysis: AnalysisRecord }) {
  const flagged = flaggedKeys(analysis);
  if (flagged.length === 0) return null;
  return (
    <div className="mt-4 max-w-160">
      <ul className="grid gap-1" aria-label="Notes that do not belong">
        {flagged.map((key) => (
          <li key={key.midi}>
            <StateWord kind="attention" wrap>
              <SharpText text={`${noteText(key.midi)} does not belong: ${flagWords(key)}`} />
            </StateWord>
          </li>
        ))}
      </ul>
      <p className="lab mt-1">
        Plan and beats follow the curve of the keyboard there, not the reading, until the note is read again.
      </p>
    </div>
  );
}
