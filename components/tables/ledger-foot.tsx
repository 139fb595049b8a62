"use client";

import { type ReactNode, useState } from "react";
import { Button } from "../ui/button";
import { Kbd } from "../ui/kbd";
import { showMessage } from "../ui/message-queue";
import { StateWord } from "../ui/state-word";
import type { LedgerBulkAction, LedgerRow } from "./ledger-types";

/** Under the rows, staying in sight: what is chosen and what can be done with it, how far the list goes. */
export function LedgerFoot<Row extends LedgerRow>({
  shown,
  total,
  hasMore,
  loadingMore,
  moreFailed,
  onMore,
  chosen,
  chosenSummary,
  bulkActions,
  onClear,
}: {
  shown: number;
  total: number | undefined;
  hasMore: boolean;
  loadingMore: boolean;
  moreFailed: boolean;
  onMore: () => void;
  chosen: readonly Row[];
  chosenSummary?: (rows: readonly Row[]) => ReactNode;
  bulkActions: readonly LedgerBulkAction<Row>[];
  onClear: () => void;
}) {
  const [running, setRunning] = useState<string | null>(null);

  async function run(action: LedgerBulkAction<Row>) {
    setRunning(action.label);
    try {
      await action.run([...chosen]);
      onClear();
    } catch (error) {
      showMessage({
        kind: "attention",
        text: `“${action.label}” did not work.`,
        detail: error instanceof Error ? error.message : "The rows are still chosen: try again.",
      });
    } finally {
      setRunning(null);
    }
  }

  return (
    <div
      className="sticky bottom-[calc(var(--bar)+var(--strip))] z-10 -mt-px flex min-h-14 flex-wrap items-center gap-x-4 gap-y-2 border-t border-edge bg-sheet py-2 print:static"
      data-no-print
    >
      {chosen.length > 0 ? (
        <>
          <span className="font-semibold" aria-live="polite">
            {chosen.length} chosen{chosenSummary ? <>, {chosenSummary(chosen)}</> : null}
          </span>
          {bulkActions.map((action) => (
            <Button
              key={action.label}
              kind={action.kind ?? "secondary"}
              busy={running === action.label}
              onClick={() => run(action)}
            >
              {action.label}
            </Button>
          ))}
          <Button kind="quiet" onClick={onClear}>
            Choose none
          </Button>
        </>
      ) : null}
      {hasMore && chosen.length === 0 ? (
        <>
          <Button onClick={onMore} busy={loadingMore} busyLabel="Loading">
            Show more
          </Button>
          {moreFailed ? (
            <StateWord kind="attention" wrap>
              The rest could not be loaded. Try again.
            </StateWord>
          ) : null}
        </>
      ) : null}
      <span className="lab ml-auto flex items-center gap-x-3" aria-live="polite">
        {total === undefined
          ? `${shown} shown`
          : total === shown
            ? `${shown} in all`
            : `1–${shown} of ${total}`}
        <span className="flex items-center gap-1 touch:hidden" aria-hidden="true">
          <Kbd>J</Kbd> <Kbd>K</Kbd> move
        </span>
        {bulkActions.length > 0 ? (
          <span className="flex items-center gap-1 touch:hidden" aria-hidden="true">
            <Kbd>X</Kbd> choose
          </span>
        ) : null}
      </span>
    </div>
  );
}
