import type { BuiltInStyle, Temperament, TemperamentName } from "@/lib/acoustics/types";

export const builtInNames = ["close", "even", "wide", "published"] as const satisfies readonly BuiltInStyle[];

export const builtInWords: Record<BuiltInStyle, { title: string; words: string }> = {
  close: { title: "Close", words: "Octaves kept near their low coincidences: least stretch." },
  even: { title: "Even", words: "Octaves, twelfths and double octaves share the compromise." },
  wide: { title: "Wide", words: "Leans on double octaves and high coincidences: most stretch." },
  published: {
    title: "Published",
    words: "The octave type over the compass after Rigaud, David and Daudet (2013).",
  },
};

/** The built-in styles as they stand in a list to choose from. */
export const builtInChoices: ReadonlyArray<{ value: BuiltInStyle; label: string }> = builtInNames.map(
  (value) => ({
    value,
    label: builtInWords[value].title,
  }),
);

export const temperamentWords: Record<TemperamentName, string> = {
  equal: "Equal",
  pythagorean: "Pythagorean",
  "meantone-quarter": "Quarter-comma meantone",
  "werckmeister-3": "Werckmeister III",
  "kirnberger-3": "Kirnberger III",
  vallotti: "Vallotti",
  "young-2": "Young No. 2",
  kellner: "Kellner",
};

export function temperamentName(temperament: Temperament): string {
  return typeof temperament === "string" ? temperamentWords[temperament] : "Own temperament";
}
