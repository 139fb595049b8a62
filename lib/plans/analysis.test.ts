import { describe, expect, it } from "vitest";
import { builtInStyle, equalTemperedHz } from "@/lib/acoustics";
import { analyse } from "./analysis";

/** B of an invented grand, rising by the treble asymptote (Rigaud, David & Daudet 2013, from memory). */
const grand = (midi: number) => Math.exp(0.0926 * midi - 13.64) + Math.exp(-0.0847 * midi - 5.82);
const read = [28, 33, 40, 45, 50, 57, 62, 69, 74, 81, 85, 88, 91, 95, 100];
const E6 = 88;

const analysed = (keys: readonly number[], change: (midi: number) => number = () => 1) =>
  analyse({
    instrument: { id: "i", firstMidi: 21, lastMidi: 108, breakMidi: 41 },
    sheet: { id: "s", referenceHz: 440 },
    notes: keys.map((midi) => ({
      midi,
      f1Hz: equalTemperedHz(midi),
      b: grand(midi) * change(midi),
      bSigma: 0.01 * grand(midi),
      rmsCents: 0.4,
    })),
    style: { ref: "even", name: "Even", style: builtInStyle("even", 21, 108) },
    temperament: "equal",
    referenceHz: 440,
  }).record;

describe("a note that does not belong", () => {
  const wrongWire = analysed(read, (midi) => (midi === E6 ? 1.9 : 1));
  const without = analysed(read.filter((midi) => midi !== E6));

  it("is flagged, with its own B beside what its neighbours foretell", () => {
    const flagged = wrongWire.keys.filter(({ flag }) => flag !== null);
    expect(flagged.map(({ midi }) => midi)).toEqual([E6]);
    expect(flagged[0]?.b).toBeGreaterThan(1.6 * grand(E6));
  });

  it("drives neither plan nor beats: both are as if it had not been read", () => {
    expect(wrongWire.notes).toEqual(without.notes);
    expect(wrongWire.beats).toEqual(without.beats);
    expect(wrongWire.evenness).toEqual(without.evenness);
  });

  it("differs from one that belongs, which does drive them", () => {
    expect(analysed(read).notes).not.toEqual(without.notes);
  });
});
