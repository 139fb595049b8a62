import type { Difference } from "./compare-difference";
import { fitVisit, type Matched, matchNote } from "./compare-matching";
import type {
  CompareInput,
  CompareResult,
  NotComparable,
  NoteComparison,
  RegisterPitch,
} from "./compare-types";
import { normalQuantile, studentQuantile, studentTwoSided } from "./distributions";
import { adjustedPValues } from "./false-discovery";
import { MEASURING_SIGMA } from "./fit-prior";
import { mean } from "./mean";
import { commonVariance } from "./moderated-variance";
import { REGISTERS, registerOf } from "./registers";
import { AcousticsError } from "./types";

/** No move of a partial is known better than this, cents: typed digits. */
const MOVE_SIGMA_FLOOR = 0.03;
/**
 * Compare two visits to one instrument, note by note.
 *
 * Partials depart from the stiff-string law in a way that belongs to the string and repeats from visit to visit, so B is not
 * compared as fitted: the moves of matched partials of the same string are. The error of a move comes from the moves
 * themselves, small sheets drawing on all notes (`moderated-variance`). The change of ln B is at common f1, B ∝ 1/f1².
 * Verdicts come from two-sided t tests with Benjamini–Hochberg control over the notes.
 *
 * Errors: AcousticsError "no-notes", "duplicate-note", "bad-rate", "bad-humidity", and those of `fit` with the note's path.
 */
export function compare(input: CompareInput): CompareResult {
  const rate = input.falseDiscoveryRate ?? 0.05;
  if (!(rate > 0 && rate < 1)) {
    throw new AcousticsError(
      "bad-rate",
      "A false-discovery rate lies between 0 and 1.",
      "falseDiscoveryRate",
    );
  }
  const before = fitVisit(input.before, "before");
  const after = fitVisit(input.after, "after");
  const keys = [...new Set([...before.keys(), ...after.keys()])].sort((left, right) => left - right);
  const matched = keys.map((midi) => matchNote(midi, before.get(midi), after.get(midi)));
  return {
    falseDiscoveryRate: rate,
    notes: judge(matched, rate),
    pitch: pitchByRegister(matched),
    humidity: humidity(input),
  };
}

function judge(matched: readonly Matched[], rate: number): NoteComparison[] {
  const floor = MOVE_SIGMA_FLOOR ** 2;
  const differences = matched.flatMap(({ difference }) => (difference ? [difference] : []));
  const common = commonVariance(differences, floor) ?? { variance: 2 * MEASURING_SIGMA ** 2, dof: 1 };
  const tests = matched.map(({ difference }) => (difference ? test(difference, common, floor) : null));
  const adjusted = adjustedPValues(tests.flatMap((each) => (each ? [each.pValue] : [])));
  const found = adjusted.filter((p) => p <= rate).length;
  const level = (rate * Math.min(adjusted.length, found + 1)) / Math.max(1, adjusted.length);
  let next = 0;
  return matched.map(({ midi, reason, partials, pitchCents }, index) => {
    const result = tests[index];
    if (!result) return notComparable(midi, reason, partials, pitchCents);
    const adjustedPValue = adjusted[next] ?? 1;
    next += 1;
    const { deltaLnB, sigma, dof, t, pValue } = result;
    const half = studentQuantile(0.05, dof) * sigma;
    // Four in five: 0.84 standard deviations beyond the limit, the upper fifth of the normal.
    const detectable = (studentQuantile(level, dof) + normalQuantile(0.4)) * sigma;
    return {
      midi,
      verdict: adjustedPValue <= rate ? "changed" : "unchanged",
      reason: null,
      deltaLnB,
      deltaLnBSigma: sigma,
      low: deltaLnB - half,
      high: deltaLnB + half,
      dof,
      t,
      pValue,
      adjustedPValue,
      detectableChange: Math.expm1(Math.min(detectable, 50)),
      matchedPartials: partials,
      pitchCents,
    };
  });
}

function test(difference: Difference, common: { variance: number; dof: number }, floor: number) {
  const dof = common.dof + difference.dof;
  const variance = (common.dof * common.variance + difference.dof * difference.variance) / dof;
  const sigma = Math.sqrt(Math.max(variance, floor) * difference.lnBFactor);
  // The factor turns cents of f1 into ln f1²; its own error is a hundredth of that of ln B.
  const deltaLnB = difference.lnB + (2 * Math.LN2 * difference.f1Cents) / 1200;
  const t = deltaLnB / sigma;
  return { deltaLnB, sigma, dof, t, pValue: studentTwoSided(t, dof) };
}

function notComparable(
  midi: number,
  reason: NotComparable | null,
  matchedPartials: number[],
  pitchCents: number | null,
): NoteComparison {
  return {
    midi,
    verdict: "not-comparable",
    reason,
    deltaLnB: null,
    deltaLnBSigma: null,
    low: null,
    high: null,
    dof: null,
    t: null,
    pValue: null,
    adjustedPValue: null,
    detectableChange: null,
    matchedPartials,
    pitchCents,
  };
}

function pitchByRegister(matched: readonly Matched[]): RegisterPitch[] {
  return REGISTERS.flatMap((register) => {
    const moves = matched.flatMap(({ midi, pitchCents }) =>
      pitchCents !== null && registerOf(midi) === register ? [pitchCents] : [],
    );
    if (moves.length === 0) return [];
    const meanCents = mean(moves);
    const spread = moves.reduce((sum, move) => sum + (move - meanCents) ** 2, 0);
    const sigmaCents = moves.length < 2 ? null : Math.sqrt(spread / (moves.length - 1) / moves.length);
    return [{ register, notes: moves.length, meanCents, sigmaCents }];
  });
}

function humidity({ before, after }: CompareInput): CompareResult["humidity"] {
  for (const [path, value] of [
    ["before.humidityPercent", before.humidityPercent],
    ["after.humidityPercent", after.humidityPercent],
  ] as const) {
    if (value !== undefined && !(value >= 0 && value <= 100)) {
      throw new AcousticsError("bad-humidity", "Relative humidity lies between 0 and 100 %.", path);
    }
  }
  if (before.humidityPercent === undefined || after.humidityPercent === undefined) return null;
  return {
    beforePercent: before.humidityPercent,
    afterPercent: after.humidityPercent,
    changePercent: after.humidityPercent - before.humidityPercent,
  };
}
