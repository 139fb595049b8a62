import type { ReactNode } from "react";
import { fixed, signed } from "./format";
import { type HistoryPlace, historyLimit, historyPlace } from "./history-scale";

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

/** Room for the drawing on either side of the string, numbers included. */
const REACH = 62;
const NUMBER_ROOM = 44;
const LANE = 2 * (REACH + NUMBER_ROOM);
const ROW = 44;
const LINE = 18;

export function HistoryString({
  entries,
  ground = "var(--paper)",
}: {
  entries: readonly HistoryEntry[];
  ground?: string;
}) {
  const values = entries
    .flatMap((entry) => [entry.asFoundCents, entry.asLeftCents])
    .filter((v) => v !== null);
  const limit = historyLimit(values);
  return (
    <div className="relative text-12 text-ink-soft tabular-nums" style={{ minWidth: 288 }}>
      {/* The string itself: one line behind all rows. Its place is that of the lane's middle. */}
      <div className="relative h-[18px] border-hairline border-b">
        <span className="-translate-x-1/2 absolute top-0 leading-4" style={{ right: 118 }}>
          <span className="absolute right-0 translate-x-1/2 whitespace-nowrap">pitch, cents</span>
        </span>
        <span className="absolute top-0 right-0 leading-4">humidity</span>
      </div>
      <ol className="relative">
        <li aria-hidden="true" className="absolute inset-y-0 w-px bg-edge" style={{ right: 117.5 }} />
        {entries.map((entry, index) => (
          <li
            key={entry.id}
            className={`relative ${index > 0 ? "border-hairline border-t" : ""}`}
            style={{ height: ROW }}
          >
            <div className="absolute top-2 left-0 leading-4" style={{ right: 118 + 8 }}>
              <div className="font-semibold text-ink">{entry.date}</div>
            </div>
            <div className="absolute top-6 left-0 max-w-full truncate leading-4" style={{ right: 118 + 6 }}>
              {entry.work}
            </div>
            <HistoryMark entry={entry} limit={limit} ground={ground} />
            <span className="absolute right-0 leading-4 text-ink" style={{ top: LINE - 8 }}>
              <span className="sr-only">humidity </span>
              {entry.humidityPercent === null ? "–" : `${fixed(entry.humidityPercent, 0)} %`}
            </span>
          </li>
        ))}
      </ol>
      <HistoryKey />
    </div>
  );
}

function words({ asFoundCents, asLeftCents }: HistoryEntry): string {
  const parts = [
    asFoundCents !== null && `as found ${signed(asFoundCents, 1)} cents`,
    asLeftCents !== null && `as left ${signed(asLeftCents, 1)} cents`,
  ].filter(Boolean);
  return parts.length > 0 ? parts.join(", ") : "pitch not read";
}

function HistoryMark({ entry, limit, ground }: { entry: HistoryEntry; limit: number; ground: string }) {
  const middle = LANE / 2;
  const found = entry.asFoundCents === null ? null : historyPlace(entry.asFoundCents, limit, REACH);
  const left = entry.asLeftCents === null ? null : historyPlace(entry.asLeftCents, limit, REACH);
  const from = middle + (left?.offset ?? 0);
  return (
    <svg
      width={LANE}
      height={ROW}
      viewBox={`0 0 ${LANE} ${ROW}`}
      role="img"
      aria-label={words(entry)}
      className="pointer-events-none absolute top-0 overflow-visible"
      style={{ right: 118 - middle, fontSize: 12 }}
    >
      {found && entry.asFoundCents !== null && (
        <Found place={found} from={from} middle={middle} text={signed(entry.asFoundCents, 1)} />
      )}
      {left ? (
        <circle cx={from} cy={LINE} r={4} fill="var(--felt)" />
      ) : (
        <circle cx={middle} cy={LINE} r={3.5} fill={ground} stroke="var(--ink-soft)" />
      )}
    </svg>
  );
}

type FoundProps = { place: HistoryPlace; from: number; middle: number; text: string };

function Found({ place, from, middle, text }: FoundProps) {
  const x = middle + place.offset;
  const way = place.offset < 0 ? -1 : 1;
  return (
    <>
      <path d={`M${from} ${LINE}H${x}`} stroke="var(--iron)" strokeWidth={1.5} />
      {place.beyond ? (
        <path d={`M${x + way * 2} ${LINE}l${-way * 7} -4v8z`} fill="var(--iron)" />
      ) : (
        <rect x={x - 3.5} y={LINE - 3.5} width={7} height={7} fill="var(--iron)" />
      )}
      <text
        // Off the scale the number goes below the arrow, clear of the date.
        x={place.beyond ? x : x + way * 8}
        y={place.beyond ? LINE + 18 : LINE + 4}
        textAnchor={place.beyond ? "middle" : way < 0 ? "end" : "start"}
        fill="var(--ink)"
      >
        {text}
      </text>
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
