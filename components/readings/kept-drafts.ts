import type { KeptDraft } from "./sheet-answers";

/** What is typed and not yet saved, kept on the device so that neither a reload nor a closed tab loses it. */
const nameOf = (sheetId: string) => `agraffe:sheet:${sheetId}`;

export function keepDrafts(sheetId: string, drafts: readonly KeptDraft[]): void {
  try {
    if (drafts.length === 0) localStorage.removeItem(nameOf(sheetId));
    else localStorage.setItem(nameOf(sheetId), JSON.stringify(drafts));
  } catch {
    // Storage may be full or forbidden; the page itself still holds everything.
  }
}

export function readKeptDrafts(sheetId: string): KeptDraft[] {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(nameOf(sheetId)) ?? "[]");
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
