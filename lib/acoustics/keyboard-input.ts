import { AcousticsError, type Observation } from "./types";

export type KeyRange = { firstMidi: number; lastMidi: number };

/** Lowest and highest MIDI note any instrument may reach: C0 below the widest grands, two octaves above C8's E. */
const lowestMidi = 9;
const highestMidi = 120;

/** Key range of the instrument, A0–C8 unless given. Throws on anything but whole, ordered MIDI notes. */
export function checkedRange(input: { firstMidi?: number; lastMidi?: number }): KeyRange {
  const firstMidi = checkedKey(input.firstMidi ?? 21, "firstMidi", {
    firstMidi: lowestMidi,
    lastMidi: highestMidi,
  });
  const lastMidi = checkedKey(input.lastMidi ?? 108, "lastMidi", {
    firstMidi: lowestMidi,
    lastMidi: highestMidi,
  });
  if (lastMidi <= firstMidi) {
    throw new AcousticsError("range-order", "The last key must lie above the first", "lastMidi");
  }
  return { firstMidi, lastMidi };
}

export function checkedKey(midi: number, path: string, range: KeyRange): number {
  if (!Number.isInteger(midi)) {
    throw new AcousticsError("unknown-key", "A key is a whole MIDI note number", path);
  }
  if (midi < range.firstMidi || midi > range.lastMidi) {
    throw new AcousticsError(
      "unknown-key",
      `Key ${midi} is outside the keys ${range.firstMidi} to ${range.lastMidi}`,
      path,
    );
  }
  return midi;
}

export function checkedNumber(value: number, path: string): number {
  if (typeof value !== "number" || !Number.isFinite(value)) {
    throw new AcousticsError("not-finite", "This must be a finite number", path);
  }
  return value;
}

export function checkedPositive(value: number, path: string): number {
  if (checkedNumber(value, path) <= 0) {
    throw new AcousticsError("not-positive", "This must be greater than zero", path);
  }
  return value;
}

/**
 * Observations checked, in key order, one per key: several strings of a key are joined by their inverse variances,
 * and a residual given for any of them is kept as their root mean square.
 */
export function checkedObservations(observations: readonly Observation[], range: KeyRange): Observation[] {
  const byKey = new Map<number, Observation[]>();
  observations.forEach((observation, i) => {
    const path = `observations[${i}]`;
    const midi = checkedKey(observation.midi, `${path}.midi`, range);
    checkedNumber(observation.b, `${path}.b`);
    checkedPositive(observation.bSigma, `${path}.bSigma`);
    if (
      observation.residualCents !== undefined &&
      checkedNumber(observation.residualCents, `${path}.residualCents`) < 0
    ) {
      throw new AcousticsError("negative", "This must not be negative", `${path}.residualCents`);
    }
    byKey.set(midi, [...(byKey.get(midi) ?? []), observation]);
  });
  return [...byKey.values()].map(joined).sort((a, b) => a.midi - b.midi);
}

function joined(strings: readonly Observation[]): Observation {
  const [first] = strings;
  if (first === undefined) throw new Error("A key without observations cannot be joined");
  if (strings.length === 1) return first;
  let information = 0;
  let weighted = 0;
  for (const { b, bSigma } of strings) {
    information += bSigma ** -2;
    weighted += b * bSigma ** -2;
  }
  const residuals = strings.flatMap(({ residualCents }) =>
    residualCents === undefined ? [] : [residualCents],
  );
  const meanSquare = residuals.reduce((sum, r) => sum + r * r, 0) / Math.max(1, residuals.length);
  return {
    midi: first.midi,
    b: weighted / information,
    bSigma: 1 / Math.sqrt(information),
    ...(residuals.length > 0 ? { residualCents: Math.sqrt(meanSquare) } : {}),
  };
}
