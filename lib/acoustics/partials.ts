/**
 * Partials of a stiff string with pinned ends:
 * f_n = n·f0·sqrt(1 + B·n²) = n·f1·sqrt((1 + B·n²)/(1 + B)).
 * f0 is the frequency the string would have without stiffness, and is never heard; f1 is its first partial.
 * Source: H. Fletcher, "Normal vibration frequencies of a stiff piano string", JASA 36 (1964) 203-209;
 * Fletcher & Rossing, The Physics of Musical Instruments.
 */

/** 600/ln 2: cents per unit of the natural logarithm of a squared frequency. */
export const CENTS_PER_LN_SQUARE = 600 / Math.LN2;

/** Frequency of partial `n` in Hz from the first partial `f1Hz` and B. */
export function partialHzFromF1(n: number, f1Hz: number, b: number): number {
  return n * f1Hz * Math.sqrt((1 + b * n * n) / (1 + b));
}

/** Frequency of partial `n` in Hz from the stiffness-free fundamental `f0Hz` and B. */
export function partialHzFromF0(n: number, f0Hz: number, b: number): number {
  return n * f0Hz * Math.sqrt(1 + b * n * n);
}

export function f1FromF0(f0Hz: number, b: number): number {
  return f0Hz * Math.sqrt(1 + b);
}

export function f0FromF1(f1Hz: number, b: number): number {
  return f1Hz / Math.sqrt(1 + b);
}

/** I_n(B): cents of partial `n` above n·f1. */
export function inharmonicCents(n: number, b: number): number {
  return CENTS_PER_LN_SQUARE * Math.log1p((b * (n * n - 1)) / (1 + b));
}

/** dI_n/dB, cents per unit of B. */
export function inharmonicCentsSlope(n: number, b: number): number {
  const square = n * n;
  return (CENTS_PER_LN_SQUARE * (square - 1)) / ((1 + b * square) * (1 + b));
}

/** Cents of partial `n` above n·f0, the reference of Young's tables. */
export function centsAboveIdealString(n: number, b: number): number {
  return CENTS_PER_LN_SQUARE * Math.log1p(b * n * n);
}

/** B from the cents of partial `n` above n·f0. */
export function bFromCentsAboveIdealString(n: number, cents: number): number {
  return Math.expm1(cents / CENTS_PER_LN_SQUARE) / (n * n);
}

/**
 * B from two partials of one string: with r = ((f_n/n)/(f_m/m))², B = (r − 1)/(n² − r·m²).
 * Null when no stiff string has these two partials (r ≥ n²/m² for n > m, or equal partial numbers).
 * The result may be negative when reading errors outweigh a small stiffness.
 */
export function bFromTwoPartials(m: number, hzM: number, n: number, hzN: number): number | null {
  if (m > n) return bFromTwoPartials(n, hzN, m, hzM);
  const quotient = hzN / n / (hzM / m);
  const r = quotient * quotient;
  const denominator = n * n - r * m * m;
  if (m === n || !(denominator > 0)) return null;
  const b = (r - 1) / denominator;
  return 1 + b * n * n > 0 && 1 + b > 0 ? b : null;
}

/**
 * Bring B of a string to another pitch: stiffness stays and tension goes with f1², so B·f1² is constant
 * (to first order in B). `fromHz` and `toHz` are first partials.
 */
export function bAtPitch(b: number, fromHz: number, toHz: number): number {
  const ratio = fromHz / toHz;
  return b * ratio * ratio;
}
