import {
  adviceFrom,
  beatRates,
  centsBetween,
  equalTemperedHz,
  type KeyboardResult,
  planFrom,
  plannedKeyboard,
  raiseByCents,
} from "@/lib/acoustics";
import type { Style, Temperament } from "@/lib/acoustics/types";
import { COMPUTATION_VERSION } from "@/lib/acoustics/version";
import { type FittedNote, keyboardInput, observationsOf, pitchOf } from "@/lib/readings/rules";
import type { AnalysisRecord } from "./schema";

export type AnalysisInput = {
  instrument: { id: string; firstMidi: number; lastMidi: number; breakMidi: number | null };
  sheet: { id: string; referenceHz: number };
  notes: readonly FittedNote[];
  style: { ref: string; name: string; style: Style };
  temperament: Temperament;
  referenceHz: number;
};

/**
 * Everything the pages draw from one sheet: B of all keys, the plan with its band, beats, evenness and what to
 * measure next. Pure: the server's answer and the browser's preview are the same code.
 */
export function analyse(input: AnalysisInput): { record: AnalysisRecord; planned: KeyboardResult } {
  const { instrument, sheet, style, temperament, referenceHz } = input;
  // The compass may have been corrected after a note was read; what lies outside it belongs to no key.
  const notes = input.notes.filter(({ midi }) => midi >= instrument.firstMidi && midi <= instrument.lastMidi);
  const { curve, planned } = plannedKeyboard(keyboardInput(observationsOf(notes), instrument));
  const options = { style: style.style, temperament, referenceHz };
  const plan = planFrom(planned, options);
  const tuned = plan.notes.map((note, index) => ({
    midi: note.midi,
    f1Hz: note.targetHz,
    b: planned.keys[index]?.b ?? 0,
  }));
  return {
    planned,
    record: {
      sheetId: sheet.id,
      instrumentId: instrument.id,
      style: { ref: style.ref, name: style.name },
      temperament: typeof temperament === "string" ? temperament : [...temperament],
      referenceHz,
      computationVersion: COMPUTATION_VERSION,
      breakMidi: curve.breakMidi,
      breakSource: curve.breakSource,
      priorOnly: curve.priorOnly,
      keys: curve.keys.map(({ residualCents: _, ...key }) => key),
      notes: plan.notes,
      evenness: plan.evenness,
      beats: beatRates(tuned),
      advice: adviceFrom(curve, options),
      pitch: pitchAt(notes, sheet.referenceHz, referenceHz),
    },
  };
}

/** The pitch as read, against the reference the plan is for rather than the one the sheet was typed at. */
function pitchAt(notes: readonly FittedNote[], sheetReferenceHz: number, referenceHz: number) {
  return pitchOf(notes, sheetReferenceHz).map(({ midi, cents }) => {
    const hz = raiseByCents(equalTemperedHz(midi, sheetReferenceHz), cents);
    return { midi, cents: centsBetween(equalTemperedHz(midi, referenceHz), hz) };
  });
}
