import { levenbergMarquardt } from "ml-levenberg-marquardt";
import {
  advise,
  fit,
  inharmonicCents,
  inharmonicCentsSlope,
  keyboard,
  partialHzFromF1,
  stretch,
} from "@/lib/acoustics";
import { type Sheet, solve } from "@/lib/acoustics/fit-core";
import { typicalB } from "@/lib/acoustics/fit-prior";
import { equalTemperedHz } from "@/lib/acoustics/keys";

/** Speed of the computation, each figure the median of 30 runs after warm-up, all in one process. */
const RUNS = 30;
const WARM_UP = 15;
const PARTIALS = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
/** Both solvers must come this close to the least-squares B, as a share of B. */
const AGREEMENT = 1e-6;
/** Both start from f1 of the equal-tempered note and this share of the true B. */
const START = 0.6;

/** Medians of several computations timed in turn, so that whatever else the machine does falls on all alike. */
function medians(runs: readonly (() => unknown)[]): number[] {
  const times = runs.map((): number[] => []);
  for (let k = -WARM_UP; k < RUNS; k += 1) {
    runs.forEach((run, which) => {
      const start = performance.now();
      run();
      if (k >= 0) times[which]?.push(performance.now() - start);
    });
  }
  return times.map((each) => {
    const sorted = each.sort((left, right) => left - right);
    return ((sorted[RUNS / 2 - 1] ?? 0) + (sorted[RUNS / 2] ?? 0)) / 2;
  });
}

function line(what: string, value: string): void {
  process.stdout.write(`${what.padEnd(74)} ${value}\n`);
}

/** Errors that look random and are the same every time. */
const error = (midi: number, n: number) => 1.2 * Math.sin(12.9898 * midi + 78.233 * n);

const notes = Array.from({ length: 88 }, (_, index) => {
  const midi = 21 + index;
  const b = typicalB(midi);
  const readings = PARTIALS.map((partial) => ({
    partial,
    hz: partialHzFromF1(partial, equalTemperedHz(midi), b) * 2 ** (error(midi, partial) / 1200),
    sigmaCents: 1,
  }));
  const cents = readings.map(({ partial, hz }) => 1200 * Math.log2(hz / partial / equalTemperedHz(midi)));
  const sheet: Sheet = {
    count: PARTIALS.length,
    squares: Float64Array.from(PARTIALS, (n) => n * n),
    cents: Float64Array.from(cents),
    weights: Float64Array.from(PARTIALS, () => 1),
  };
  const mask = new Uint8Array(PARTIALS.length).fill(1);
  return { midi, readings, cents, sheet, mask, start: START * b, scale: b };
});
type Note = (typeof notes)[number];

/** The general library with the analytic Jacobian and B scaled to order 1. */
function general({ cents, start, scale }: Note, maxIterations: number, damping: number): number {
  const { parameterValues } = levenbergMarquardt(
    { x: PARTIALS, y: cents },
    ([c = 0, u = 0]) =>
      (n) =>
        c + inharmonicCents(n, u * scale),
    {
      initialValues: [0, start / scale],
      jacobianFunction:
        ([, u = 0]) =>
        (n) => [1, scale * inharmonicCentsSlope(n, u * scale)],
      damping,
      errorTolerance: 1e-15,
      maxIterations,
    },
  );
  return (parameterValues[1] ?? 0) * scale;
}

/** The fewest iterations that reach agreement on each note: the library stops by itself only on exact data. */
function iterationsNeeded(damping: number): number[] {
  return notes.map((note) => {
    const { b } = solve(note.sheet, note.mask, note.start);
    for (let k = 1; k < 200; k += 1) {
      if (Math.abs(general(note, k, damping) / b - 1) <= AGREEMENT) return k;
    }
    throw new Error(`The library does not reach agreement on key ${note.midi}`);
  });
}

const needed = iterationsNeeded(1e-2);
const neededAtBest = iterationsNeeded(1e-7);
const [own = 0, whole = 0, library = 0, libraryAtBest = 0, unaided = 0] = medians([
  () => notes.map(({ sheet, mask, start }) => solve(sheet, mask, start).b),
  () => notes.map(({ midi, readings }) => fit({ midi, readings }).b),
  () => notes.map((note, index) => general(note, needed[index] ?? 0, 1e-2)),
  () => notes.map((note, index) => general(note, neededAtBest[index] ?? 0, 1e-7)),
  () => notes.map((note) => general(note, 100, 1e-2)),
]);
const times = (share: number) => `${share.toFixed(share < 10 ? 1 : 0)} times`;
line("Sheet of 88 notes, 10 partials each: own least squares", `${own.toFixed(3)} ms`);
line("Whole fit: checks, outliers, least squares, intervals, reasons", `${whole.toFixed(2)} ms`);
line(
  "ml-levenberg-marquardt, 100 iterations (it stops by itself only on exact data)",
  `${unaided.toFixed(1)} ms`,
);
line(
  "  own least squares, same start, within a millionth, is faster (aim: at least 20)",
  times(unaided / own),
);
line("  the whole fit is faster (aim: at least 20)", times(unaided / whole));
line("The same stopped by hand at the first iteration that agrees", `${library.toFixed(2)} ms`);
line("  own least squares is faster", times(library / own));
line("The same again with the damping that suits it best", `${libraryAtBest.toFixed(2)} ms`);
line("  own least squares is faster", times(libraryAtBest / own));

const observations = [23, 31, 38, 45, 52, 60, 69, 78, 88, 98].map((midi) => ({
  midi,
  b: typicalB(midi) * (1 + 0.05 * Math.sin(midi)),
  bSigma: 0.02 * typicalB(midi),
}));
const [board = 0, plan = 0, advice = 0] = medians([
  () => keyboard({ observations }),
  () => stretch({ observations }),
  () => advise({ observations }),
]);
line("keyboard: B of 88 keys with covariance from 10 notes", `${board.toFixed(2)} ms`);
line("stretch: plan of 88 keys with band, keyboard included (aim: at most 10 ms)", `${plan.toFixed(2)} ms`);
line("advise: what to measure next, keyboard included (aim: at most 20 ms)", `${advice.toFixed(2)} ms`);
