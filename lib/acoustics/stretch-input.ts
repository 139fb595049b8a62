import { checkedKey, checkedNumber, checkedPositive } from "./keyboard-input";
import { pitchClassOf } from "./keys";
import { builtInStyle, defaultStyle, isBuiltInStyle } from "./styles";
import { temperamentOffsets } from "./temperament";
import { AcousticsError, type IntervalRule, type StretchInput, type Style } from "./types";

export type PlanOptions = Pick<StretchInput, "style" | "temperament" | "referenceHz" | "anchor">;

/** Everything the solver needs besides B, checked. `keys` ascend; `offsets` are the temperament's cents per key. */
export type PlanSettings = {
  keys: readonly number[];
  offsets: readonly number[];
  style: Style;
  referenceHz: number;
  anchor: { position: number; partial: number };
};

const highestPartial = 32;
const widestInterval = 60;

export function checkedSettings(keys: readonly number[], options: PlanOptions): PlanSettings {
  const firstMidi = keys[0] ?? 21;
  const lastMidi = keys.at(-1) ?? 108;
  const offsets = temperamentOffsets(options.temperament ?? "equal");
  const referenceHz = checkedPositive(options.referenceHz ?? 440, "referenceHz");
  const anchor = options.anchor ?? { midi: 69, partial: 1 };
  checkedKey(anchor.midi, "anchor.midi", { firstMidi, lastMidi });
  checkedPartial(anchor.partial, "anchor.partial");
  const position = keys.indexOf(anchor.midi);
  if (position < 0) {
    throw new AcousticsError(
      "unknown-key",
      `Key ${anchor.midi}, the anchor, is not among the keys`,
      "anchor.midi",
    );
  }
  return {
    keys,
    offsets: keys.map((midi) => offsets[pitchClassOf(midi)] ?? 0),
    style: checkedStyle(options.style ?? defaultStyle, firstMidi, lastMidi),
    referenceHz,
    anchor: { position, partial: anchor.partial },
  };
}

function checkedStyle(style: string | Style, firstMidi: number, lastMidi: number): Style {
  if (typeof style === "string") {
    if (isBuiltInStyle(style)) return builtInStyle(style, firstMidi, lastMidi);
    throw new AcousticsError("unknown-style", `There is no built-in style "${style}"`, "style");
  }
  if (checkedNumber(style.smoothness, "style.smoothness") < 0) {
    throw new AcousticsError("negative", "Smoothness must not be negative", "style.smoothness");
  }
  if (style.toleranceCents !== undefined) checkedPositive(style.toleranceCents, "style.toleranceCents");
  if (style.intervals.length === 0) {
    throw new AcousticsError("no-intervals", "A style needs at least one interval", "style.intervals");
  }
  style.intervals.forEach((rule, i) => {
    checkRule(rule, `style.intervals[${i}]`, firstMidi, lastMidi);
  });
  return style;
}

function checkRule(rule: IntervalRule, path: string, firstMidi: number, lastMidi: number): void {
  checkedPartial(rule.lowerPartial, `${path}.lowerPartial`);
  checkedPartial(rule.upperPartial, `${path}.upperPartial`);
  if (!Number.isInteger(rule.semitones) || rule.semitones < 1 || rule.semitones > widestInterval) {
    const message = `An interval spans 1 to ${widestInterval} whole semitones`;
    throw new AcousticsError("bad-interval", message, `${path}.semitones`);
  }
  const just = 1200 * Math.log2(rule.lowerPartial / rule.upperPartial);
  if (Math.abs(just - 100 * rule.semitones) > 100) {
    const message = `Partials ${rule.lowerPartial} and ${rule.upperPartial} do not meet ${rule.semitones} semitones apart`;
    throw new AcousticsError("bad-interval", message, path);
  }
  if (typeof rule.weights === "number") {
    checkedWeight(rule.weights, `${path}.weights`);
    return;
  }
  const lowerKeys = Math.max(0, lastMidi - firstMidi + 1 - rule.semitones);
  if (rule.weights.length < lowerKeys) {
    const message = `This needs one weight for each of the ${lowerKeys} lower keys`;
    throw new AcousticsError("weights-too-short", message, `${path}.weights`);
  }
  rule.weights.forEach((weight, i) => {
    checkedWeight(weight, `${path}.weights[${i}]`);
  });
}

function checkedWeight(weight: number, path: string): void {
  if (checkedNumber(weight, path) < 0)
    throw new AcousticsError("negative", "A weight must not be negative", path);
}

function checkedPartial(partial: number, path: string): void {
  if (!Number.isInteger(partial) || partial < 1 || partial > highestPartial) {
    throw new AcousticsError("bad-partial", `A partial is a whole number from 1 to ${highestPartial}`, path);
  }
}
