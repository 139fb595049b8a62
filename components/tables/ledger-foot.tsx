"use client";

import { type ReactNode, useState } from "react";
import { useLetterKeys } from "../shell/letter-keys";
import { Button } from "../ui/button";
import { cx } from "../ui/class-names";
import { Kbd } from "../ui/kbd";
import { showMessage } from "../ui/message-queue";
import { Sign } from "../ui/sign";
import { StateWord } from "../ui/state-word";
import type { LedgerBulkAction, LedgerRow } from "./ledger-types";

/** Under the rows: how far the list goes; while rows are chosen it stays in sight with what can be done with them. */
export function LedgerFoot<Row extends LedgerRow>({
  shown,
  total,
  hasMore,
  waiting,
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
  /** The rows still belong to the question before; they are shown until the answer comes. */
  waiting: boolean;
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
      className={cx(
        "-mt-px flex min-h-14 phone:-mx-4 phone:px-4 flex-wrap items-center gap-x-4 gap-y-2 border-t border-edge bg-sheet py-2",
        chosen.length > 0 && "sticky bottom-[calc(var(--bar)+var(--strip))] z-10",
      )}
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
      <span
        className={cx("lab ml-auto flex items-center gap-x-3", chosen.length > 0 && "max-sm:hidden")}
        aria-live="polite"
      >
        {waiting ? "Loading" : extent(shown, total)}
        <LedgerKeys choose={bulkActions.length > 0} />
      </span>
    </div>
  );
}

/** What the keys do; without those of one letter, what does the same. */
function LedgerKeys({ choose }: { choose: boolean }) {
  const letters = useLetterKeys();
  return (
    <span className="flex items-center gap-3 touch:hidden" aria-hidden="true">
      <span className="flex items-center gap-1">
        {letters ? (
          <>
            <Kbd>J</Kbd> <Kbd>K</Kbd>
          </>
        ) : (
          <>
            <Kbd>
              <Sign name="arrow-down" size={10} />
            </Kbd>{" "}
            <Kbd>
              <Sign name="arrow-up" size={10} />
            </Kbd>
          </>
        )}{" "}
        move
      </span>
      <span className="flex items-center gap-1">
        <Kbd>Enter</Kbd> open
      </span>
      {choose ? (
        <span className="flex items-center gap-1">
          <Kbd>{letters ? "X" : "Space"}</Kbd> choose
        </span>
      ) : null}
    </span>
  );
}

function extent(shown: number, total: number | undefined): string {
  if (total === undefined) return `${shown} shown`;
  return total === shown ? `${shown} in all` : `1–${shown} of ${total}`;
}
