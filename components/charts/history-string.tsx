"use client";

import { type ReactNode, useRef } from "react";
import { fixed, signed } from "./format";
import {
  type HistoryMeasures,
  historyLimit,
  historyMeasures,
  historyPlace,
  numberSide,
} from "./history-scale";
import { useWidth } from "./use-width";

/** The dated history of an instrument, hung on the string at pitch: newest first. */

export type HistoryEntry = {
  id: string;
  /** As printed: "26 Nov 2025"; a link where the page wants one. */
  date: ReactNode;
  work: ReactNode;
  asFoundCents: number | null;
  /** Null while the instrument has not been tuned on this visit. */
  asLeftCents: number | null;
  humidityPercent: number | null;
};

const ROW = 44;
const LINE = 18;

export function HistoryString({
  entries,
  ground = "var(--paper)",
}: {
  entries: readonly HistoryEntry[];
  ground?: string;
}) {
  const box = useRef<HTMLDivElement>(null);
  const measures = historyMeasures(useWidth(box, 332));
  const values = entries
    .flatMap((entry) => [entry.asFoundCents, entry.asLeftCents])
    .filter((v) => v !== null);
  const limit = historyLimit(values);
  return (
    <div ref={box} className="text-12 text-ink-soft tabular-nums">
      <div className="relative h-[18px] border-hairline border-b leading-4">
        <span
          className="absolute top-0 translate-x-1/2 whitespace-nowrap"
          style={{ right: measures.stringFromRight }}
        >
          pitch, cents
        </span>
        <span className="absolute top-0 right-0">humidity</span>
      </div>
      <div className="relative">
        <div
          className="absolute inset-y-0 w-px bg-edge"
          style={{ right: measures.stringFromRight - 0.5 }}
          aria-hidden="true"
        />
        <ol>
          {entries.map((entry, index) => (
            <HistoryRow
              key={entry.id}
              entry={entry}
              first={index === 0}
              limit={limit}
              measures={measures}
              ground={ground}
            />
          ))}
        </ol>
      </div>
      <HistoryKey />
    </div>
  );
}

type RowProps = {
  entry: HistoryEntry;
  first: boolean;
  limit: number;
  measures: HistoryMeasures;
  ground: string;
};

function HistoryRow({ entry, first, limit, measures, ground }: RowProps) {
  const { stringFromRight, reach } = measures;
  const farFlat =
    entry.asFoundCents !== null && historyPlace(entry.asFoundCents, limit, reach).offset <= -reach;
  return (
    <li className={`relative leading-4 ${first ? "" : "border-hairline border-t"}`} style={{ height: ROW }}>
      <div className="absolute top-2.5 left-0 font-semibold text-ink">{entry.date}</div>
      <div
        className="absolute top-[26px] left-0 truncate"
        style={{ right: stringFromRight + (farFlat ? reach + 22 : 6) }}
      >
        {entry.work}
      </div>
      <HistoryMark entry={entry} limit={limit} measures={measures} ground={ground} />
      <span className="absolute top-2.5 right-0 text-ink">
        <span className="sr-only">humidity </span>
        {entry.humidityPercent === null ? "–" : `${fixed(entry.humidityPercent, 0)} %`}
      </span>
    </li>
  );
}

function words({ asFoundCents, asLeftCents }: HistoryEntry): string {
  const parts = [
    asFoundCents !== null && `as found ${signed(asFoundCents, 1)} cents`,
    asLeftCents !== null && `as left ${signed(asLeftCents, 1)} cents`,
  ].filter(Boolean);
  return parts.length > 0 ? parts.join(", ") : "pitch not read";
}

function HistoryMark({ entry, limit, measures, ground }: Omit<RowProps, "first">) {
  const { reach, stringFromRight } = measures;
  const found = entry.asFoundCents === null ? null : historyPlace(entry.asFoundCents, limit, reach);
  const left = entry.asLeftCents === null ? null : historyPlace(entry.asLeftCents, limit, reach);
  const from = left?.offset ?? 0;
  return (
    // Zero of the drawing is the string; the words reach out on either side.
    <svg
      width={1}
      height={ROW}
      role="img"
      aria-label={words(entry)}
      className="pointer-events-none absolute top-0 overflow-visible"
      style={{ right: stringFromRight - 1, fontSize: 12 }}
    >
      {found && entry.asFoundCents !== null && (
        <Found offset={found.offset} beyond={found.beyond} from={from} measures={measures}>
          {signed(entry.asFoundCents, 1)}
        </Found>
      )}
      {left ? (
        <circle cx={from} cy={LINE} r={4} fill="var(--felt)" />
      ) : (
        <circle cx={0} cy={LINE} r={3.5} fill={ground} stroke="var(--ink-soft)" />
      )}
    </svg>
  );
}

type FoundProps = {
  offset: number;
  beyond: boolean;
  from: number;
  measures: HistoryMeasures;
  children: string;
};

function Found({ offset, beyond, from, measures, children }: FoundProps) {
  const way = offset < 0 ? -1 : 1;
  const side = numberSide(offset, measures);
  return (
    <>
      <path d={`M${from} ${LINE}H${offset}`} stroke="var(--iron)" strokeWidth={1.5} />
      {beyond ? (
        <path d={`M${offset + way * 2} ${LINE}l${-way * 7} -4v8z`} fill="var(--iron)" />
      ) : (
        <rect x={offset - 3.5} y={LINE - 3.5} width={7} height={7} fill="var(--iron)" />
      )}
      {beyond ? (
        // Off the scale the number goes below the arrow, clear of date and humidity.
        <text x={offset} y={LINE + 18} textAnchor="middle" fill="var(--ink)">
          {children}
        </text>
      ) : (
        <text
          x={side === way ? offset + side * 8 : side * 10}
          y={LINE + 4}
          textAnchor={side < 0 ? "end" : "start"}
          fill="var(--ink)"
        >
          {children}
        </text>
      )}
    </>
  );
}

function HistoryKey() {
  return (
    <div className="mt-3 flex gap-4" aria-hidden="true">
      <span className="flex items-center gap-1.5">
        <svg width={8} height={8} aria-hidden="true">
          <rect width={8} height={8} fill="var(--iron)" />
        </svg>
        as found
      </span>
      <span className="flex items-center gap-1.5">
        <svg width={8} height={8} aria-hidden="true">
          <circle cx={4} cy={4} r={4} fill="var(--felt)" />
        </svg>
        as left, on the string
      </span>
    </div>
  );
}
