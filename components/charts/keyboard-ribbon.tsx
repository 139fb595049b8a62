"use client";

import { type KeyboardEvent, type PointerEvent, useMemo, useRef } from "react";
import { clampKey, type KeyLayout, type KeyRange, keyUnder, layOutKeys } from "./key-geometry";
import type { KeyMark } from "./key-mark";
import { noteOctave, spokenNote } from "./note-spelling";
import { RibbonMarks } from "./ribbon-marks";
import { useWidth } from "./use-width";

type Props = {
  firstMidi: number;
  lastMidi: number;
  /** Last key of the bass bridge. */
  breakMidi?: number | null;
  marks?: readonly KeyMark[];
  cursor?: number | null;
  /** Without it the ribbon is a picture. */
  onCursor?: (midi: number) => void;
  /** Enter on the ribbon: open the key in hand. */
  onEnter?: (midi: number) => void;
  height?: number;
  /** C1 … C8 under the keys; left out on the small ribbon unless asked for. */
  labels?: boolean;
  /** Name for screen readers. */
  label?: string;
};

/** Black keys reach down this share of the ribbon. */
const BLACK_REACH = 0.62;
const LABEL_LINE = 20;
/** The server cannot know the width; the picture is stretched to it until the browser has measured. */
const WIDTH_BEFORE_MEASURE = 800;

const MARK_WORDS: Record<KeyMark["kind"], string> = {
  measured: "measured",
  next: "to be measured next",
  flagged: "does not belong",
};

/** The key that a key press on the ribbon leads to, or null when the press means nothing here. */
function steppedKey(range: KeyRange, cursor: number, key: string): number | null {
  switch (key) {
    case "ArrowLeft":
    case "ArrowDown":
      return clampKey(range, cursor - 1);
    case "ArrowRight":
    case "ArrowUp":
      return clampKey(range, cursor + 1);
    case "PageDown":
      return clampKey(range, cursor - 12);
    case "PageUp":
      return clampKey(range, cursor + 12);
    case "Home":
      return range.firstMidi;
    case "End":
      return range.lastMidi;
    default:
      return null;
  }
}

export function KeyboardRibbon(props: Props) {
  const { firstMidi, lastMidi, breakMidi = null, marks = [], cursor = null, onCursor, onEnter } = props;
  const { height = 44, labels = height >= 36, label = "Keyboard" } = props;
  const box = useRef<HTMLDivElement>(null);
  const width = useWidth(box, WIDTH_BEFORE_MEASURE);
  const layout = useMemo(
    () => layOutKeys({ firstMidi, lastMidi, breakMidi }, width),
    [firstMidi, lastMidi, breakMidi, width],
  );
  const total = height + (labels ? LABEL_LINE : 0);
  const blackHeight = Math.round(height * BLACK_REACH);
  const kinds = useMemo(() => new Map(marks.map((mark) => [mark.midi, mark.kind])), [marks]);

  const picture = (
    <svg
      width="100%"
      height={total}
      viewBox={`0 0 ${width} ${total}`}
      preserveAspectRatio="none"
      aria-hidden="true"
      style={{ display: "block", overflow: "visible" }}
    >
      <Keys layout={layout} height={height} blackHeight={blackHeight} cursor={cursor} />
      <RibbonMarks layout={layout} height={height} blackHeight={blackHeight} marks={marks} cursor={cursor} />
      {labels && <OctaveLabels layout={layout} baseline={height + 14} />}
    </svg>
  );

  if (!onCursor) {
    return (
      <div ref={box} role="img" aria-label={pictureName(label, marks, cursor)}>
        {picture}
      </div>
    );
  }

  const spare = Math.max(0, (44 - total) / 2);
  const current = cursor ?? clampKey(layout.range, 60);
  const kind = kinds.get(current);

  function onKeyDown(event: KeyboardEvent) {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    if (event.key === "Enter" && onEnter && cursor !== null) {
      event.preventDefault();
      onEnter(cursor);
      return;
    }
    const next = steppedKey(layout.range, current, event.key);
    if (next === null) return;
    event.preventDefault();
    if (next !== cursor) onCursor?.(next);
  }

  function point(event: PointerEvent<HTMLDivElement>) {
    const area = (event.currentTarget.firstElementChild ?? event.currentTarget).getBoundingClientRect();
    const overBlackKeys = event.clientY - area.top < blackHeight;
    const next = keyUnder(layout, event.clientX - area.left, overBlackKeys);
    if (next !== cursor) onCursor?.(next);
  }

  return (
    <div
      ref={box}
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-valuemin={firstMidi}
      aria-valuemax={lastMidi}
      aria-valuenow={current}
      aria-valuetext={kind ? `${spokenNote(current)}, ${MARK_WORDS[kind]}` : spokenNote(current)}
      onKeyDown={onKeyDown}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture?.(event.pointerId);
        point(event);
      }}
      onPointerMove={(event) => {
        if (event.buttons > 0) point(event);
      }}
      // Sideways drags move the cursor, up and down still scrolls the page.
      style={{
        touchAction: "pan-y",
        cursor: "pointer",
        borderRadius: 2,
        outlineOffset: 4,
        // A low ribbon still is a target of 44 px, without taking more room on the page.
        paddingBlock: spare,
        marginBlock: -spare,
      }}
    >
      {picture}
    </div>
  );
}

function pictureName(label: string, marks: readonly KeyMark[], cursor: number | null): string {
  const named = (kind: KeyMark["kind"]) => marks.filter((mark) => mark.kind === kind);
  const list = (kind: KeyMark["kind"]) =>
    named(kind)
      .map((mark) => spokenNote(mark.midi))
      .join(", ");
  return [
    label,
    named("measured").length === 1 && "1 note measured",
    named("measured").length > 1 && `${named("measured").length} notes measured`,
    named("next").length > 0 && `next ${list("next")}`,
    named("flagged").length > 0 && `does not belong: ${list("flagged")}`,
    cursor !== null && `in hand ${spokenNote(cursor)}`,
  ]
    .filter(Boolean)
    .join("; ");
}

type KeysProps = { layout: KeyLayout; height: number; blackHeight: number; cursor: number | null };

function Keys({ layout, height, blackHeight, cursor }: KeysProps) {
  return layout.keys.map((key) => {
    const inHand = key.midi === cursor;
    return key.black ? (
      <rect
        key={key.midi}
        x={key.x}
        y={0}
        width={key.width}
        height={blackHeight}
        rx={0.5}
        fill={inHand ? "var(--brass-fill)" : "var(--key-black)"}
      />
    ) : (
      <rect
        key={key.midi}
        x={key.x}
        y={0.5}
        width={key.width}
        height={height - 1}
        rx={1}
        fill={inHand ? "var(--brass-fill)" : "var(--key-white)"}
        stroke={inHand ? "var(--brass)" : "var(--key-line)"}
      />
    );
  });
}

function OctaveLabels({ layout, baseline }: { layout: KeyLayout; baseline: number }) {
  const { firstMidi, lastMidi } = layout.range;
  return layout.keys
    .filter((key) => key.midi % 12 === 0 && key.midi >= firstMidi)
    .map((key) => {
      const last = key.midi === lastMidi;
      const first = key.midi === firstMidi;
      return (
        <text
          key={key.midi}
          x={last ? layout.width : first ? 0 : key.x + key.width / 2}
          y={baseline}
          textAnchor={last ? "end" : first ? "start" : "middle"}
          fill="var(--ink-soft)"
          fontSize={12}
          style={{ fontVariantNumeric: "tabular-nums" }}
        >
          C{noteOctave(key.midi)}
        </text>
      );
    });
}
