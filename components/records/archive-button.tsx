"use client";

import { type QueryKey, useQueryClient } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";

export type Archivable = { id: string; version: number; archivedAt: string | null };
export type ArchiveAction = (input: unknown) => Promise<ActionResult<Archivable>>;

/** Takes a record out of the lists, or puts it back. Done at once and undone from the message: nothing is asked. */
export function ArchiveButton({
  name,
  record,
  action,
  listKey,
  listHref,
}: {
  name: string;
  record: Archivable;
  action: ArchiveAction;
  listKey: QueryKey;
  /** Where to go when it is archived. */
  listHref: string;
}) {
  const [busy, setBusy] = useState(false);
  const client = useQueryClient();
  const router = useRouter();

  async function write(archived: boolean, version: number) {
    const result = await action({ id: record.id, version, archived });
    if (!result.ok) throw new Error(result.error.message);
    await client.invalidateQueries({ queryKey: listKey });
    router.refresh();
    return result.data;
  }

  async function press() {
    setBusy(true);
    try {
      if (record.archivedAt) {
        await write(false, record.version);
        showMessage({ text: `${name} is back in the lists.` });
      } else {
        const { version } = await write(true, record.version);
        toastWithUndo(`${name} is archived.`, () => write(false, version));
        router.push(listHref as Route);
      }
    } catch (error) {
      showMessage({
        kind: "attention",
        text: `${name} was left as it is.`,
        detail: error instanceof Error ? error.message : undefined,
      });
    } finally {
      setBusy(false);
    }
  }

  return (
    <Button kind="quiet" busy={busy} onClick={press}>
      {record.archivedAt ? "Restore" : "Archive"}
    </Button>
  );
}
