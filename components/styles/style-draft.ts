import { BEATING_INTERVALS, type REGISTERS, type RegisterRule, type RegisterStyle } from "@/lib/acoustics";

/** What can be weighed: coincident partials of the intervals a tuner tests, the beating thirds aside. */
export const weighableIntervals = BEATING_INTERVALS.filter(({ semitones }) =>
  [5, 7, 12, 19, 24, 36].includes(semitones),
);

export function ruleKey(rule: { lowerPartial: number; upperPartial: number; semitones: number }): string {
  return `${rule.semitones}:${rule.lowerPartial}:${rule.upperPartial}`;
}

export function newRule(key: string): RegisterRule | null {
  const interval = weighableIntervals.find((candidate) => ruleKey(candidate) === key);
  if (!interval) return null;
  const { lowerPartial, upperPartial, semitones } = interval;
  return {
    lowerPartial,
    upperPartial,
    semitones,
    weights: { bass: 0.2, tenor: 0.2, middle: 0.2, treble: 0.2, top: 0 },
  };
}

/** A style as typed: numbers are text until they are read, so that a half-typed one is not lost. */
export type StyleDraft = {
  name: string;
  smoothness: string;
  toleranceCents: string;
  rules: { rule: RegisterRule; weights: Record<(typeof REGISTERS)[number], string> }[];
};

export function draftOf(style: RegisterStyle & { name: string }): StyleDraft {
  return {
    name: style.name,
    smoothness: String(style.smoothness),
    toleranceCents: String(style.toleranceCents ?? 2),
    rules: style.intervals.map(draftRule),
  };
}

export function draftRule(rule: RegisterRule): StyleDraft["rules"][number] {
  const { bass, tenor, middle, treble, top } = rule.weights;
  return {
    rule,
    weights: {
      bass: String(bass),
      tenor: String(tenor),
      middle: String(middle),
      treble: String(treble),
      top: String(top),
    },
  };
}

function readNumber(text: string): number {
  return text.trim() === "" ? Number.NaN : Number(text.trim().replace(",", "."));
}

/** The draft as the server takes it; what is no number stays NaN, and the schema names its field. */
export function styleOf(draft: StyleDraft) {
  return {
    name: draft.name,
    smoothness: readNumber(draft.smoothness),
    toleranceCents: readNumber(draft.toleranceCents),
    intervals: draft.rules.map(({ rule, weights }) => ({
      ...rule,
      weights: {
        bass: readNumber(weights.bass),
        tenor: readNumber(weights.tenor),
        middle: readNumber(weights.middle),
        treble: readNumber(weights.treble),
        top: readNumber(weights.top),
      },
    })),
  };
}
