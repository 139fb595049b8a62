/** Registers of the compass, by key. The borders are common practice, no source. */
export const REGISTERS = ["bass", "tenor", "middle", "treble", "top"] as const;
export type Register = (typeof REGISTERS)[number];

export function registerOf(midi: number): Register {
  if (midi <= 40) return "bass";
  if (midi <= 52) return "tenor";
  if (midi <= 72) return "middle";
  if (midi <= 92) return "treble";
  return "top";
}
