import { AcousticsError, type FitInput } from "./types";

/** Most readings one sheet may hold: a hundred partials, some read several times. */
const MOST_READINGS = 1000;
export const HIGHEST_PARTIAL = 128;
const LOWEST_HZ = 1e-3;
const HIGHEST_HZ = 1e6;
const SMALLEST_SIGMA = 1e-4;
const LARGEST_SIGMA = 1200;

function isPositive(value: unknown): value is number {
  return typeof value === "number" && Number.isFinite(value) && value > 0;
}

export function checkMidi(midi: unknown, path: string): void {
  if (!(typeof midi === "number" && Number.isInteger(midi) && midi >= 0 && midi <= 127)) {
    throw new AcousticsError("bad-note", "A note is a whole MIDI number; a piano has 21 to 108.", path);
  }
}

function checkReferenceHz(referenceHz: unknown): void {
  if (!isPositive(referenceHz)) {
    throw new AcousticsError("bad-reference", "The reference pitch must be above 0 Hz.", "referenceHz");
  }
}

function checkPartial(partial: unknown, path: string): void {
  if (
    !(typeof partial === "number" && Number.isInteger(partial) && partial >= 1 && partial <= HIGHEST_PARTIAL)
  ) {
    throw new AcousticsError(
      "bad-partial",
      `A partial is a whole number from 1 to ${HIGHEST_PARTIAL}.`,
      path,
    );
  }
}

/**
 * Check a sheet before anything is computed. Errors (AcousticsError with the path of the field): "no-readings",
 * "too-many-readings", "bad-partial", "missing-frequency", "two-frequencies", "bad-frequency", "bad-cents",
 * "note-needed", "bad-sigma", "bad-note", "bad-reference".
 */
export function checkFitInput(input: FitInput): void {
  const { readings, midi, referenceHz, kept, dropped, maxPartial } = input;
  if (maxPartial !== undefined) checkPartial(maxPartial, "maxPartial");
  if (midi !== undefined) checkMidi(midi, "midi");
  if (referenceHz !== undefined) checkReferenceHz(referenceHz);
  if (!Array.isArray(readings) || readings.length === 0) {
    throw new AcousticsError("no-readings", "Enter at least one reading.", "readings");
  }
  if (readings.length > MOST_READINGS) {
    throw new AcousticsError(
      "too-many-readings",
      `One note takes at most ${MOST_READINGS} readings; this sheet has ${readings.length}.`,
      "readings",
    );
  }
  readings.forEach((reading: FitInput["readings"][number], index) => {
    const path = `readings[${index}]`;
    const { partial, hz, cents, sigmaCents } = reading;
    checkPartial(partial, `${path}.partial`);
    if (hz !== undefined && cents !== undefined) {
      throw new AcousticsError("two-frequencies", "Give the frequency in Hz or in cents, not both.", path);
    }
    if (hz === undefined && cents === undefined) {
      throw new AcousticsError("missing-frequency", "This reading has no frequency.", path);
    }
    if (hz !== undefined && !(isPositive(hz) && hz >= LOWEST_HZ && hz <= HIGHEST_HZ)) {
      const message = "A frequency must be a number above 0 Hz, and one that sound can have.";
      throw new AcousticsError("bad-frequency", message, `${path}.hz`);
    }
    if (cents !== undefined) {
      if (!(typeof cents === "number" && Math.abs(cents) <= 12_000)) {
        throw new AcousticsError("bad-cents", "Cents must be a number within ±12 000.", `${path}.cents`);
      }
      if (midi === undefined) {
        throw new AcousticsError("note-needed", "Readings in cents need the note they belong to.", "midi");
      }
    }
    const sigmaFits =
      sigmaCents === undefined ||
      (isPositive(sigmaCents) && sigmaCents >= SMALLEST_SIGMA && sigmaCents <= LARGEST_SIGMA);
    if (!sigmaFits) {
      throw new AcousticsError(
        "bad-sigma",
        `An error must be between ${SMALLEST_SIGMA} and ${LARGEST_SIGMA} cents.`,
        `${path}.sigmaCents`,
      );
    }
  });
  kept?.forEach((partial, index) => {
    checkPartial(partial, `kept[${index}]`);
  });
  dropped?.forEach((partial, index) => {
    checkPartial(partial, `dropped[${index}]`);
  });
}
