import type { QueryClient, QueryKey } from "@tanstack/react-query";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import type { Archivable, ArchiveAction } from "./archive-button";

/**
 * Archives or restores the chosen rows of a list, one after another, and offers to take it back. Rows that
 * were refused stay as they are and are counted.
 */
export async function archiveRows(
  rows: readonly Archivable[],
  archived: boolean,
  {
    action,
    client,
    listKey,
    words,
  }: {
    action: ArchiveAction;
    client: QueryClient;
    listKey: QueryKey;
    /** "customer", "customers". */
    words: readonly [string, string];
  },
): Promise<void> {
  const done: Archivable[] = [];
  let refusal = "";
  for (const { id, version } of rows) {
    const result = await action({ id, version, archived });
    if (result.ok) done.push(result.data);
    else refusal = result.error.message;
  }
  await client.invalidateQueries({ queryKey: listKey });
  if (done.length > 0) {
    const said = `${done.length} ${done.length === 1 ? words[0] : words[1]} ${archived ? "archived" : "restored"}.`;
    toastWithUndo(said, () => archiveRows(done, !archived, { action, client, listKey, words }));
  }
  const refused = rows.length - done.length;
  if (refused > 0) {
    showMessage({
      kind: "attention",
      text: `${refused} left as ${refused === 1 ? "it is" : "they are"}.`,
      detail: refusal,
    });
  }
}
