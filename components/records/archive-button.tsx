"use client";

import type { QueryKey } from "@tanstack/react-query";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import type { Archivable } from "./open-visits-dialog";
import { type ArchiveAction, useArchive } from "./use-archive";

/** Takes one record out of the lists, or puts it back. */
export function ArchiveButton({
  record,
  action,
  listKey,
  listHref,
  words,
  locale,
}: {
  record: Archivable;
  action: ArchiveAction;
  listKey: QueryKey;
  /** Where to go when it is archived. */
  listHref: string;
  words: readonly [string, string];
  locale: string;
}) {
  const [busy, setBusy] = useState(false);
  const router = useRouter();
  const { archive, question } = useArchive({
    action,
    listKey,
    words,
    locale,
    onDone: (archived) => {
      router.refresh();
      if (archived) router.push(listHref as Route);
    },
  });

  async function press() {
    setBusy(true);
    await archive([record], record.archivedAt === null);
    setBusy(false);
  }

  return (
    <>
      <Button kind="quiet" busy={busy} onClick={press}>
        {record.archivedAt ? "Restore" : "Archive"}
      </Button>
      {question}
    </>
  );
}
