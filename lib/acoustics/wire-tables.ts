/** Sizes and strength of music wire. A gauge number alone names no wire: store the diameter and the system. */

export const MILLIMETRES_PER_INCH = 25.4;
/** 1000 lbf/in² in MPa. */
export const KSI_IN_MPA = 6.894757293168361;

export type GaugeSystem = "american" | "metric";
export type Gauge = { gauge: number; diameterMm: number };

/** American sizes in inches: an encyclopedia's table. */
const AMERICAN_INCHES: readonly (readonly [number, number])[] = [
  [12, 0.029],
  [12.5, 0.03],
  [13, 0.031],
  [13.5, 0.032],
  [14, 0.033],
  [14.5, 0.034],
  [15, 0.035],
  [15.5, 0.036],
  [16, 0.037],
  [16.5, 0.038],
  [17, 0.039],
  [17.5, 0.04],
  [18, 0.041],
  [18.5, 0.042],
  [19, 0.043],
  [19.5, 0.044],
  [20, 0.045],
  [21, 0.047],
  [22, 0.049],
  [23, 0.051],
];

/** Metric sizes in mm, of Asian and European pianos: a technicians' list table of 2003. */
const METRIC_MILLIMETRES: readonly (readonly [number, number])[] = [
  [12, 0.725],
  [12.5, 0.75],
  [13, 0.775],
  [13.5, 0.8],
  [14, 0.825],
  [14.5, 0.85],
  [15, 0.875],
  [15.5, 0.9],
  [16, 0.925],
  [16.5, 0.95],
  [17, 0.975],
  [17.5, 1],
  [18, 1.025],
  [18.5, 1.05],
  [19, 1.075],
  [19.5, 1.1],
  [20, 1.125],
  [20.5, 1.15],
  [21, 1.175],
  [21.5, 1.2],
  [22, 1.225],
  [23, 1.3],
  [23.5, 1.35],
  [24, 1.4],
  [24.5, 1.45],
  [25, 1.5],
  [26, 1.6],
];

export const WIRE_GAUGES: Record<GaugeSystem, readonly Gauge[]> = {
  american: AMERICAN_INCHES.map(([gauge, inches]) => ({ gauge, diameterMm: inches * MILLIMETRES_PER_INCH })),
  metric: METRIC_MILLIMETRES.map(([gauge, diameterMm]) => ({ gauge, diameterMm })),
};

/**
 * ASTM A228/A228M tensile range by diameter, ksi, from a wire supplier's page. Its 255 for 0.036 in is a misprint
 * for 355: the neighbours are 358 and 352.
 */
export const A228_TENSILE: readonly { inches: number; leastKsi: number; mostKsi: number }[] = [
  { inches: 0.028, leastKsi: 333, mostKsi: 368 },
  { inches: 0.03, leastKsi: 330, mostKsi: 365 },
  { inches: 0.032, leastKsi: 327, mostKsi: 361 },
  { inches: 0.034, leastKsi: 324, mostKsi: 358 },
  { inches: 0.036, leastKsi: 321, mostKsi: 355 },
  { inches: 0.038, leastKsi: 318, mostKsi: 352 },
  { inches: 0.04, leastKsi: 315, mostKsi: 349 },
  { inches: 0.042, leastKsi: 313, mostKsi: 346 },
  { inches: 0.045, leastKsi: 309, mostKsi: 342 },
  { inches: 0.048, leastKsi: 306, mostKsi: 339 },
  { inches: 0.051, leastKsi: 303, mostKsi: 335 },
  { inches: 0.055, leastKsi: 300, mostKsi: 331 },
  { inches: 0.059, leastKsi: 296, mostKsi: 327 },
  { inches: 0.063, leastKsi: 293, mostKsi: 324 },
];
