import { keyName } from "@/lib/acoustics/keys";
import type { TemperamentName } from "@/lib/acoustics/types";
import { type Day, showDay } from "@/lib/dates";
import type { FieldErrors } from "@/lib/errors";

export const kinds = ["grand", "upright", "square", "other"] as const;
export type InstrumentKind = (typeof kinds)[number];

export const kindLabels: Record<InstrumentKind, string> = {
  grand: "Grand",
  upright: "Upright",
  square: "Square",
  other: "Other stringed keyboard",
};

export const temperamentLabels: Record<TemperamentName, string> = {
  equal: "Equal",
  pythagorean: "Pythagorean",
  "meantone-quarter": "Quarter-comma meantone",
  "werckmeister-3": "Werckmeister III",
  "kirnberger-3": "Kirnberger III",
  vallotti: "Vallotti",
  "young-2": "Young II",
  kellner: "Kellner",
};

/** Compasses that makers build; any other is typed as its two ends. */
export const usualRanges = [
  { keys: 88, firstMidi: 21, lastMidi: 108 },
  { keys: 85, firstMidi: 21, lastMidi: 105 },
  { keys: 92, firstMidi: 17, lastMidi: 108 },
  { keys: 97, firstMidi: 12, lastMidi: 108 },
] as const;

export const lowestFirst = 9;
export const highestFirst = 60;
export const lowestLast = 72;
export const highestLast = 120;

export function rangeLabel({ firstMidi, lastMidi }: { firstMidi: number; lastMidi: number }): string {
  return `${lastMidi - firstMidi + 1} keys, ${keyName(firstMidi)} to ${keyName(lastMidi)}`;
}

/** The compass and its break; the database holds the same. */
export function rangeFaults({
  firstMidi,
  lastMidi,
  breakMidi,
}: {
  firstMidi: number;
  lastMidi: number;
  breakMidi: number | null;
}): FieldErrors {
  const faults: FieldErrors = {};
  if (firstMidi < lowestFirst || firstMidi > highestFirst) {
    faults.firstMidi = `The lowest key lies between ${keyName(lowestFirst)} and ${keyName(highestFirst)}.`;
  }
  if (lastMidi < lowestLast || lastMidi > highestLast) {
    faults.lastMidi = `The highest key lies between ${keyName(lowestLast)} and ${keyName(highestLast)}.`;
  }
  if (breakMidi !== null && (breakMidi <= firstMidi || breakMidi > lastMidi)) {
    faults.breakMidi = `The first note of the treble bridge lies above ${keyName(firstMidi)} and no higher than ${keyName(lastMidi)}.`;
  }
  return faults;
}

/** Whether an instrument can leave its place on this day: after it came there, and not in the future. */
export function moveFaults(since: Day, now: { since: Day | null; today: Day; locale: string }): FieldErrors {
  if (since > now.today) return { since: "This day has not come yet. Record the move when it is done." };
  if (now.since !== null && since <= now.since) {
    return {
      since: `It has been at its present place since ${showDay(now.since, now.locale)}. Choose a later day, or correct the present place.`,
    };
  }
  return {};
}

/** Whether the present place can be said to begin on this day: after the one before ended, not in the future. */
export function sinceFaults(
  since: Day,
  now: { endOfBefore: Day | null; today: Day; locale: string },
): FieldErrors {
  if (since > now.today) return { since: "This day has not come yet." };
  if (now.endOfBefore !== null && since < now.endOfBefore) {
    return {
      since: `It left the place before on ${showDay(now.endOfBefore, now.locale)}. Choose that day or a later one.`,
    };
  }
  return {};
}

export type StringFacts = {
  strings: number;
  wound: boolean;
  speakingLengthMm?: number | null;
  diameterMm?: number | null;
  outerDiameterMm?: number | null;
};

/** What one field alone cannot say: a wrap is wound over a thinner core. */
export function stringFaults({ wound, diameterMm, outerDiameterMm }: StringFacts): FieldErrors {
  const outer = outerDiameterMm ?? null;
  const core = diameterMm ?? null;
  if (outer === null) return {};
  if (!wound) return { outerDiameterMm: "Only wound strings have an outer diameter." };
  if (core === null) return { diameterMm: "Give the core's diameter as well." };
  if (outer <= core) return { outerDiameterMm: "The wrapped string is thicker than its core." };
  return {};
}
