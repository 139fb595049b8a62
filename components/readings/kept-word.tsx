"use client";

import { StateWord } from "@/components/ui/state-word";
import type { Clock } from "./sheet-about";
import type { Row } from "./sheet-row";

/** Whether the server has everything that was typed. */
export function KeptWord({
  rows,
  unsaved,
  savedAt,
  clock,
}: {
  rows: readonly Row[];
  unsaved: readonly Row[];
  savedAt: Date | null;
  clock: Clock;
}) {
  const troubled = unsaved.filter(({ trouble }) => trouble !== null).length;
  if (troubled > 0) {
    return (
      <StateWord kind="attention">
        {troubled === 1 ? "1 note not saved" : `${troubled} notes not saved`}
      </StateWord>
    );
  }
  if (rows.some(({ sending }) => sending)) return <StateWord kind="waiting">saving</StateWord>;
  if (unsaved.length > 0) {
    return (
      <StateWord kind="waiting">
        {unsaved.length === 1 ? "1 note not saved yet" : `${unsaved.length} notes not saved yet`}
      </StateWord>
    );
  }
  if (savedAt) return <StateWord kind="done">saved {timeOf(savedAt, clock)}</StateWord>;
  return rows.length > 0 ? (
    <StateWord kind="done">all saved</StateWord>
  ) : (
    <span className="text-ink-soft">rows save themselves</span>
  );
}

function timeOf(at: Date, { locale, timeZone }: Clock): string {
  return new Intl.DateTimeFormat(locale, { hour: "numeric", minute: "2-digit", timeZone }).format(at);
}
