import { drawWords, measureWords } from "./draw-words";
import { noteText } from "./note-spelling";
import { overlap, type Point, placeWords, type Rect, type WordsPlace } from "./place-words";
import { drawnPoints, pointAt, type Scene, tickLabelRects, tickSide } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

/** Words on the data: notes that do not belong with their leader, extremes, anchors, the break and the bridges. */

type Ctx = CanvasRenderingContext2D;
type Line = { text: string; colour: string; strong: boolean };

const LINE = 16;

export function drawLabels(ctx: Ctx, scene: Scene, colours: PlotColours, cursorMidi: number | null): void {
  const points = drawnPoints(scene);
  const taken: Rect[] = scene.compact ? tickLabelRects(scene, tickSide(scene)) : [];
  const cursorX = cursorMidi === null ? null : scene.area.x + scene.layout.x(cursorMidi);
  nameBreak(ctx, scene, colours, taken, cursorX);

  const write = (midi: number, value: number, lines: readonly Line[], reach: "near" | "far") => {
    const at = pointAt(scene, midi, value);
    const width = Math.max(
      ...lines.map((line) => measureWords(ctx, line.text, { font: colours.font, strong: line.strong })),
    );
    const others = points.filter((point) => Math.abs(point.x - at.x) > 1 || Math.abs(point.y - at.y) > 1);
    const place = placeWords({
      at,
      width,
      height: lines.length * LINE - 3,
      reach,
      area: scene.area,
      points: others,
      taken,
      cursorX,
      zeroY: scene.scale.log ? null : pointAt(scene, midi, 0).y,
    });
    taken.push(place);
    if (reach === "far") drawLeader(ctx, at, place, colours);
    for (const [index, line] of lines.entries()) {
      drawWords(ctx, line.text, anchorX(place), place.y + 10.5 + index * LINE, {
        font: colours.font,
        colour: line.colour,
        strong: line.strong,
        align: place.align,
        halo: colours.sheet,
      });
    }
  };

  for (const layer of scene.plot.layers) {
    if (layer.kind !== "flagged") continue;
    for (const point of layer.points) {
      const words = scene.compact ? (point.shortWords ?? point.words) : point.words;
      const lines = words.map((text, index) => ({
        text,
        colour: index === 0 ? colours.rust : colours.ink,
        strong: index === 0,
      }));
      if (lines.length > 0) write(point.midi, point.value, lines, layer.stems ? "near" : "far");
    }
  }
  for (const label of scene.plot.labels ?? []) {
    if (label.deskOnly && scene.compact) continue;
    const lines = label.lines.map((text, index) => ({
      text,
      colour: colours.ink,
      strong: Boolean(label.strong) && index === 0,
    }));
    if (lines.length > 0) write(label.midi, label.value, lines, "near");
  }
  if (scene.last && !scene.compact) nameBridges(ctx, scene, colours, taken, points, cursorX);
}

const anchorX = (place: WordsPlace) =>
  place.align === "left"
    ? place.x
    : place.align === "right"
      ? place.x + place.width
      : place.x + place.width / 2;

/** From the first line of the words to just short of the mark. */
function drawLeader(ctx: Ctx, at: Point, place: WordsPlace, colours: PlotColours): void {
  const from = { x: place.align === "right" ? place.x + place.width + 8 : place.x - 8, y: place.y + 6.5 };
  const length = Math.hypot(at.x - from.x, at.y - from.y);
  if (length < 20) return;
  const end = (length - 10) / length;
  ctx.save();
  ctx.strokeStyle = colours.rust;
  ctx.lineWidth = 1;
  ctx.beginPath();
  ctx.moveTo(from.x, from.y);
  ctx.lineTo(from.x + (at.x - from.x) * end, from.y + (at.y - from.y) * end);
  ctx.stroke();
  ctx.restore();
}

/** The middle of words of this half-width, moved off the string if it would run through them. */
function asideOf(cursorX: number | null, wanted: number, half: number): number {
  if (cursorX === null || Math.abs(cursorX - wanted) >= half) return wanted;
  return cursorX >= wanted ? cursorX - half : cursorX + half;
}

function nameBreak(
  ctx: Ctx,
  scene: Scene,
  colours: PlotColours,
  taken: Rect[],
  cursorX: number | null,
): void {
  const { layout, area } = scene;
  const { breakMidi } = layout.range;
  if (!scene.first || layout.breakX === null || breakMidi == null) return;
  const text = `break ${noteText(breakMidi - 1)} | ${noteText(breakMidi)}`;
  const half = measureWords(ctx, text, { font: colours.font }) / 2;
  const wanted = area.x + layout.breakX;
  const x = Math.max(half, Math.min(scene.width - half, asideOf(cursorX, wanted, half + 8)));
  taken.push({ x: x - half, y: area.y - 20, width: 2 * half, height: 14 });
  drawWords(ctx, text, x, area.y - 9, { font: colours.font, colour: colours.ink, align: "center" });
}

function nameBridges(
  ctx: Ctx,
  scene: Scene,
  colours: PlotColours,
  taken: readonly Rect[],
  points: readonly Point[],
  cursorX: number | null,
): void {
  const { layout, area } = scene;
  if (layout.breakX === null) return;
  const x = area.x + layout.breakX;
  for (const [text, align] of [
    ["bass bridge", "right"],
    ["treble bridge", "left"],
  ] as const) {
    const width = measureWords(ctx, text, { font: colours.font });
    const way = align === "right" ? -1 : 1;
    const wanted = x + way * (10 + width / 2);
    const hit = cursorX !== null && Math.abs(cursorX - wanted) < width / 2 + 8;
    const left = (hit ? cursorX + way * (8 + width / 2) : wanted) - width / 2;
    const baselines = [area.y + area.height - 8, area.y + 14];
    const free = baselines.find((baseline) => {
      const rect = { x: left, y: baseline - 11, width, height: 14 };
      return (
        !taken.some((other) => overlap(rect, other)) &&
        !points.some((p) => p.x > left - 8 && p.x < left + width + 8 && Math.abs(p.y - baseline + 4) < 14)
      );
    });
    if (free === undefined) continue;
    drawWords(ctx, text, left, free, {
      font: colours.font,
      colour: colours["ink-soft"],
      align: "left",
      halo: colours.sheet,
    });
  }
}
