import { evenness } from "./beats";
import { checkedKey, checkedNumber, checkedRange } from "./keyboard-input";
import { equalTemperedHz, raiseByCents } from "./keys";
import { at } from "./linear-algebra";
import { partialHzFromF1 } from "./partials";
import { plannedKeyboard } from "./planned-keyboard";
import {
  covarianceWithStretch,
  irregularityVariance,
  stretchByLnB,
  stretchVariance,
  z95,
} from "./stretch-band";
import { checkedSettings, type PlanOptions } from "./stretch-input";
import { type StretchSystem, solveStretch } from "./stretch-system";
import { AcousticsError, type KeyboardResult, type StretchInput, type StretchResult } from "./types";

/**
 * The stretch plan: cents of every key's first partial from equal temperament, by weighted least squares over coincident
 * partials, with its 95 % half-width and the partial to listen to.
 *
 * Give `observations` (B of some keys; the rest is predicted, and so are keys that do not belong: `plannedKeyboard`) or
 * `keys` (exact B; the plan then covers those keys and has no band). Weights of a style given as an array start at the lowest key of the plan.
 * Errors: AcousticsError `observations-or-keys`, `duplicate-key`, `unknown-style`, `no-intervals`, `bad-interval`,
 * `bad-partial`, `weights-too-short`, `undetermined`, `unknown-temperament`, `bad-temperament` and those of `keyboard`.
 * Sources: octave relation and octave-type curve, Rigaud, David & Daudet 2013, JASA 133:3107 (from memory); least squares on
 * partials, Koenig 2014, Spectral Analysis of Musical Sounds with Emphasis on the Piano (from memory).
 */
export function stretch(input: StretchInput): StretchResult {
  if (input.keys === undefined) {
    return planFrom(plannedKeyboard({ ...input, observations: input.observations ?? [] }).planned, input);
  }
  if (input.observations !== undefined && input.observations.length > 0) {
    throw new AcousticsError("observations-or-keys", "Give observations or exact keys, not both", "keys");
  }
  const known = checkedExactKeys(input, input.keys);
  const settings = checkedSettings([...known.keys()], input);
  return resultOf(solveStretch(settings, Float64Array.from(known.values())), null);
}

/** The plan from a keyboard already computed: options as in `stretch`. */
export function planFrom(result: KeyboardResult, options: PlanOptions = {}): StretchResult {
  const system = systemFrom(result, options);
  const n = result.keys.length;
  const columns = stretchByLnB(system);
  const variance = stretchVariance(columns, covarianceWithStretch(columns, flatCovariance(result), n), n);
  const irregular = irregularityVariance(system, residualsOf(result));
  const bands = Array.from(variance, (value, i) => z95 * Math.sqrt(Math.max(0, value) + at(irregular, i)));
  return resultOf(system, bands);
}

/** The least-squares system of a keyboard's median B. */
export function systemFrom(result: KeyboardResult, options: PlanOptions): StretchSystem {
  const settings = checkedSettings(
    result.keys.map(({ midi }) => midi),
    options,
  );
  return solveStretch(
    settings,
    Float64Array.from(result.keys, ({ b }) => b),
  );
}

/** Own residual of each key's fit, cents, where the observation brought one. */
export const residualsOf = ({ keys }: KeyboardResult): (number | undefined)[] =>
  keys.map(({ residualCents }) => residualCents);

export function flatCovariance({ keys, covariance }: KeyboardResult): Float64Array {
  const flat = new Float64Array(keys.length ** 2);
  covariance.forEach((row, i) => {
    flat.set(row, i * keys.length);
  });
  return flat;
}

function checkedExactKeys(input: StretchInput, keys: NonNullable<StretchInput["keys"]>): Map<number, number> {
  const range = checkedRange({
    firstMidi: input.firstMidi ?? 9,
    lastMidi: input.lastMidi ?? 120,
  });
  const known = new Map<number, number>();
  keys.forEach(({ midi, b }, i) => {
    checkedKey(midi, `keys[${i}].midi`, range);
    if (checkedNumber(b, `keys[${i}].b`) < 0) {
      throw new AcousticsError("negative", "B must not be negative", `keys[${i}].b`);
    }
    if (known.has(midi))
      throw new AcousticsError("duplicate-key", `Key ${midi} is given twice`, `keys[${i}].midi`);
    known.set(midi, b);
  });
  if (known.size < 2) throw new AcousticsError("too-few-keys", "A plan needs at least two keys", "keys");
  return new Map([...known].sort(([a], [b]) => a - b));
}

/**
 * The partial a tuner sets the note by: high in the bass, where the first is weak and pulled, the first in the treble.
 * Common practice, no source.
 */
function listenPartialOf(midi: number): number {
  if (midi < 36) return 6;
  if (midi < 48) return 4;
  return midi < 72 ? 2 : 1;
}

function resultOf({ settings, b, departure }: StretchSystem, bands: readonly number[] | null): StretchResult {
  const notes = settings.keys.map((midi, i) => {
    const stretchCents = at(departure, i) + (settings.offsets[i] ?? 0);
    const targetHz = raiseByCents(equalTemperedHz(midi, settings.referenceHz), stretchCents);
    const listenPartial = listenPartialOf(midi);
    const listenHz = partialHzFromF1(listenPartial, targetHz, at(b, i));
    return { midi, stretchCents, bandCents: bands?.[i] ?? null, targetHz, listenPartial, listenHz };
  });
  return {
    notes,
    evenness: evenness(notes.map(({ midi, targetHz }, i) => ({ midi, f1Hz: targetHz, b: at(b, i) }))),
  };
}
