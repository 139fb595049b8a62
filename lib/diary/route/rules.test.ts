import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { bestRoute, better, type Day, MOST_EXACT, type Route, routeInOrder, type Stop } from "./rules";

type Place = { x: number; y: number };

const minutes = (one: Place, other: Place) => Math.round(Math.hypot(one.x - other.x, one.y - other.y));

function dayOver(places: readonly Place[], leaves = 480): Day {
  const home = { x: 0, y: 0 };
  const at = (index: number) => places[index] ?? home;
  return {
    leaves,
    fromStart: (index) => minutes(home, at(index)),
    toEnd: (index) => minutes(at(index), home),
    between: (from, to) => minutes(at(from), at(to)),
  };
}

function everyOrder(indices: readonly number[]): number[][] {
  if (indices.length === 0) return [[]];
  return indices.flatMap((index) =>
    everyOrder(indices.filter((each) => each !== index)).map((rest) => [index, ...rest]),
  );
}

const costOf = ({ late, travel, ends }: Route) => ({ late, travel, time: ends });

function byBruteForce(stops: readonly Stop[], day: Day): Route {
  const routes = everyOrder(stops.map((_, index) => index)).map((order) => routeInOrder(stops, day, order));
  return routes.reduce((best, route) => (better(costOf(route), costOf(best)) ? route : best));
}

const place = fc.record({ x: fc.integer({ min: -60, max: 60 }), y: fc.integer({ min: -60, max: 60 }) });
const window = fc.option(
  fc.tuple(fc.integer({ min: 480, max: 900 }), fc.integer({ min: 0, max: 120 })).map(([from, wide]) => ({
    from,
    until: from + wide,
  })),
  { nil: undefined },
);
const stopsAndPlaces = (least: number, most: number) =>
  fc
    .array(fc.tuple(place, fc.integer({ min: 15, max: 120 }), window), { minLength: least, maxLength: most })
    .map((drawn) => ({
      places: drawn.map(([where]) => where),
      stops: drawn.map(
        ([, work, when], index): Stop => ({ id: `${index}`, work, ...(when ? { window: when } : {}) }),
      ),
    }));

describe("the route of a day", () => {
  it("is as good as the best of all orders", () => {
    fc.assert(
      fc.property(stopsAndPlaces(1, 6), ({ stops, places }) => {
        const day = dayOver(places);
        expect(costOf(bestRoute(stops, day))).toEqual(costOf(byBruteForce(stops, day)));
      }),
      { seed: 1, numRuns: 150 },
    );
  });

  it("holds every stop once, in times that follow from one another", () => {
    fc.assert(
      fc.property(stopsAndPlaces(1, 14), ({ stops, places }) => {
        const { legs } = bestRoute(stops, dayOver(places));
        expect(legs.map(({ id }) => id).sort()).toEqual(stops.map(({ id }) => id).sort());
        legs.forEach((leg, index) => {
          expect(leg.arrives).toBe((legs[index - 1]?.ends ?? 480) + leg.travel);
          expect(leg.begins).toBeGreaterThanOrEqual(leg.arrives);
        });
      }),
      { seed: 2, numRuns: 60 },
    );
  });

  it("with more stops than are searched whole finds the way round a circle", () => {
    const count = MOST_EXACT + 6;
    const places = Array.from({ length: count }, (_, index) => {
      // 7 and 16 share no factor: the stops are given in a scattered order.
      const turn = (2 * Math.PI * ((index * 7) % count)) / count;
      return { x: 200 + 100 * Math.cos(turn), y: 100 * Math.sin(turn) };
    });
    const stops = places.map((_, index): Stop => ({ id: `${index}`, work: 10 }));
    const round = Array.from({ length: count }, (_, step) => (step * 7) % count);
    const day = dayOver(places);
    const ways = round.flatMap((_, turned) => {
      const order = [...round.slice(turned), ...round.slice(0, turned)];
      return [order, [...order].reverse()];
    });
    const least = Math.min(...ways.map((order) => routeInOrder(stops, day, order).travel));
    expect(bestRoute(stops, day).travel).toBeLessThanOrEqual(least);
  });

  it("waits rather than come before a window, and takes the detour that keeps a promise", () => {
    const places = [
      { x: 10, y: 0 },
      { x: 60, y: 0 },
    ];
    const stops: Stop[] = [
      { id: "near", work: 60 },
      { id: "far, early", work: 60, window: { from: 600, until: 600 } },
    ];
    const route = bestRoute(stops, dayOver(places, 540));
    expect(route.legs.map(({ id, begins }) => [id, begins])).toEqual([
      ["far, early", 600],
      ["near", 710],
    ]);
    expect(route.late).toBe(0);
  });

  it("of a day without stops is over when it begins", () => {
    expect(bestRoute([], dayOver([]))).toEqual({ legs: [], late: 0, travel: 0, ends: 480 });
  });
});
