import { drawWords } from "./draw-words";
import { hasBreak } from "./key-geometry";
import { pointAt, type Scene, splitAtBreak, tickIsNamed, tickSide } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

/** What lies under the data: grid, axis, bands, the string of the break, stems. */

type Ctx = CanvasRenderingContext2D;

/** On a half pixel, so that one pixel of line fills one pixel of screen. */
const crisp = (value: number) => Math.round(value - 0.5) + 0.5;

function stroke(ctx: Ctx, colour: string, width: number, draw: () => void, dash: number[] = []): void {
  ctx.save();
  ctx.strokeStyle = colour;
  ctx.lineWidth = width;
  ctx.setLineDash(dash);
  ctx.beginPath();
  draw();
  ctx.stroke();
  ctx.restore();
}

export function drawGround(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  drawGrid(ctx, scene, colours);
  drawTickLabels(ctx, scene, colours);
  drawBands(ctx, scene, colours);
  drawBreak(ctx, scene, colours);
  drawStems(ctx, scene, colours);
}

function drawGrid(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  const { area, scale, compact } = scene;
  const right = area.x + area.width;
  for (const tick of scale.ticks) {
    const y = crisp(area.y + scale.y(tick.value, area.height));
    if (tick.line) {
      const zero = !scale.log && tick.value === 0;
      stroke(ctx, zero ? colours.edge : colours.grid, 1, () => {
        ctx.moveTo(area.x, y);
        ctx.lineTo(right, y);
      });
    } else if (!compact) {
      ctx.globalAlpha = 0.6;
      stroke(ctx, colours.edge, 1, () => {
        ctx.moveTo(area.x - 4, y);
        ctx.lineTo(area.x, y);
      });
      ctx.globalAlpha = 1;
    }
  }
  if (!compact) {
    stroke(ctx, colours.edge, 1, () => {
      ctx.moveTo(area.x - 0.5, area.y);
      ctx.lineTo(area.x - 0.5, area.y + area.height);
    });
  }
}

/** On a phone the numbers stand inside the plot, at the end where they cover fewer points. */
function drawTickLabels(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  const { area, scale, compact } = scene;
  const atRight = compact && tickSide(scene) === "right";
  for (const tick of scale.ticks) {
    if (tick.label === null || !tickIsNamed(scene, tick)) continue;
    const y = crisp(area.y + scale.y(tick.value, area.height));
    drawWords(
      ctx,
      tick.label,
      atRight ? area.x + area.width : compact ? area.x : area.x - 8,
      compact ? y - 4 : y + 4,
      {
        font: colours.font,
        colour: colours["ink-soft"],
        align: compact && !atRight ? "left" : "right",
      },
    );
  }
}

function drawBands(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  const { area } = scene;
  ctx.save();
  ctx.beginPath();
  ctx.rect(area.x, area.y, area.width, area.height);
  ctx.clip();
  for (const layer of scene.plot.layers) {
    if (layer.kind !== "curve" && layer.kind !== "band") continue;
    const edges: { midi: number; low: number; high: number }[] = [];
    for (const { midi, low, high } of layer.points) {
      if (low != null && high != null) edges.push({ midi, low, high });
    }
    ctx.fillStyle = layer.kind === "band" && layer.soft ? colours["band-soft"] : colours.band;
    for (const run of splitAtBreak(scene.layout.range, edges)) {
      ctx.beginPath();
      for (const { midi, high } of run) {
        const { x, y } = pointAt(scene, midi, high);
        ctx.lineTo(x, y);
      }
      for (const { midi, low } of run.toReversed()) {
        const { x, y } = pointAt(scene, midi, low);
        ctx.lineTo(x, y);
      }
      ctx.closePath();
      ctx.fill();
    }
  }
  ctx.restore();
}

function drawBreak(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  const { layout, area } = scene;
  if (layout.breakX === null || !hasBreak(layout.range)) return;
  const x = area.x + layout.breakX;
  stroke(
    ctx,
    colours.edge,
    1,
    () => {
      ctx.moveTo(x, area.y);
      ctx.lineTo(x, area.y + area.height);
    },
    [2, 3],
  );
}

function drawStems(ctx: Ctx, scene: Scene, colours: PlotColours): void {
  for (const layer of scene.plot.layers) {
    if ((layer.kind !== "marks" && layer.kind !== "flagged") || !layer.stems) continue;
    for (const { midi, value } of layer.points) {
      const zero = pointAt(scene, midi, 0);
      const { y } = pointAt(scene, midi, value);
      stroke(ctx, layer.kind === "flagged" ? colours.rust : colours["ink-soft"], 1, () => {
        ctx.moveTo(zero.x, zero.y);
        ctx.lineTo(zero.x, y);
      });
    }
  }
}
