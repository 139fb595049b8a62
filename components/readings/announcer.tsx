"use client";

import { useEffect, useState } from "react";
import { spokenNote } from "@/components/charts/note-spelling";
import { halfB } from "./cell-look";
import type { Live } from "./live-fit";
import { qualityWords } from "./quality-word";
import type { RowState } from "./row-state";
import type { Row } from "./sheet-row";

const PAUSE_MS = 700;

/** Says the fit of the note in hand to those who do not see it, once the typing rests. */
export function Announcer({
  row,
  live,
  state,
}: {
  row: Row | null;
  live: Live | null;
  state: RowState | null;
}) {
  const words = row && live && state ? sentence(row, live, state) : "";
  const [said, setSaid] = useState("");
  useEffect(() => {
    const timer = setTimeout(() => setSaid(words), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [words]);
  return (
    <p aria-live="polite" className="sr-only">
      {said}
    </p>
  );
}

function sentence(row: Row, live: Live, state: RowState): string {
  const name = spokenNote(row.place.midi);
  if (state.kind === "attention") return `${name}. ${state.sentence}`;
  const { fit } = live;
  if (!fit || fit.b === null) return "";
  const half = halfB(fit);
  const unit = (value: number) => (value * 1e4).toFixed(2);
  const b = `B ${unit(fit.b)}${half === null ? "" : ` plus or minus ${unit(half)}`} times ten to the minus four`;
  const leftOut = fit.rejected.map(({ partial }) => partial);
  const out = leftOut.length > 0 ? ` Left out: partial ${leftOut.join(", ")}.` : "";
  return `${name}: ${b}, ${qualityWords(fit).full}.${out}`;
}
