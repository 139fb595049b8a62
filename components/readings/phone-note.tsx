"use client";

import { fixed, inharmonicity, signed } from "@/components/charts/format";
import { NoteName } from "@/components/charts/note-name";
import { spokenNote } from "@/components/charts/note-spelling";
import { UprightResidual, UprightResidualHead } from "@/components/charts/residual-lane";
import { AppLink } from "@/components/ui/app-link";
import { Button } from "@/components/ui/button";
import { cx } from "@/components/ui/class-names";
import { PowerOfTen } from "@/components/ui/glyphs";
import { Sign } from "@/components/ui/sign";
import { StateWord } from "@/components/ui/state-word";
import type { ReadingUnit } from "@/lib/readings/typed-number";
import { cellLook, cellText, halfB, residualPoints } from "./cell-look";
import { expectedHalfCents } from "./expected-scatter";
import { ownErrorWords, placeWords, warningWords } from "./fit-words";
import type { Live } from "./live-fit";
import { NoteMatters, PartialMatter } from "./note-matters";
import type { OpenNoteActions } from "./open-note";
import { OtherTakes } from "./other-takes";
import { PartialCell } from "./partial-cell";
import { QualityWord } from "./quality-word";
import type { RowState } from "./row-state";
import { type Row, type RowKey, rowKey } from "./sheet-row";
import { firstEmpty } from "./sheet-state";
import { placeOf } from "./sheet-typing";
import type { useCells } from "./use-cells";

type Props = {
  prefix: string;
  row: Row;
  live: Live;
  /** Why the note does not belong, or null. */
  flag: string | null;
  state: RowState;
  order: readonly RowKey[];
  columns: readonly number[];
  unit: ReadingUnit;
  referenceHz: number;
  canChange: boolean;
  cells: ReturnType<typeof useCells>;
  actions: OpenNoteActions;
  back: { href: string; label: string };
  kept: React.ReactNode;
  ribbon: React.ReactNode;
  tools: React.ReactNode;
  onGo: (key: RowKey) => void;
};

const GRID = "grid grid-cols-[32px_96px_minmax(0,160px)_1fr] items-center";

/** One note a page, as the phone shows the sheet: big rows, and the next step under the thumb. */
export function PhoneNote(props: Props) {
  const { prefix, row, live, state, order, columns, unit, referenceHz, canChange, cells, actions } = props;
  const { flag, back, kept, ribbon, tools, onGo } = props;
  const key = rowKey(row.place);
  const index = order.indexOf(key);
  const points = new Map(residualPoints(live.fit).map((point) => [point.partial, point]));
  const words = placeWords(row.place);
  const half = expectedHalfCents(row.place.midi);

  return (
    <div>
      <header className="-mx-4 -mt-2 border-b border-hairline bg-paper px-4 pb-3">
        <div className="flex h-11 items-center justify-between gap-3 text-12">
          <AppLink href={back.href} className="inline-flex h-11 min-w-0 items-center gap-1.5 text-ink-soft">
            <Sign name="arrow-left" />
            <span className="truncate">{back.label}</span>
          </AppLink>
          {kept}
        </div>
        <div className="flex items-center justify-between">
          <Beside order={order} index={index - 1} onGo={onGo} direction="back" />
          <h1 className="text-28!">
            <NoteName midi={row.place.midi} />
            {words ? <span className="lab block text-center font-sans tracking-normal">{words}</span> : null}
          </h1>
          <Beside order={order} index={index + 1} onGo={onGo} direction="on" />
        </div>
        <div className="mt-2">{ribbon}</div>
      </header>

      {/* biome-ignore lint/a11y/noStaticElementInteractions: the handlers are those of the inputs inside */}
      <div onFocus={cells.onFocus} onBlur={cells.onBlur} onKeyDown={cells.onKeyDown} onPaste={cells.onPaste}>
        <div className={cx(GRID, "lab h-8 border-b border-edge!")} aria-hidden="true">
          <span>n</span>
          <span className="pr-4 text-right">{unit === "hz" ? "Hz read" : "cents read"}</span>
          <UprightResidualHead width={160} />
          <span className="text-right">off curve</span>
        </div>
        {columns.map((partial) => {
          const look = cellLook(row, partial, live);
          const point = points.get(partial);
          const matterId = `${prefix}${key}-${partial}-words`;
          const special = look !== "plain" || row.kept.includes(partial);
          return (
            <div
              key={partial}
              className={cx(
                "-mx-4 border-b border-hairline px-4",
                look === "plain" ? null : "bg-rust-wash pb-3",
                look === "plain" && special && "pb-3",
              )}
            >
              <div className={cx(GRID, "h-11")}>
                <span className="text-16 text-ink-soft">{partial}</span>
                <PartialCell
                  big
                  prefix={prefix}
                  rowKey={key}
                  partial={partial}
                  text={cellText(row, partial, {
                    unit,
                    referenceHz,
                    inHand: cells.inHand?.key === key && cells.inHand.partial === partial,
                  })}
                  look={look}
                  label={`${spokenNote(row.place.midi)}, partial ${partial}, ${unit === "hz" ? "hertz" : "cents"}`}
                  describedBy={special ? matterId : undefined}
                  tabStop
                  readOnly={!canChange}
                  onType={cells.onType}
                />
                <UprightResidual
                  cents={point?.cents ?? null}
                  leftOut={point?.leftOut ?? false}
                  expectedHalfCents={half}
                  width={160}
                />
                <span
                  className={cx(
                    "text-right whitespace-nowrap",
                    point?.leftOut ? "font-semibold text-rust" : "text-ink-soft",
                  )}
                >
                  {point ? signed(point.cents, 1) : ""}
                </span>
              </div>
              {special ? (
                <div id={matterId}>
                  <PartialMatter
                    big
                    row={row}
                    partial={partial}
                    live={live}
                    referenceHz={referenceHz}
                    canChange={canChange}
                    actions={actions}
                  />
                </div>
              ) : null}
            </div>
          );
        })}
      </div>

      <div className="mt-3 grid gap-3">
        {flag === null ? null : (
          <StateWord kind="attention" wrap className="text-16">
            {flag}
          </StateWord>
        )}
        <NoteMatters
          wholeOnly
          big
          id={`${prefix}${key}-words`}
          row={row}
          live={live}
          state={state}
          unit={unit}
          referenceHz={referenceHz}
          canChange={canChange}
          actions={actions}
        />
        {live.fit?.warnings.map((warning) => (
          <p key={warning} className="lab">
            {warningWords[warning]}
          </p>
        ))}
        {live.fit?.b == null ? null : <p className="lab">{ownErrorWords}</p>}
        {canChange ? (
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
            <OtherTakes place={row.place} onChoose={actions.choose} />
            <Button kind="quiet" onClick={() => actions.undo(key)}>
              Undo
            </Button>
            {row.saved || Object.keys(row.cells).length > 0 ? (
              <Button kind="quiet" onClick={() => actions.remove(key)}>
                Remove note
              </Button>
            ) : null}
          </div>
        ) : null}
        {tools}
      </div>
      <Foot {...props} />
    </div>
  );
}

