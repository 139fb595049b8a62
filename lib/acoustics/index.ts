export type { Beat, BeatingInterval, BeatsInput, BeatsResult, TunedNote } from "./beats";
export { BEATING_INTERVALS, beatRates, beats, beatsPerSecond, evenness, harmonicNotes } from "./beats";
export { fit } from "./fit";
export { DEFAULT_MAX_PARTIAL } from "./fit-state";
export {
  centsBetween,
  equalTemperedHz,
  HIGHEST_PIANO_KEY,
  keyFromName,
  keyName,
  LOWEST_PIANO_KEY,
  nearestKey,
  octaveOf,
  pitchClassOf,
  raiseByCents,
  STANDARD_PITCH_HZ,
} from "./keys";
export {
  bAtPitch,
  bFromTwoPartials,
  f0FromF1,
  f1FromF0,
  inharmonicCents,
  inharmonicCentsSlope,
  partialHzFromF0,
  partialHzFromF1,
} from "./partials";
export type { TemperamentInput, TemperamentResult } from "./temperament";
export { describeTemperament, TEMPERAMENT_NAMES, temperamentOffsets, temperedFifths } from "./temperament";
export * from "./types";
