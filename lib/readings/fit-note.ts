import type { NoteRow, NoteValues } from "@/db/queries/readings";
import { AcousticsError, fit, keyName } from "@/lib/acoustics";
import { COMPUTATION_VERSION } from "@/lib/acoustics/version";
import { invalid } from "@/lib/errors";
import {
  fitInputOf,
  type KeyRange,
  keyModel,
  pitchOf,
  pitchOffset,
  questionAbout,
  readingHz,
  readingsToAskAbout,
} from "./rules";
import type { NoteInput } from "./schema";

/**
 * Turns typed readings into what is stored: frequencies with their fit. Faults are named at their reading
 * under `path`; a frequency far from where it is expected is asked about unless confirmed.
 */
export function fitNote({
  midi,
  input,
  sheet,
  instrument,
  others,
  path,
}: {
  midi: number;
  input: NoteInput;
  sheet: { referenceHz: number };
  instrument: KeyRange;
  /** The sheet's notes as stored; those of other keys tell what to expect of this one. */
  others: readonly NoteRow[];
  path: string;
}): NoteValues {
  if (midi < instrument.firstMidi || midi > instrument.lastMidi) {
    const range = `${keyName(instrument.firstMidi)} to ${keyName(instrument.lastMidi)}`;
    throw invalid(
      { [path.replace(/readings$/, "midi")]: `This instrument's keys run from ${range}.` },
      "This note is not on the instrument.",
    );
  }
  const partials = input.readings.map(({ partial }) => partial);
  const twice = partials.findIndex((partial, index) => partials.indexOf(partial) < index);
  if (twice >= 0) throw invalid({ [`${path}.${twice}.partial`]: `Partial ${partials[twice]} stands twice.` });

  const values = {
    partials,
    hz: input.readings.map((reading) => readingHz(reading, midi, sheet.referenceHz)),
    sigmaCents: input.readings.map(({ sigmaCents }) => sigmaCents ?? null),
    kept: input.kept.filter((partial) => partials.includes(partial)),
    dropped: input.dropped.filter((partial) => partials.includes(partial) && !input.kept.includes(partial)),
  };
  const fitInput = fitInputOf({ ...values, midi, referenceHz: sheet.referenceHz });
  const elsewhere = others
    .filter((note) => note.midi !== midi)
    .map(({ midi: key, fit: fitted }) => ({ ...fitted, midi: key }));
  const questions = readingsToAskAbout({
    fitInput,
    midi,
    referenceHz: sheet.referenceHz,
    pitchOffsetCents: pitchOffset(pitchOf(elsewhere, sheet.referenceHz)),
    model: keyModel(elsewhere, midi, instrument),
    confirmed: input.confirmed,
  });
  if (questions.length > 0) {
    throw invalid(
      Object.fromEntries(
        questions.map((question) => [
          `${path}.${partials.indexOf(question.partial)}.${field(input, question.partial)}`,
          questionAbout(question),
        ]),
      ),
      "Some frequencies are far from where they are expected. Correct or confirm them; nothing is lost.",
    );
  }
  try {
    return { ...values, fit: fit(fitInput), fitVersion: COMPUTATION_VERSION };
  } catch (error) {
    if (error instanceof AcousticsError) throw invalid({ [path]: error.message });
    throw error;
  }
}

/** The note as it is when its cents are to be counted from another reference: frequencies move, and it is fitted anew. */
export function movedNote(note: NoteRow, fromHz: number, toHz: number): NoteValues {
  const values = {
    partials: note.partials,
    hz: note.hz.map((hz) => (hz * toHz) / fromHz),
    sigmaCents: note.sigmaCents,
    kept: note.kept,
    dropped: note.dropped,
  };
  const fitInput = fitInputOf({ ...values, midi: note.midi, referenceHz: toHz });
  return { ...values, fit: fit(fitInput), fitVersion: COMPUTATION_VERSION };
}

function field(input: NoteInput, partial: number): "hz" | "cents" {
  return input.readings.find((reading) => reading.partial === partial)?.cents === undefined ? "hz" : "cents";
}
