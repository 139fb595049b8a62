"use client";

import { type QueryKey, useQueryClient } from "@tanstack/react-query";
import { type ReactNode, useState } from "react";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import { openVisits } from "@/lib/visits/open/schema";
import { type Archivable, type Asked, OpenVisitsDialog } from "./open-visits-dialog";

export type ArchiveAction = (input: unknown) => Promise<ActionResult<Archivable>>;

/**
 * Takes records out of the lists or puts them back, one after another: done at once and undone from the message.
 * Asked only where visits are not over yet. What was refused stays as it is and is counted.
 */
export function useArchive({
  action,
  listKey,
  words,
  locale,
  onDone,
}: {
  /** Absent where the person may not: nothing calls then. */
  action: ArchiveAction | undefined;
  listKey: QueryKey;
  /** "customer", "customers". */
  words: readonly [string, string];
  locale: string;
  onDone?: (archived: boolean) => void;
}): {
  archive: (records: readonly Archivable[], archived: boolean) => Promise<void>;
  question: ReactNode;
} {
  const client = useQueryClient();
  const [asking, setAsking] = useState<Asked[]>([]);
  const [busy, setBusy] = useState(false);

  async function archive(records: readonly Archivable[], archived: boolean, confirm = false): Promise<void> {
    if (!action) return;
    const done: Archivable[] = [];
    const asked: Asked[] = [];
    const refusals: string[] = [];
    for (const record of records) {
      const { id, version } = record;
      const result = await action({ id, version, archived, ...(confirm ? { confirm } : {}) }).catch(
        () => null,
      );
      if (result?.ok) {
        done.push(result.data);
        continue;
      }
      const open =
        result?.error.code === "needs-confirming"
          ? openVisits.safeParse(result.error.current).data
          : undefined;
      if (open) asked.push({ record, open });
      else refusals.push(result?.error.message ?? "The server did not answer. Try again.");
    }
    await client.invalidateQueries({ queryKey: listKey });
    setAsking(asked);
    if (done.length > 0) {
      toastWithUndo(said(done, archived, words), () => archive(done, !archived, true));
      onDone?.(archived);
    }
    if (refusals.length > 0) {
      const [only] = records;
      showMessage({
        kind: "attention",
        text:
          records.length === 1 && only
            ? `${only.name} was left as it is.`
            : `${refusals.length} left as ${refusals.length === 1 ? "it is" : "they are"}.`,
        detail: refusals.at(-1),
      });
    }
  }

  return {
    archive,
    question: (
      <OpenVisitsDialog
        asked={asking}
        words={words}
        locale={locale}
        busy={busy}
        onKeep={() => setAsking([])}
        onArchive={async () => {
          setBusy(true);
          await archive(
            asking.map(({ record }) => record),
            true,
            true,
          );
          setBusy(false);
        }}
      />
    ),
  };
}

function said(done: readonly Archivable[], archived: boolean, words: readonly [string, string]): string {
  const [only] = done;
  if (done.length === 1 && only) return `${only.name} is ${archived ? "archived" : "back in the lists"}.`;
  return `${done.length} ${words[1]} ${archived ? "archived" : "restored"}.`;
}
