import { signed } from "./format";

/**
 * Distance of each partial from the fitted curve: a thin lane under a row of the sheet, a tall one with its
 * axis in the open row, and a standing one beside each partial on the phone.
 */

export type ResidualPoint = {
  partial: number;
  cents: number;
  /** Left out of the fit; drawn as a hollow triangle. */
  leftOut?: boolean;
};

type LaneProps = {
  points: readonly ResidualPoint[];
  columnWidth?: number;
  columns?: number;
  /** First partial shown, when the sheet is turned to partials 11 to 16. */
  firstPartial?: number;
};

const hollowTriangle = (x: number, y: number, size: number) =>
  `M${x} ${y - size}l${size} ${size * 1.75}h${-2 * size}z`;

const inView = (points: readonly ResidualPoint[], first: number, columns: number) =>
  points.filter((point) => point.partial >= first && point.partial < first + columns);

function describe(points: readonly ResidualPoint[]): string {
  if (points.length === 0) return "No partials read yet";
  const words = points.map(
    ({ partial, cents, leftOut }) => `${partial}: ${signed(cents, 1)}${leftOut ? " left out" : ""}`,
  );
  return `Cents off the curve, by partial. ${words.join("; ")}`;
}

/** 16 px high, laid under the cells of one row. */
export function ResidualLane({ points, columnWidth = 56, columns = 10, firstPartial = 1 }: LaneProps) {
  const width = columnWidth * columns;
  const shown = inView(points, firstPartial, columns);
  const clip = (cents: number) => Math.max(-5.5, Math.min(5.5, cents * 2.5));
  return (
    <svg
      width={width}
      height={16}
      viewBox={`0 0 ${width} 16`}
      role="img"
      aria-label={describe(shown)}
      style={{ display: "block", pointerEvents: "none" }}
    >
      <path d={`M0 8.5H${width}`} stroke="var(--grid)" />
      {shown.map(({ partial, cents, leftOut }) => {
        const x = (partial - firstPartial + 0.5) * columnWidth;
        const y = 8.5 - clip(cents);
        return leftOut ? (
          <path
            key={partial}
            d={hollowTriangle(x, Math.min(11, Math.max(5.5, y)), 4)}
            fill="none"
            stroke="var(--rust)"
            strokeWidth={1.25}
          />
        ) : (
          <circle key={partial} cx={x} cy={y} r={2.5} fill="var(--ink)" />
        );
      })}
    </svg>
  );
}

type OpenProps = LaneProps & {
  /** Width of the note's column, left of the first partial: the axis labels stand in it. */
  leading?: number;
  /** Expected scatter at 95 % as half-widths in cents, by partial. */
  expected?: readonly { partial: number; halfCents: number }[];
  /** Words beside a partial left out; "left out" where none are given. */
  words?: Readonly<Record<number, string>>;
  /** Colour behind the lane, so that dots keep their ring. */
  ground?: string;
};

const OPEN_HEIGHT = 116;
const OPEN_ZERO = 58;

/** The lane of the note in hand. Taller steps are taken when a partial lies further out than 15 cents. */
export function OpenResidualLane(props: OpenProps) {
  const { points, columnWidth = 56, columns = 10, firstPartial = 1, leading = 72 } = props;
  const { expected = [], words = {}, ground = "var(--brass-wash)" } = props;
  const right = leading + columnWidth * columns;
  const shown = inView(points, firstPartial, columns);
  const used = shown.filter((point) => !point.leftOut).map((point) => Math.abs(point.cents));
  const step = laneStep(Math.max(0, ...used));
  const scale = 31 / step;
  const limit = 46;
  const x = (partial: number) => leading + (partial - firstPartial + 0.5) * columnWidth;
  const y = (cents: number) => OPEN_ZERO - Math.max(-limit, Math.min(limit, cents * scale));
  return (
    <svg
      width={right + 12}
      height={OPEN_HEIGHT}
      viewBox={`0 0 ${right + 12} ${OPEN_HEIGHT}`}
      role="img"
      aria-label={describe(shown)}
      style={{ display: "block", fontSize: 12, fontVariantNumeric: "tabular-nums" }}
    >
      {[-step, 0, step].map((cents) => (
        <g key={cents}>
          <path
            d={`M${leading - 12} ${Math.round(y(cents)) + 0.5}H${right}`}
            stroke={cents === 0 ? "var(--edge)" : "var(--hairline)"}
          />
          <text x={leading - 20} y={y(cents) + 4} textAnchor="end" fill="var(--ink-soft)">
            {cents === 0 ? "0" : signed(cents, 0)}
          </text>
        </g>
      ))}
      <ExpectedScatter expected={expected} x={x} y={y} left={leading} right={right} />
      {shown.map(({ partial, cents, leftOut }) =>
        leftOut ? (
          <LeftOut
            key={partial}
            x={x(partial)}
            y={y(cents)}
            words={`${signed(cents, 1)} cents, ${words[partial] ?? "left out"}`}
            toLeft={x(partial) > right - 150}
            ground={ground}
          />
        ) : (
          <circle key={partial} cx={x(partial)} cy={y(cents)} r={4.5} fill="var(--ink)" stroke={ground} />
        ),
      )}
    </svg>
  );
}

