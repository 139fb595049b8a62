import { cursorRings, type Scene } from "./plot-scene";
import type { PlotColours } from "./use-plot-colours";

/**
 * The string of the cursor through one plot, down to the key under the last one: over the grid, behind the data.
 * No easing: it follows the hand.
 */
export function drawCursorString(
  ctx: CanvasRenderingContext2D,
  scene: Scene,
  colours: PlotColours,
  midi: number,
): void {
  const x = scene.area.x + scene.layout.x(midi);
  ctx.save();
  ctx.strokeStyle = colours["brass-fill"];
  ctx.fillStyle = colours["brass-fill"];
  ctx.lineWidth = 1.5;
  ctx.beginPath();
  ctx.moveTo(x, scene.area.y);
  ctx.lineTo(x, scene.last ? scene.height : scene.area.y + scene.area.height);
  ctx.stroke();
  if (scene.first) {
    ctx.beginPath();
    ctx.roundRect(x - 4, scene.area.y - 6, 8, 14, 4);
    ctx.fill();
    ctx.fillStyle = colours.sheet;
    ctx.beginPath();
    ctx.arc(x, scene.area.y + 1, 1.8, 0, 2 * Math.PI);
    ctx.fill();
  }
  ctx.restore();
}

/** Rings in front of the data. */
export function drawCursorRings(
  ctx: CanvasRenderingContext2D,
  scene: Scene,
  colours: PlotColours,
  midi: number,
): void {
  ctx.save();
  ctx.strokeStyle = colours.brass;
  ctx.fillStyle = colours.sheet;
  ctx.lineWidth = 2;
  for (const ring of cursorRings(scene, midi)) {
    ctx.beginPath();
    ctx.arc(ring.x, ring.y, ring.around ? 7 : 4, 0, 2 * Math.PI);
    if (!ring.around) ctx.fill();
    ctx.stroke();
  }
  ctx.restore();
}
