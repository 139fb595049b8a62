import type { Temperament } from "@/lib/acoustics/types";
import type { PlanChoices } from "./keys";
import { analysisQuery, type StyleList } from "./schema";

/** A plan's choices as they stand in the address of its page, so that a view can be sent and gone back to. */

export const LOWEST_HZ = 380;
export const HIGHEST_HZ = 480;

/** A temperament as the address and the analysis take it: its name, or twelve offsets. */
export function temperamentValue(temperament: Temperament): string {
  return typeof temperament === "string" ? temperament : temperament.join(",");
}

type Known = {
  /** Names and ids of the styles there are to choose from. */
  styles: readonly string[];
};

/** What a shop can name: its own styles, the built-in ones and its habit, which may be put away meanwhile. */
export function styleRefs({ house, builtIn, defaultStyle }: StyleList): string[] {
  return [defaultStyle, ...house.map(({ id }) => id), ...builtIn.map(({ name }) => name)];
}

export type AskedPlan = {
  choices: PlanChoices;
  /** What the address asks for and cannot have, in words. */
  faults: string[];
};

export function planInAddress(search: Pick<URLSearchParams, "get">, { styles }: Known): AskedPlan {
  const choices: PlanChoices = {};
  const faults: string[] = [];
  const style = search.get("style");
  if (style) {
    if (styles.includes(style)) choices.style = style;
    else faults.push("The address names a style that this shop does not have.");
  }
  const temperament = search.get("temperament");
  if (temperament) {
    if (analysisQuery.shape.temperament.safeParse(temperament).success) choices.temperament = temperament;
    else faults.push("The address names a temperament that is not known.");
  }
  const pitch = search.get("referenceHz");
  if (pitch) {
    const hz = readPitch(pitch);
    if (hz !== null) choices.referenceHz = hz;
    else
      faults.push(`The address names a pitch of A4 that is not between ${LOWEST_HZ} and ${HIGHEST_HZ} Hz.`);
  }
  return { choices, faults };
}

/** A4 as typed or as it stands in the address; null when it is no plausible pitch. */
export function readPitch(text: string): number | null {
  if (!/^\s*\d{3}(?:[.,]\d*)?\s*$/.test(text)) return null;
  const hz = Number(text.replace(",", "."));
  return hz >= LOWEST_HZ && hz <= HIGHEST_HZ ? hz : null;
}

/** The search part of the address: what is as the instrument and the shop have it is left out. */
export function addressOf(
  search: URLSearchParams | string,
  chosen: Required<PlanChoices>,
  habit: Required<PlanChoices>,
): string {
  const params = new URLSearchParams(search);
  for (const name of ["style", "temperament", "referenceHz"] as const) {
    if (chosen[name] === habit[name]) params.delete(name);
    else params.set(name, String(chosen[name]));
  }
  return params.size === 0 ? "" : `?${params}`;
}
