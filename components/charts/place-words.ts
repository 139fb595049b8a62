/** Where words go beside a point: never over the curve, the marks, other words or the edge, if it can be helped. */

export type Point = { x: number; y: number };
export type Rect = { x: number; y: number; width: number; height: number };

export type WordsPlace = Rect & { align: "left" | "center" | "right" };

type Request = {
  at: Point;
  width: number;
  height: number;
  /** How far the words stand off: close for a label, further for words with a leader. */
  reach: "near" | "far";
  area: Rect;
  points: readonly Point[];
  taken: readonly Rect[];
  /** x of the string of the cursor, kept clear like the rest. */
  cursorX?: number | null;
  /** y of the zero line, which words leave alone when another place is as good. */
  zeroY?: number | null;
};

/** Kept between words and curve or cursor. */
const CLEAR = 8;

const NEAR_DISTANCES = [9, 16, 24, 34, 46, 60];
const FAR_DISTANCES = [18, 30, 44, 60];

function* candidates({ at, width, height, reach }: Request): Generator<WordsPlace & { cost: number }> {
  const far = reach === "far";
  for (const distance of far ? FAR_DISTANCES : NEAR_DISTANCES) {
    const rows = far
      ? [at.y - distance - height / 2, at.y + distance - height / 2, at.y - height / 2]
      : [at.y + distance, at.y - distance - height, at.y - height / 2];
    for (const [index, y] of rows.entries()) {
      const beside = index === 2;
      const away = far || beside ? (far ? 26 + distance / 2 : distance + 3) : -6;
      const cost = distance + index * 4;
      yield { x: at.x - away - width, y, width, height, align: "right", cost: cost + (far ? 0 : 2) };
      yield { x: at.x + away, y, width, height, align: "left", cost: cost + 3 };
      if (!far && !beside) yield { x: at.x - width / 2, y, width, height, align: "center", cost };
    }
  }
}

const grown = (rect: Rect, by: number): Rect => ({
  x: rect.x - by,
  y: rect.y - by,
  width: rect.width + 2 * by,
  height: rect.height + 2 * by,
});

export const holds = (rect: Rect, point: Point) =>
  point.x > rect.x && point.x < rect.x + rect.width && point.y > rect.y && point.y < rect.y + rect.height;

export function overlap(a: Rect, b: Rect): boolean {
  return a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;
}

/** Held inside the area; words wider or higher than it start at its edge. */
function inside(place: WordsPlace, area: Rect): WordsPlace {
  const hold = (at: number, size: number, from: number, room: number) =>
    Math.max(from, Math.min(from + room - size, at));
  return {
    ...place,
    x: hold(place.x, place.width, area.x, area.width),
    y: hold(place.y, place.height, area.y, area.height),
  };
}

/** The cheapest of the places around the point. Deterministic: the same plot is always labelled alike. */
export function placeWords(request: Request): WordsPlace {
  let best: WordsPlace | null = null;
  let lowest = Number.POSITIVE_INFINITY;
  for (const { cost, ...wanted } of candidates(request)) {
    const place = inside(wanted, request.area);
    const pushed = Math.abs(place.x - wanted.x) + Math.abs(place.y - wanted.y);
    const onPoint = holds(grown(place, 5), request.at) ? 1 : 0;
    const clear = grown(place, CLEAR);
    const covered = request.points.filter((point) => holds(clear, point)).length;
    const crowded = request.taken.filter((rect) => overlap(grown(place, 4), rect)).length;
    const string = request.cursorX;
    const crossed = string != null && string > clear.x && string < clear.x + clear.width ? 1 : 0;
    const zero = request.zeroY;
    const onZero = zero != null && zero > place.y - 2 && zero < place.y + place.height + 2 ? 1 : 0;
    const total =
      cost + pushed / 2 + onPoint * 1000 + covered * 40 + crowded * 400 + crossed * 60 + onZero * 25;
    if (total < lowest) {
      best = place;
      lowest = total;
    }
  }
  if (!best) throw new Error("Words without a place");
  return best;
}
