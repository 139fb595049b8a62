export { adviceFrom, advise } from "./advise";
export type { Beat, BeatingInterval, BeatsInput, BeatsResult, TunedNote } from "./beats";
export { BEATING_INTERVALS, beatRates, beats, beatsPerSecond, evenness, harmonicNotes } from "./beats";
export { compare } from "./compare";
export type {
  CompareInput,
  CompareResult,
  NotComparable,
  NoteComparison,
  NoteReadings,
  RegisterPitch,
  Verdict,
  VisitReadings,
} from "./compare-types";
export { studentQuantile } from "./distributions";
export type { Expectation, Expected, FrequencyCheck } from "./expected";
export { ASK_BEYOND_CENTS, checkFrequency, expectedPartial } from "./expected";
export { fit } from "./fit";
export { assumedSigma, irregularitySigma } from "./fit-prior";
export { DEFAULT_MAX_PARTIAL } from "./fit-state";
export { keyboard } from "./keyboard";
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
export { plannedKeyboard } from "./planned-keyboard";
export type { Register } from "./registers";
export { REGISTERS, registerOf } from "./registers";
export { planFrom, stretch } from "./stretch";
export type { PlainString, StringState, WoundString } from "./string";
export {
  breakingShare,
  COPPER_DENSITY,
  gaugeDiameterMm,
  inharmonicityOf,
  leastTensileMpa,
  plainString,
  STEEL_DENSITY,
  STEEL_MODULUS,
  tension,
  waveSpeed,
  woundString,
  youngCents,
  youngConstant,
} from "./string";
export type { RegisterRule, RegisterStyle } from "./styles";
export {
  builtInStyle,
  builtInStyles,
  defaultStyle,
  isBuiltInStyle,
  registerStyles,
  styleFromRegisters,
} from "./styles";
export type { TemperamentInput, TemperamentResult } from "./temperament";
export { describeTemperament, TEMPERAMENT_NAMES, temperamentOffsets, temperedFifths } from "./temperament";
export * from "./types";
export { COMPUTATION_VERSION } from "./version";
export type { Gauge, GaugeSystem } from "./wire-tables";
export { WIRE_GAUGES } from "./wire-tables";
