import type { Chance } from "./random";

/** Invented weather of Port Averil: rooms are driest in February and dampest in August. */
export function roomHumidity(at: Date, chance: Chance): number {
  const day = (at.getTime() / 86_400_000) % 365.25;
  const season = 48 + 12 * Math.sin((2 * Math.PI * (day - 130)) / 365.25);
  return Math.round(Math.min(72, Math.max(28, season + 3 * chance.normal())));
}

export function roomTemperature(at: Date, chance: Chance): number {
  const day = (at.getTime() / 86_400_000) % 365.25;
  const season = 20.5 + 1.8 * Math.sin((2 * Math.PI * (day - 110)) / 365.25);
  return Math.round((season + 0.6 * chance.normal()) * 10) / 10;
}

/**
 * Cents that a room's change of humidity moves a key: most in the low tenor, where the strings are slackest, least at
 * the ends. The size is invented; that the tenor moves most is common practice, no source.
 */
export function humidityDrift(midi: number, changePercent: number): number {
  const share = 0.45 + 0.55 * Math.exp(-(((midi - 50) / 18) ** 2));
  return 0.42 * share * changePercent;
}
