import type { Live } from "./live-fit";
import { cellFault, isChanged, isWhole, partialsOf, type Row } from "./sheet-row";

/** How a row stands towards the server, in a word for its line and a sentence for its page. */
export type RowState = {
  kind: "empty" | "saved" | "saving" | "waiting" | "attention";
  word: string;
  sentence: string;
};

export function rowState(row: Row, live: Live, referenceHz: number): RowState {
  const { trouble } = row;
  if (trouble) return { kind: "attention", ...troubleWords(row) };
  if (row.sending) return { kind: "saving", word: "saving", sentence: "Saving." };
  if (!isChanged(row, referenceHz)) {
    return row.saved
      ? { kind: "saved", word: "saved", sentence: "Saved." }
      : { kind: "empty", word: "", sentence: "Nothing read yet." };
  }
  const partials = partialsOf(row);
  if (partials.length === 0) {
    return {
      kind: "attention",
      word: "empty",
      sentence: "Not saved yet: a note keeps at least one partial. Read one, or remove the note.",
    };
  }
  if (partials.some((partial) => cellFault(row, partial))) {
    return { kind: "attention", word: "not saved", sentence: "Not saved yet: mend the marked partial." };
  }
  if (live.questions.length > 0) {
    return { kind: "attention", word: "asks", sentence: "Not saved yet: answer the question." };
  }
  return isWhole(row, referenceHz)
    ? { kind: "waiting", word: "not saved yet", sentence: "Not saved yet." }
    : { kind: "waiting", word: "typing", sentence: "Not saved yet." };
}

function troubleWords({ trouble, removed }: Row): { word: string; sentence: string } {
  switch (trouble?.kind) {
    case "network":
      return {
        word: "not saved",
        sentence: removed
          ? "Not removed yet: the server does not answer. Trying again."
          : "Not saved: the server does not answer. Trying again; what you typed is safe here.",
      };
    case "signed-out":
      return {
        word: "not saved",
        sentence: "Not saved: you are signed out. What you typed is still here.",
      };
    case "stale":
      return {
        word: "changed",
        sentence: trouble.theirs
          ? "Not saved: somebody else changed this note meanwhile."
          : "Not saved: somebody else removed this note meanwhile.",
      };
    default:
      return { word: "not saved", sentence: trouble?.kind === "refused" ? trouble.message : "" };
  }
}