/** Cents from zero to the labelled lines of the open lane. */
export function laneStep(largest: number): number {
  return [10, 20, 50, 100].find((step) => largest <= step * 1.4) ?? 200;
}

type ScatterProps = {
  expected: readonly { partial: number; halfCents: number }[];
  x: (partial: number) => number;
  y: (cents: number) => number;
  left: number;
  right: number;
};

function ExpectedScatter({ expected, x, y, left, right }: ScatterProps) {
  const first = expected[0];
  const last = expected.at(-1);
  if (!first || !last) return null;
  const inside = expected.filter(({ partial }) => x(partial) > left && x(partial) < right);
  const stops = [
    { at: left, half: inside[0]?.halfCents ?? first.halfCents },
    ...inside.map(({ partial, halfCents }) => ({ at: x(partial), half: halfCents })),
    { at: right, half: inside.at(-1)?.halfCents ?? last.halfCents },
  ];
  const upper = stops.map(({ at, half }) => `${at} ${y(half)}`);
  const lower = stops.toReversed().map(({ at, half }) => `${at} ${y(-half)}`);
  return <path d={`M${[...upper, ...lower].join("L")}Z`} fill="var(--band-soft)" />;
}

type LeftOutProps = { x: number; y: number; words: string; toLeft: boolean; ground: string };

function LeftOut({ x, y, words, toLeft, ground }: LeftOutProps) {
  const above = y < OPEN_ZERO;
  const nearest = above ? y + 6 : y - 6;
  return (
    <g>
      <path d={`M${x} ${OPEN_ZERO}V${nearest}`} stroke="var(--rust)" strokeDasharray="2 2" />
      <path d={hollowTriangle(x, y, 6)} fill={ground} stroke="var(--rust)" strokeWidth={1.75} />
      <text
        x={toLeft ? x - 12 : x + 12}
        y={y + 5}
        textAnchor={toLeft ? "end" : "start"}
        fill="var(--rust)"
        fontWeight={600}
        // The words knock out lines behind them.
        style={{ paintOrder: "stroke", stroke: ground, strokeWidth: 4, strokeLinejoin: "round" }}
      >
        {words}
      </text>
    </g>
  );
}

type UprightProps = {
  /** Null where the partial has not been read. */
  cents: number | null;
  leftOut?: boolean;
  expectedHalfCents?: number | null;
  width?: number;
  height?: number;
};

const UPRIGHT_LIMIT = 20;

/** One partial's row on the phone: zero runs through all rows as one string. */
export function UprightResidual(props: UprightProps) {
  const { cents, leftOut = false, expectedHalfCents = null, width = 160, height = 44 } = props;
  const middle = width / 2;
  const scale = width / (2 * UPRIGHT_LIMIT);
  const held = cents === null ? 0 : Math.max(-UPRIGHT_LIMIT + 2, Math.min(UPRIGHT_LIMIT - 2, cents));
  const x = middle + held * scale;
  const band = expectedHalfCents === null ? 0 : Math.min(middle, expectedHalfCents * scale);
  return (
    <svg
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={cents === null ? "Not read" : `${signed(cents, 1)} cents off the curve`}
      style={{ display: "block" }}
    >
      <rect x={middle - band} y={0} width={2 * band} height={height} fill="var(--band-soft)" />
      <path d={`M${middle} 0V${height}`} stroke="var(--edge)" />
      {cents !== null &&
        (leftOut ? (
          <path d={hollowTriangle(x, height / 2, 6)} fill="none" stroke="var(--rust)" strokeWidth={1.75} />
        ) : (
          <circle cx={x} cy={height / 2} r={4.5} fill="var(--ink)" />
        ))}
    </svg>
  );
}

/** The scale over a column of upright residuals. */
export function UprightResidualHead({ width = 160 }: { width?: number }) {
  const scale = width / (2 * UPRIGHT_LIMIT);
  return (
    <svg width={width} height={16} aria-hidden="true" style={{ display: "block", fontSize: 12 }}>
      {[-10, 0, 10].map((cents) => (
        <text key={cents} x={width / 2 + cents * scale} y={12} textAnchor="middle" fill="var(--ink-soft)">
          {cents === 0 ? "0" : signed(cents, 0)}
        </text>
      ))}
    </svg>
  );
}
