import { SHARP } from "./note-spelling";

type WordsStyle = {
  font: string;
  colour: string;
  align: "left" | "center" | "right";
  strong?: boolean;
  /** Colour of the ground: knocks out lines that run behind the words. */
  halo?: string;
};

/** Outline of a sharp in a box of 10 by 16. */
const SHARP_PATH = "M3 1.5v14M7 .5v14M.8 6l8.4-2M.8 12l8.4-2";
const SIZE = 12;
const SHARP_WIDTH = 0.5 * SIZE + 0.5;

function setFont(ctx: CanvasRenderingContext2D, style: Pick<WordsStyle, "font" | "strong">): void {
  ctx.font = `${style.strong ? 600 : 400} ${SIZE}px ${style.font}`;
}

export function measureWords(
  ctx: CanvasRenderingContext2D,
  text: string,
  style: Pick<WordsStyle, "font" | "strong">,
): number {
  setFont(ctx, style);
  return text
    .split(SHARP)
    .reduce((sum, part, index) => sum + ctx.measureText(part).width + (index > 0 ? SHARP_WIDTH : 0), 0);
}

/** One line of words with its baseline at y; sharps are drawn, since the faces lack them. */
export function drawWords(
  ctx: CanvasRenderingContext2D,
  text: string,
  x: number,
  y: number,
  style: WordsStyle,
): void {
  const width = measureWords(ctx, text, style);
  let at = style.align === "left" ? x : style.align === "right" ? x - width : x - width / 2;
  ctx.save();
  setFont(ctx, style);
  ctx.textAlign = "left";
  ctx.textBaseline = "alphabetic";
  ctx.lineJoin = "round";
  const pass = (write: (part: string, left: number) => void, sharp: (left: number) => void) => {
    let left = at;
    for (const [index, part] of text.split(SHARP).entries()) {
      if (index > 0) {
        sharp(left);
        left += SHARP_WIDTH;
      }
      write(part, left);
      left += ctx.measureText(part).width;
    }
  };
  at = Math.round(at * 2) / 2;
  if (style.halo) {
    ctx.strokeStyle = style.halo;
    ctx.lineWidth = 5;
    pass(
      (part, left) => ctx.strokeText(part, left, y),
      (left) => strokeSharp(ctx, left, y, 6),
    );
  }
  ctx.fillStyle = style.colour;
  ctx.strokeStyle = style.colour;
  pass(
    (part, left) => ctx.fillText(part, left, y),
    (left) => strokeSharp(ctx, left, y, 1.5),
  );
  ctx.restore();
}

function strokeSharp(ctx: CanvasRenderingContext2D, x: number, baseline: number, width: number): void {
  const scale = (0.78 * SIZE) / 16;
  ctx.save();
  ctx.translate(x, baseline - 0.06 * SIZE - 16 * scale);
  ctx.scale((0.5 * SIZE) / 10, scale);
  ctx.lineWidth = width;
  ctx.stroke(new Path2D(SHARP_PATH));
  ctx.restore();
}
