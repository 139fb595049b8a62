/** Degrees north and east (WGS 84). */
export type Position = { latitude: number; longitude: number };

/** What a shop knows of its roads: how much longer they are than the straight line, and how fast they go. */
export type TravelHabit = { detourFactor: number; kilometresPerHour: number };

/** Minutes on the road between two places. The one seam a real travel-time service plugs into. */
export type TravelTimes = (from: Position, to: Position) => number;

/** Mean radius of the Earth, IUGG 1980, in kilometres. */
const EARTH_RADIUS = 6371.0088;
const radians = (degrees: number) => (degrees * Math.PI) / 180;

/** Great-circle distance in kilometres by the haversine formula: stable for places close together. */
export function greatCircleKilometres(from: Position, to: Position): number {
  const north = Math.sin(radians(to.latitude - from.latitude) / 2) ** 2;
  const east = Math.sin(radians(to.longitude - from.longitude) / 2) ** 2;
  const chord = north + Math.cos(radians(from.latitude)) * Math.cos(radians(to.latitude)) * east;
  return 2 * EARTH_RADIUS * Math.asin(Math.min(1, Math.sqrt(chord)));
}

/** An estimate for want of a road map: whole minutes, rounded up, so that nobody is promised too early. */
export function estimatedTravel({ detourFactor, kilometresPerHour }: TravelHabit): TravelTimes {
  return (from, to) =>
    Math.max(0, Math.ceil((greatCircleKilometres(from, to) * detourFactor * 60) / kilometresPerHour - 1e-9));
}
