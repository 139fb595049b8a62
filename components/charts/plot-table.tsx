"use client";

import { type ReactNode, useEffect, useRef, useState } from "react";
import { NoteName } from "./note-name";
import { spokenNote } from "./note-spelling";
import type { PlotTableData } from "./plot-types";

/** The same numbers as a plot, for screen readers and for copying. */

type ButtonProps = {
  open: boolean;
  controls: string;
  title: string;
  onClick: () => void;
  /** In place of "Numbers", where the word stands before several buttons. */
  children?: ReactNode;
};

/** The line it stands in is 20 px high; the target reaches 12 px beyond it on either side. */
export function NumbersButton({ open, controls, title, onClick, children }: ButtonProps) {
  return (
    <button
      type="button"
      aria-expanded={open}
      aria-controls={open ? controls : undefined}
      aria-label={children ? `Numbers: ${title}` : `${open ? "Hide numbers" : "Numbers"}: ${title}`}
      onClick={onClick}
      className="relative min-w-7 cursor-pointer font-semibold text-iron text-12 after:absolute after:-inset-x-2 after:-inset-y-3.5 after:content-['']"
    >
      {children ?? (open ? "Hide numbers" : "Numbers")}
    </button>
  );
}

/** Tab-separated, notes in words, for a spreadsheet. */
export function tableAsText(table: PlotTableData): string {
  const head = ["Note", ...table.columns.map((column) => column.spoken ?? textOf(column.label))];
  const rows = table.rows.map((row) => [
    spokenNote(row.midi),
    ...row.cells.map((cell) => cell.copy ?? cell.text),
  ]);
  return [head, ...rows].map((cells) => cells.join("\t")).join("\n");
}

function textOf(label: ReactNode): string {
  return typeof label === "string" || typeof label === "number" ? String(label) : "";
}

type TableProps = {
  id?: string;
  title: string;
  table: PlotTableData;
  cursor?: number | null;
  onCursor?: (midi: number) => void;
};

export function NumbersTable({ id, title, table, cursor = null, onCursor }: TableProps) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    // The row in hand stays in sight without moving the page.
    const frame = box.current?.querySelector("[data-scroll]");
    const row = box.current?.querySelector<HTMLElement>(`tr[data-midi="${cursor}"]`);
    if (frame && row) frame.scrollTop = row.offsetTop - frame.clientHeight / 2;
  }, [cursor]);
  return (
    <div ref={box} id={id} className="mt-4">
      <div className="flex items-center gap-3">
        <h3>{title}</h3>
        <CopyButton table={table} />
      </div>
      <section
        data-scroll
        aria-label={`${title}: numbers`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a scrolling region must be reachable by keyboard
        tabIndex={0}
        className="relative mt-2 max-h-80 overflow-auto border-edge border-t"
      >
        <table className="w-full border-collapse tabular-nums">
          <thead>
            <tr>
              <th
                scope="col"
                className="sticky top-0 bg-sheet py-1.5 pr-3 pl-3 text-left font-medium text-12 text-ink-soft"
              >
                Note
              </th>
              {table.columns.map((column) => (
                <th
                  key={column.key}
                  scope="col"
                  className="sticky top-0 bg-sheet py-1.5 pr-3 text-right font-medium text-12 text-ink-soft"
                >
                  {column.label}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.rows.map((row) => (
              <tr
                key={row.midi}
                data-midi={row.midi}
                aria-current={row.midi === cursor ? "true" : undefined}
                onClick={onCursor && (() => onCursor(row.midi))}
                className="border-hairline border-b transition-none aria-[current]:bg-brass-wash"
              >
                <th scope="row" className="h-9 pl-3 text-left font-normal font-serif text-16">
                  <NoteName midi={row.midi} />
                </th>
                {row.cells.map((cell, index) => (
                  <td key={table.columns[index]?.key} className="whitespace-nowrap pr-3 text-right">
                    {cell.text}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </div>
  );
}

function CopyButton({ table }: { table: PlotTableData }) {
  const [said, setSaid] = useState("");
  async function copy() {
    try {
      await navigator.clipboard.writeText(tableAsText(table));
      setSaid(`${table.rows.length} rows copied`);
    } catch {
      setSaid("The browser refused to copy: select the rows instead");
    }
  }
  return (
    <>
      <button
        type="button"
        onClick={copy}
        className="-my-3 inline-flex min-h-11 min-w-11 cursor-pointer items-center justify-center font-semibold text-12 text-iron"
      >
        Copy
      </button>
      <span role="status" className="text-12 text-ink-soft">
        {said}
      </span>
    </>
  );
}
