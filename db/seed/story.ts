import { humidityDrift, roomHumidity, roomTemperature } from "./climate";
import type { Chance } from "./random";
import type { SeedInstrument } from "./scenario";
import { makeStrings, type RawReading, readKey, type Strings, withOtherWire } from "./strings";

/** What one visit found and left at one instrument. */
export type SeedSheet = {
  stage: "as-found" | "as-left";
  takenAt: Date;
  humidityPercent: number;
  temperatureC: number;
  notes: { midi: number; readings: RawReading[] }[];
};

export type SeedJob = { work: string; remarks: string | null; sheets: SeedSheet[] };

const pitchKeys = [45, 57, 69, 81];
const detailedKeys = [23, 28, 33, 38, 43, 48, 53, 58, 63, 69, 74, 79, 84, 88, 93, 99];

/** E6 of the instrument whose strings were replaced two sizes too thick. */
export const wrongWireKey = 88;
const rightWireMm = 0.875;
const wrongWireMm = 0.975;
const springsUntilWrongWire = 4;
const springsUntilFlood = 4;

/**
 * An instrument through its visits: pitch follows the room's humidity since it was last tuned and sinks a little;
 * each tuning brings it back. `visits` counts from the oldest.
 */
export function instrumentStory(chance: Chance, instrument: SeedInstrument, referenceHz: number) {
  let strings = makeStrings(chance, { ...instrument, referenceHz });
  let left: { humidityPercent: number; takenAt: Date } | null = null;
  let visits = 0;

  return function visit(startsAt: Date, tuned: boolean): SeedJob {
    visits += 1;
    const humidityPercent = roomHumidity(startsAt, chance);
    const temperatureC = roomTemperature(startsAt, chance);
    if (instrument.story === "flooded" && visits === springsUntilFlood) strings = afterFlood(chance, strings);
    const found = foundOffset(chance, instrument, strings, {
      visits,
      startsAt,
      left,
      humidityPercent,
    });
    const sheet = (
      stage: SeedSheet["stage"],
      minutes: number,
      offset: (midi: number) => number,
    ): SeedSheet => ({
      stage,
      takenAt: new Date(startsAt.getTime() + minutes * 60_000),
      humidityPercent,
      temperatureC,
      notes: keysToRead(instrument, stage).map((midi) => ({
        midi,
        readings: readKey(chance, strings, midi, offset(midi)),
      })),
    });
    const sheets = [sheet("as-found", 10, found)];
    if (!tuned || instrument.story === "sixty-flat") {
      return { work: tuned ? "Look over" : "Tuning", remarks: remarkOf(instrument), sheets };
    }
    let work = "Tuning";
    if (instrument.story === "wrong-wire" && visits === springsUntilWrongWire + 1) {
      strings = withOtherWire(strings, wrongWireKey, rightWireMm, wrongWireMm);
      work = "Tuning; three strings replaced, E6";
    }
    sheets.push(sheet("as-left", 85, () => 0.25 * chance.normal()));
    left = { humidityPercent, takenAt: startsAt };
    return { work, remarks: null, sheets };
  };
}

function remarkOf(instrument: SeedInstrument): string | null {
  return instrument.story === "sixty-flat" ? "Left at found pitch; pitch raise quoted." : null;
}

function keysToRead(instrument: SeedInstrument, stage: SeedSheet["stage"]): number[] {
  const keys = instrument.detailed && stage === "as-found" ? detailedKeys : pitchKeys;
  return keys.filter((midi) => midi >= instrument.firstMidi && midi <= instrument.lastMidi);
}

function foundOffset(
  chance: Chance,
  instrument: SeedInstrument,
  strings: Strings,
  now: {
    visits: number;
    startsAt: Date;
    left: { humidityPercent: number; takenAt: Date } | null;
    humidityPercent: number;
  },
): (midi: number) => number {
  if (instrument.story === "sixty-flat") return () => -60 + 2 * chance.normal();
  if (!now.left) {
    const neglected = -8 - 20 * chance.uniform();
    return () => neglected + 1.2 * chance.normal();
  }
  const months = (now.startsAt.getTime() - now.left.takenAt.getTime()) / (30.4 * 86_400_000);
  const change = now.humidityPercent - now.left.humidityPercent;
  const flood = instrument.story === "flooded" && now.visits === springsUntilFlood;
  return (midi) =>
    humidityDrift(midi, change) -
    0.15 * months +
    (flood ? (midi < strings.breakMidi ? -22 : 14) : 0) +
    0.5 * chance.normal();
}

/** Rust and swollen joints: some keys stand off the curve afterwards. */
function afterFlood(chance: Chance, strings: Strings): Strings {
  const b = new Map(strings.b);
  for (const [midi, value] of strings.b) {
    if (chance.uniform() < 0.3) b.set(midi, value * Math.exp(0.18 * chance.normal()));
  }
  return { ...strings, b };
}
