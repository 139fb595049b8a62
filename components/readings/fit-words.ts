import { fixed, signed } from "@/components/charts/format";
import { noteText } from "@/components/charts/note-spelling";
import { flagWords } from "@/components/plans/analysis-plots";
import type { FitWarning, Rejection } from "@/lib/acoustics/types";
import type { AnalysisRecord } from "@/lib/plans/schema";
import type { AskAbout } from "@/lib/readings/rules";

const cents = (value: number) => `${fixed(Math.abs(value), 0)} cents`;

/** What is wrong with a reading left out of the fit, and why it probably is; sharps are still to be drawn. */
export function rejectionWords({ partial, reason, residualCents, fitsPartial, fitsMidi }: Rejection): {
  what: string;
  why: string;
} {
  const off = `Partial ${partial} is ${cents(residualCents)} off the curve.`;
  switch (reason) {
    case "off-curve":
      return { what: off, why: "Probably another string sounding. Mute the neighbours and read it again." };
    case "wrong-partial-number":
      return {
        what: off,
        why: fitsPartial
          ? `It fits partial ${fitsPartial}: probably counted wrong.`
          : "Probably counted wrong.",
      };
    case "neighbouring-note":
      return {
        what: off,
        why: fitsMidi ? `It fits ${noteText(fitsMidi)} sounding along.` : "Probably another note sounding.",
      };
    case "duplicate":
      return { what: `Partial ${partial} was read twice.`, why: "Only one of the two can count." };
    case "beyond-range":
      return {
        what: `Partial ${partial} lies beyond the range of the fit.`,
        why: "In the bass B depends on the range, so partials above 16 stay out unless kept.",
      };
    case "dropped-by-hand":
      return {
        what: `Partial ${partial} is left out by hand.`,
        why: `It lies ${signed(residualCents, 1)} cents from the curve.`,
      };
  }
}

export const warningWords: Record<FitWarning, string> = {
  "exact-no-check": "Two partials give B exactly, with nothing to check it. Read a third.",
  "single-reading": "One partial gives the pitch, not B. Read two more.",
  "b-not-significant": "B cannot be told from zero with these readings.",
  "few-partials": "Few partials: the next reading narrows B most.",
  "first-partial-unreliable": "The first partial is weak down here; the pitch rests on the others.",
  "kept-off-curve": "A reading kept by hand lies off the curve.",
  "ambiguous-outlier": "One of these readings does not fit, but it is not clear which. Read the note again.",
  "scatter-exceeds-sigma": "The readings scatter more than their errors say.",
};

/** Which ± this is: the keyboard's own, on the page of all keys, is another. */
export const ownErrorWords =
  "± of B: from this note's readings alone; Inharmonicity weighs all notes together.";

/** The question at a reading far from where it is expected. */
export function questionWords({ partial, awayCents, expectedHz, fitsPartial }: AskAbout): {
  what: string;
  why: string;
} {
  return {
    what: `Partial ${partial} is ${cents(awayCents)} ${awayCents > 0 ? "above" : "below"} where it is expected`,
    why: `(${expectedHz.toFixed(2)} Hz).${fitsPartial === null ? "" : ` It looks like partial ${fitsPartial}.`}`,
  };
}

/** "does not belong, 25 % above its neighbours": of a note whose B is not its neighbours'. */
export function notBelongingWords(key: AnalysisRecord["keys"][number]): string {
  const why = flagWords(key).replace(/\.$/, "");
  return `does not belong, ${why.charAt(0).toLowerCase()}${why.slice(1)}`;
}

function stringWords(string: number | "all"): string {
  if (string === "all") return "all strings";
  return ["left string", "middle string", "right string"][string - 1] ?? `string ${string}`;
}

/** "left string, take 2": said where a row is not the whole unison's first take. */
export function placeWords({ string, take }: { string: number | "all"; take: number }): string | null {
  const words = [string === "all" ? null : stringWords(string), take === 1 ? null : `take ${take}`];
  return words.filter((word) => word !== null).join(", ") || null;
}
