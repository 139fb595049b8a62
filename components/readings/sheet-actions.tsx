"use client";

import { useState } from "react";
import { Button, LinkButton } from "@/components/ui/button";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";

type Change = (input: unknown) => Promise<ActionResult<{ version: number }>>;

/** The way to a sheet's circumstances; and archiving, which takes it out of sight and is taken back as easily. */
export function SheetActions({
  sheet,
  editHref,
  change,
}: {
  sheet: { id: string; version: number; archived: boolean };
  editHref: string;
  change: Change;
}) {
  const [busy, setBusy] = useState(false);

  async function setArchived(archived: boolean) {
    if (busy) return;
    setBusy(true);
    try {
      const result = await change({ id: sheet.id, version: sheet.version, archived });
      if (!result.ok) {
        showMessage({ kind: "attention", text: "Nothing was changed.", detail: result.error.message });
        return;
      }
      const { version } = result.data;
      toastWithUndo(archived ? "Sheet archived." : "Sheet restored.", async () => {
        const undone = await change({ id: sheet.id, version, archived: !archived });
        if (!undone.ok) throw new Error(undone.error.message);
      });
    } catch {
      showMessage({
        kind: "attention",
        text: "The server did not answer.",
        detail: "Nothing was changed. Check the connection and try again.",
      });
    } finally {
      setBusy(false);
    }
  }

  return (
    <>
      <LinkButton kind="quiet" href={editHref}>
        Circumstances
      </LinkButton>
      <Button kind="quiet" busy={busy} onClick={() => setArchived(!sheet.archived)}>
        {sheet.archived ? "Restore sheet" : "Archive sheet"}
      </Button>
    </>
  );
}