function Beside({
  order,
  index,
  onGo,
  direction,
}: {
  order: readonly RowKey[];
  index: number;
  onGo: (key: RowKey) => void;
  direction: "back" | "on";
}) {
  const key = order[index];
  if (key === undefined) return <span className="w-14" />;
  const { midi } = placeOf(key);
  return (
    <button
      type="button"
      onClick={() => onGo(key)}
      className={cx(
        "inline-flex h-11 min-w-14 items-center gap-1.5 text-16 text-ink-soft",
        direction === "on" && "justify-end",
      )}
    >
      {direction === "back" ? <Sign name="chevron-left" size={12} /> : null}
      <span className="sr-only">{direction === "back" ? "Note before: " : "Next note: "}</span>
      <NoteName midi={midi} />
      {direction === "on" ? <Sign name="chevron-right" size={12} /> : null}
    </button>
  );
}

/** B and pitch in sight, and the next thing to do. */
function Foot({ row, live, order, columns, cells, canChange, onGo }: Props) {
  const key = rowKey(row.place);
  const { fit } = live;
  const next = order[order.indexOf(key) + 1];
  const empty = columns.find((partial) => !row.cells[partial]);
  const readSome = Object.keys(row.cells).length >= 3;
  const nextNote =
    next === undefined ? null : (
      <Button
        kind={empty === undefined ? "primary" : "secondary"}
        className={empty === undefined ? "flex-1" : undefined}
        onClick={() => onGo(next)}
      >
        <span>
          {empty === undefined ? "Next note: " : null}
          <NoteName midi={placeOf(next).midi} />
          {empty === undefined ? null : <span className="sr-only">, the next note</span>}
        </span>
        {empty === undefined ? null : <Sign name="chevron-right" size={12} />}
      </Button>
    );
  return (
    <div
      data-action-strip=""
      data-no-print
      className="fixed inset-x-0 bottom-(--bar) z-20 grid gap-2.5 border-t border-hairline bg-paper px-4 pt-2.5 pb-3 [&_button]:h-13! [&_button]:text-16"
    >
      <div className="flex items-baseline gap-4">
        <span className="lab">
          B <PowerOfTen exponent={-4} />{" "}
          <b className="text-16 font-semibold text-ink">
            {fit && fit.b !== null ? inharmonicity(fit.b, halfB(fit)) : "–"}
          </b>
        </span>
        <span className="lab">
          f1, Hz <b className="text-16 font-semibold text-ink">{fit ? fixed(fit.f1Hz, 2) : "–"}</b>
        </span>
        <span className="ml-auto">{fit ? <QualityWord fit={fit} /> : null}</span>
      </div>
      {canChange ? (
        <div className="flex gap-2">
          {empty !== undefined && readSome ? nextNote : null}
          {empty === undefined ? (
            nextNote
          ) : (
            <Button
              kind="primary"
              className="flex-1"
              onClick={() => cells.goTo(key, firstEmpty(row, columns))}
            >
              Type partial {empty}
            </Button>
          )}
        </div>
      ) : (
        nextNote && <div className="flex gap-2">{nextNote}</div>
      )}
    </div>
  );
}
