import { AcousticsError } from "./types";
import { A228_TENSILE, type GaugeSystem, KSI_IN_MPA, MILLIMETRES_PER_INCH, WIRE_GAUGES } from "./wire-tables";

/**
 * Physics of one speaking length. Lengths and diameters in millimetres where the name says so, otherwise SI units.
 * Sources: H. Fletcher 1964 (JASA 36:203-209) for B; R. W. Young 1952 (JASA 24:267-273) for E/ρ of music wire.
 */

/** Density of music wire, kg/m³ (EN 10270-1). */
export const STEEL_DENSITY = 7850;
/** Young's modulus of music wire, Pa, from Young's measured E/ρ = 25.5·10⁶ m²/s². Print gives 24.4 to 26.8: ±5 % in B. */
export const STEEL_MODULUS = 25.5e6 * STEEL_DENSITY;
/** Density of copper, kg/m³: from memory. */
export const COPPER_DENSITY = 8940;
/** Share of its annulus that one close layer of round wire fills: π/4 (Pappus's theorem). */
export const ROUND_WRAP_FILL = Math.PI / 4;

export type Material = { modulusPa?: number; density?: number };

export type PlainString = Material & { diameterMm: number; lengthMm: number };

export type WoundString = PlainString & {
  /** Outer diameter over the wrap. */
  outerMm: number;
  wrapDensity?: number;
  /** Lengths at the two ends without wrap, together. */
  bareMm?: number;
};

export type StringState = {
  /** Mass per length, kg/m; the mean over the speaking length when the ends are bare. */
  massPerMetre: number;
  tensionN: number;
  /** Speed of transverse waves, m/s. */
  waveSpeed: number;
  /** Stress in the steel (the core of a wound string), MPa. */
  stressMpa: number;
  b: number;
};

/** Speed of transverse waves on a string: twice its speaking length passes in one period. v = 2·L·f0, m/s. */
export function waveSpeed(lengthMetres: number, f0Hz: number): number {
  return 2 * lengthMetres * f0Hz;
}

/** Tension in N for mass per length in kg/m, length in m: T = 4·μ·L²·f0². */
export function tension(massPerMetre: number, lengthMetres: number, f0Hz: number): number {
  return massPerMetre * waveSpeed(lengthMetres, f0Hz) ** 2;
}

/** B = π³·E·d⁴/(64·T·L²), SI units; d is the diameter that bends (the core of a wound string). */
export function inharmonicityOf(
  modulusPa: number,
  diameterMetres: number,
  tensionN: number,
  lengthMetres: number,
): number {
  return (Math.PI ** 3 * modulusPa * diameterMetres ** 4) / (64 * tensionN * lengthMetres ** 2);
}

/** Plain steel string sounding the stiffness-free fundamental `f0Hz`. */
export function plainString(string: PlainString, f0Hz: number): StringState {
  checkString(string, f0Hz);
  const density = string.density ?? STEEL_DENSITY;
  return stateOf(string, (density * Math.PI * (string.diameterMm / 1000) ** 2) / 4, f0Hz);
}

/**
 * Wound string: the core alone is stiff, the wrap adds mass as a close layer of round wire. Bare ends lower the mean
 * mass; real wound strings then stray from a single B (stepped mass: Chumnantas 1995), which this does not describe.
 */
export function woundString(string: WoundString, f0Hz: number): StringState {
  checkString(string, f0Hz);
  const { diameterMm, lengthMm, outerMm, bareMm = 0 } = string;
  if (!(outerMm >= diameterMm)) {
    throw new AcousticsError("bad-outer", "The wrap cannot be thinner than the core.", "outerMm");
  }
  if (!(bareMm >= 0 && bareMm < lengthMm)) {
    throw new AcousticsError("bad-bare", "The bare ends must be shorter than the string.", "bareMm");
  }
  const core = (diameterMm / 1000) ** 2;
  const wrap = ((outerMm / 1000) ** 2 - core) * ROUND_WRAP_FILL * (1 - bareMm / lengthMm);
  const mass =
    (Math.PI / 4) *
    ((string.density ?? STEEL_DENSITY) * core + (string.wrapDensity ?? COPPER_DENSITY) * wrap);
  return stateOf(string, mass, f0Hz);
}

function stateOf(string: PlainString, massPerMetre: number, f0Hz: number): StringState {
  const length = string.lengthMm / 1000;
  const diameter = string.diameterMm / 1000;
  const tensionN = tension(massPerMetre, length, f0Hz);
  return {
    massPerMetre,
    tensionN,
    waveSpeed: waveSpeed(length, f0Hz),
    stressMpa: tensionN / ((Math.PI * diameter ** 2) / 4) / 1e6,
    b: inharmonicityOf(string.modulusPa ?? STEEL_MODULUS, diameter, tensionN, length),
  };
}

function checkString({ diameterMm, lengthMm }: PlainString, f0Hz: number): void {
  for (const [path, value] of Object.entries({ diameterMm, lengthMm, f0Hz })) {
    if (!(Number.isFinite(value) && value > 0)) {
      throw new AcousticsError("bad-string", "Diameter, length and frequency must be above 0.", path);
    }
  }
}

/**
 * Cents of partial n above n·f0 by the approximation δ = K·n²·d²/(f0²·L⁴), d and L in cm (Young 1952).
 * K = (600/ln 2)·π²·(E/ρ)/64 with E/ρ in cm²/s²; Young prints 3.4·10¹³.
 */
export function youngCents(
  n: number,
  diameterCm: number,
  lengthCm: number,
  f0Hz: number,
  constant = 3.4e13,
): number {
  return (constant * n * n * diameterCm ** 2) / (f0Hz ** 2 * lengthCm ** 4);
}

/** Young's constant K in cgs units for a modulus in Pa and a density in kg/m³. */
export function youngConstant(modulusPa: number = STEEL_MODULUS, density: number = STEEL_DENSITY): number {
  return ((600 / Math.LN2) * Math.PI ** 2 * (modulusPa / density) * 1e4) / 64;
}

/**
 * Least tensile strength of music wire of a diameter, MPa, between the rows of the ASTM A228 table.
 * Null outside the table (0.711 to 1.600 mm): no figure is better than a guessed one.
 */
export function leastTensileMpa(diameterMm: number): number | null {
  const inches = diameterMm / MILLIMETRES_PER_INCH;
  let below: (typeof A228_TENSILE)[number] | undefined;
  for (const row of A228_TENSILE) {
    if (Math.abs(row.inches - inches) < 1e-6) return row.leastKsi * KSI_IN_MPA;
    if (row.inches > inches) {
      if (!below) return null;
      const share = (inches - below.inches) / (row.inches - below.inches);
      return (below.leastKsi + share * (row.leastKsi - below.leastKsi)) * KSI_IN_MPA;
    }
    below = row;
  }
  return null;
}

/** Share of the least breaking strength that a stress takes, 0.42 for 42 %; null where the table has no wire. */
export function breakingShare(stressMpa: number, diameterMm: number): number | null {
  const strength = leastTensileMpa(diameterMm);
  return strength === null ? null : stressMpa / strength;
}

/** Diameter in mm of a gauge number; the same number means different wire in the two systems. Null when not listed. */
export function gaugeDiameterMm(gauge: number, system: GaugeSystem): number | null {
  return WIRE_GAUGES[system].find((wire) => wire.gauge === gauge)?.diameterMm ?? null;
}
