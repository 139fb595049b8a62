"use client";

import { useTransition } from "react";
import { Button } from "@/components/ui/button";
import { showMessage, toastWithUndo } from "@/components/ui/message-queue";
import type { ActionResult } from "@/lib/doors/action-result";
import type { StyleRecord } from "@/lib/plans/schema";

/** Takes a style off the lists; plans made with it stay as they are. */
export function ArchiveStyle({
  style,
  change,
}: {
  style: { id: string; name: string; version: number };
  change: (input: unknown) => Promise<ActionResult<StyleRecord>>;
}) {
  const [pending, start] = useTransition();
  const set = (archived: boolean, version: number) =>
    start(async () => {
      const result = await change({ id: style.id, version, archived });
      if (!result.ok) showMessage({ kind: "attention", text: result.error.message });
      else if (archived) toastWithUndo(`“${style.name}” archived.`, () => set(false, result.data.version));
    });
  return (
    <Button kind="quiet" busy={pending} onClick={() => set(true, style.version)}>
      Archive
    </Button>
  );
}
