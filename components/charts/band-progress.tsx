"use client";

import { useRef } from "react";
import { fixed } from "./format";
import { useWidth } from "./use-width";

/** How the plan's mean 95 % band narrows with the notes read, and what the next notes are worth. */

export type BandStep = { notes: number; meanBandCents: number };

type Props = {
  /** One step per note read so far; the last one is now. */
  read: readonly BandStep[];
  /** What reading the proposed notes would give, nearest first. */
  predicted: readonly BandStep[];
  ground?: string;
};

const HEIGHT = 96;
const LEFT = 28;
const RIGHT = 8;
const FLOOR = 80;
const CEILING = 16;
const STEPS = [0.5, 1, 2, 5, 10, 20, 50];

/** Labelled lines from zero, three or fewer above it. */
export function progressTicks(largest: number): number[] {
  const step = STEPS.find((candidate) => largest / candidate <= 3.4) ?? 100;
  const ticks: number[] = [];
  for (let value = 0; value <= largest * 1.05 || ticks.length < 2; value += step) ticks.push(value);
  return ticks;
}

const join = (points: readonly { x: number; y: number }[]) =>
  `M${points.map(({ x, y }) => `${x.toFixed(1)} ${y.toFixed(1)}`).join("L")}`;

export function BandProgress({ read, predicted, ground = "var(--paper)" }: Props) {
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, 332);
  const all = [...read, ...predicted];
  const now = read.at(-1);
  const first = all[0];
  const last = all.at(-1);
  if (!first || !last) return null;

  const ticks = progressTicks(Math.max(...all.map((step) => step.meanBandCents)));
  const top = Math.max(ticks.at(-1) ?? 1, ...all.map((step) => step.meanBandCents));
  const span = Math.max(1, last.notes - first.notes);
  const place = (step: BandStep) => ({
    x: LEFT + ((step.notes - first.notes) / span) * (width - LEFT - RIGHT),
    y: FLOOR - (step.meanBandCents / top) * (FLOOR - CEILING),
  });
  const decimals = ticks.some((tick) => tick % 1 !== 0) ? 1 : 0;
  const here = now && place(now);

  return (
    <div ref={box}>
      <svg
        width={width}
        height={HEIGHT}
        viewBox={`0 0 ${width} ${HEIGHT}`}
        role="img"
        aria-label={describe(read, predicted)}
        style={{ display: "block", fontSize: 12, fontVariantNumeric: "tabular-nums" }}
      >
        {ticks.map((tick) => {
          const y = FLOOR - (tick / top) * (FLOOR - CEILING);
          return (
            <g key={tick}>
              <path d={`M${LEFT} ${Math.round(y) + 0.5}H${width}`} stroke="var(--hairline)" />
              <text x={LEFT - 8} y={y + 4} textAnchor="end" fill="var(--ink-soft)">
                {fixed(tick, decimals)}
              </text>
            </g>
          );
        })}
        {read.length > 1 && (
          <path d={join(read.map(place))} fill="none" stroke="var(--ink)" strokeWidth={1.25} />
        )}
        {predicted.length > 0 && (
          <path
            d={join([...(now ? [now] : []), ...predicted].map(place))}
            fill="none"
            stroke="var(--ink)"
            strokeWidth={1.25}
            strokeDasharray="2 3"
          />
        )}
        {read.slice(0, -1).map((step) => {
          const { x, y } = place(step);
          return <circle key={step.notes} cx={x} cy={y} r={3.5} fill="var(--ink)" stroke={ground} />;
        })}
        {predicted.map((step) => {
          const { x, y } = place(step);
          return <circle key={step.notes} cx={x} cy={y} r={3} fill={ground} stroke="var(--ink-soft)" />;
        })}
        <Ends first={first} last={last} now={now} place={place} width={width} />
        {now && here && (
          <>
            <circle cx={here.x} cy={here.y} r={4.5} fill="var(--brass-fill)" />
            <text
              x={Math.min(width - 34, Math.max(LEFT + 30, here.x))}
              y={Math.max(11, here.y - 10)}
              textAnchor="middle"
              fill="var(--ink)"
              fontWeight={600}
              style={{ paintOrder: "stroke", stroke: ground, strokeWidth: 4, strokeLinejoin: "round" }}
            >
              now ± {fixed(now.meanBandCents, 1)}
            </text>
          </>
        )}
      </svg>
    </div>
  );
}

type EndsProps = {
  first: BandStep;
  last: BandStep;
  now: BandStep | undefined;
  place: (step: BandStep) => { x: number; y: number };
  width: number;
};

/** Counts under the ends and under now; an end too near to now gives way. */
function Ends({ first, last, now, place, width }: EndsProps) {
  const here = now ? place(now).x : null;
  const clear = (x: number) => here === null || Math.abs(here - x) > 44;
  const y = HEIGHT - 2;
  return (
    <g fill="var(--ink-soft)" textAnchor="middle">
      {clear(LEFT) && (
        <text x={LEFT} y={y}>
          {first.notes}
        </text>
      )}
      {now && here !== null && (
        <text x={Math.min(width - 24, Math.max(LEFT + 12, here))} y={y}>
          {now.notes} {now.notes === 1 ? "note" : "notes"}
        </text>
      )}
      {clear(width - RIGHT) && (
        <text x={width - RIGHT} y={y} textAnchor="end">
          {last.notes}
        </text>
      )}
    </g>
  );
}

function describe(read: readonly BandStep[], predicted: readonly BandStep[]): string {
  const now = read.at(-1);
  const end = predicted.at(-1);
  return [
    "Mean band of the plan against notes read",
    now && `now plus or minus ${fixed(now.meanBandCents, 1)} cents with ${now.notes} notes`,
    end && `with ${end.notes} notes ${fixed(end.meanBandCents, 1)} cents expected`,
  ]
    .filter(Boolean)
    .join("; ");
}
