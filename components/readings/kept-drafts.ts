import type { KeptDraft } from "./sheet-answers";

/** What is typed and not yet saved, kept in the tab so that a reload loses nothing. */
const nameOf = (sheetId: string) => `agraffe:sheet:${sheetId}`;

export function keepDrafts(sheetId: string, drafts: readonly KeptDraft[]): void {
  try {
    if (drafts.length === 0) sessionStorage.removeItem(nameOf(sheetId));
    else sessionStorage.setItem(nameOf(sheetId), JSON.stringify(drafts));
  } catch {
    // Storage may be full or forbidden; the page itself still holds everything.
  }
}

export function readKeptDrafts(sheetId: string): KeptDraft[] {
  try {
    const kept: unknown = JSON.parse(sessionStorage.getItem(nameOf(sheetId)) ?? "[]");
    return Array.isArray(kept) ? kept.filter(isDraft) : [];
  } catch {
    return [];
  }
}

function isDraft(kept: unknown): kept is KeptDraft {
  if (typeof kept !== "object" || kept === null) return false;
  const { place, version, draft, sent } = kept as Partial<KeptDraft>;
  return (
    typeof place?.midi === "number" &&
    typeof place.take === "number" &&
    typeof version === "number" &&
    typeof draft?.cells === "object" &&
    [draft.kept, draft.dropped, draft.confirmed, sent ?? []].every(Array.isArray)
  );
}
