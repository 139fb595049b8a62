/**
 * The order of a day's stops. Times are whole minutes after the day's midnight.
 *
 * An order is judged by the minutes it comes too late anywhere, then by the minutes on the road, then by when
 * the day ends. All three only grow along a route, so of two ways to have made the same stops and stand at the
 * same one, a way that is worse in all three can never win: that makes the search over subsets exact
 * (Held & Karp, J. SIAM 10 (1962) 196-210, with several labels kept for each subset).
 */
export type Stop = {
  id: string;
  /** Minutes of work. */
  work: number;
  /** The work may begin from here on, and should have begun by then. */
  window?: { from: number; until: number };
};

export type Day = {
  /** When the technician can leave the start, and the minutes from there to a stop and home again. */
  leaves: number;
  fromStart: (stopIndex: number) => number;
  toEnd: (stopIndex: number) => number;
  between: (fromIndex: number, toIndex: number) => number;
};

export type Leg = { id: string; travel: number; arrives: number; begins: number; ends: number; late: number };
export type Route = { legs: Leg[]; late: number; travel: number; ends: number };

/** Largest day that is searched whole. */
export const MOST_EXACT = 10;

type Cost = { late: number; travel: number; time: number };
type Label = Cost & { last: number; before: Label | null };

export function better(one: Cost, other: Cost): boolean {
  if (one.late !== other.late) return one.late < other.late;
  if (one.travel !== other.travel) return one.travel < other.travel;
  return one.time < other.time;
}

/** The best order; exact for up to `MOST_EXACT` stops, improved until no move of a stop or turn of a stretch helps above. */
export function bestRoute(stops: readonly Stop[], day: Day): Route {
  if (stops.length === 0) return { legs: [], late: 0, travel: 0, ends: day.leaves };
  return routeInOrder(
    stops,
    day,
    stops.length <= MOST_EXACT ? searchedWhole(stops, day) : improved(stops, day),
  );
}

/** The times of a given order. */
export function routeInOrder(stops: readonly Stop[], day: Day, order: readonly number[]): Route {
  const legs: Leg[] = [];
  let at: number | null = null;
  let time = day.leaves;
  let travel = 0;
  let late = 0;
  for (const index of order) {
    const stop = stopAt(stops, index);
    const road = at === null ? day.fromStart(index) : day.between(at, index);
    const leg = visitStop(stop, time, road);
    legs.push({ id: stop.id, travel: road, ...leg });
    time = leg.ends;
    travel += road;
    late += leg.late;
    at = index;
  }
  const home = at === null ? 0 : day.toEnd(at);
  return { legs, late, travel: travel + home, ends: time + home };
}

function visitStop(stop: Stop, leaves: number, road: number): Omit<Leg, "id" | "travel"> {
  const arrives = leaves + road;
  const begins = Math.max(arrives, stop.window?.from ?? arrives);
  const late = Math.max(0, begins - (stop.window?.until ?? begins));
  return { arrives, begins, ends: begins + stop.work, late };
}

function stopAt(stops: readonly Stop[], index: number): Stop {
  const stop = stops[index];
  if (!stop) throw new RangeError(`There is no stop ${index}`);
  return stop;
}

function extend(label: Label | null, index: number, stops: readonly Stop[], day: Day): Label {
  const road = label ? day.between(label.last, index) : day.fromStart(index);
  const { ends, late } = visitStop(stopAt(stops, index), label?.time ?? day.leaves, road);
  return {
    last: index,
    before: label,
    late: (label?.late ?? 0) + late,
    travel: (label?.travel ?? 0) + road,
    time: ends,
  };
}

function searchedWhole(stops: readonly Stop[], day: Day): number[] {
  const all = 2 ** stops.length - 1;
  const labels = new Map<number, Label[]>();
  const keep = (visited: number, label: Label) => {
    const key = visited * stops.length + label.last;
    const known = labels.get(key) ?? [];
    if (
      known.some((each) => each.late <= label.late && each.travel <= label.travel && each.time <= label.time)
    )
      return;
    const open = known.filter(
      (each) => each.late < label.late || each.travel < label.travel || each.time < label.time,
    );
    labels.set(key, [...open, label]);
  };
  for (const index of stops.keys()) keep(2 ** index, extend(null, index, stops, day));
  // A superset is a larger number than its subsets, so that each is complete when its turn comes.
  for (let visited = 1; visited < all; visited += 1) {
    for (let last = 0; last < stops.length; last += 1) {
      for (const label of labels.get(visited * stops.length + last) ?? []) {
        for (let next = 0; next < stops.length; next += 1) {
          if ((visited & (1 << next)) === 0) keep(visited | (1 << next), extend(label, next, stops, day));
        }
      }
    }
  }
  let best: (Cost & { label: Label }) | null = null;
  for (let last = 0; last < stops.length; last += 1) {
    for (const label of labels.get(all * stops.length + last) ?? []) {
      const home = day.toEnd(last);
      const whole = { late: label.late, travel: label.travel + home, time: label.time + home, label };
      if (!best || better(whole, best)) best = whole;
    }
  }
  return orderOf(best?.label ?? null);
}

function orderOf(label: Label | null): number[] {
  const order: number[] = [];
  for (let each = label; each; each = each.before) order.unshift(each.last);
  return order;
}

function improved(stops: readonly Stop[], day: Day): number[] {
  const costOf = (order: readonly number[]): Cost => {
    const { late, travel, ends } = routeInOrder(stops, day, order);
    return { late, travel, time: ends };
  };
  const bestOf = (orders: readonly (readonly number[])[]) => {
    let best: { order: readonly number[]; cost: Cost } | null = null;
    for (const order of orders) {
      const cost = costOf(order);
      if (!best || better(cost, best.cost)) best = { order, cost };
    }
    return best ?? { order: [], cost: costOf([]) };
  };
  const byWindow = stops
    .map((stop, index) => ({ index, until: stop.window?.until ?? Number.POSITIVE_INFINITY }))
    .sort((one, other) => one.until - other.until || one.index - other.index)
    .map(({ index }) => index);
  let current = { order: [] as readonly number[], cost: costOf([]) };
  for (const index of byWindow) current = bestOf(insertions(current.order, [index]));
  for (;;) {
    const found = bestOf(neighbours(current.order));
    if (!better(found.cost, current.cost)) return [...current.order];
    current = found;
  }
}

function insertions(order: readonly number[], piece: readonly number[]): number[][] {
  return Array.from({ length: order.length + 1 }, (_, at) => [
    ...order.slice(0, at),
    ...piece,
    ...order.slice(at),
  ]);
}

/** Every order one turn of a stretch (2-opt) or one move of up to three stops (Or-opt) away. */
function neighbours(order: readonly number[]): number[][] {
  const found: number[][] = [];
  for (let from = 0; from < order.length; from += 1) {
    for (let until = from + 2; until <= order.length; until += 1) {
      const turned = order.slice(from, until).reverse();
      found.push([...order.slice(0, from), ...turned, ...order.slice(until)]);
    }
    for (let size = 1; size <= 3 && from + size <= order.length; size += 1) {
      const piece = order.slice(from, from + size);
      const rest = [...order.slice(0, from), ...order.slice(from + size)];
      found.push(...insertions(rest, piece));
    }
  }
  return found;
}
