/**
 * Tail probabilities and quantiles of the normal, Student and chi-square distributions, through the incomplete
 * gamma and beta functions (series and continued fractions: Abramowitz & Stegun, Handbook of Mathematical
 * Functions, 6.5 and 26.5).
 */

const EPSILON = 1e-15;
const TINY = 1e-300;

/** ln Γ(x) for x > 0: Stirling's series after shifting the argument above 10. */
export function lnGamma(x: number): number {
  let shift = 0;
  let z = x;
  while (z < 10) {
    shift -= Math.log(z);
    z += 1;
  }
  const inverse = 1 / z;
  const square = inverse * inverse;
  const series =
    inverse * (1 / 12 - square * (1 / 360 - square * (1 / 1260 - square * (1 / 1680 - square / 1188))));
  return shift + (z - 0.5) * Math.log(z) - z + 0.5 * Math.log(2 * Math.PI) + series;
}

/** Upper tail Q(a, x) of the gamma distribution. */
function gammaUpper(a: number, x: number): number {
  if (!(x > 0)) return 1;
  if (x === Number.POSITIVE_INFINITY) return 0;
  const front = Math.exp(a * Math.log(x) - x - lnGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let k = 1; k < 1000 && term > sum * EPSILON; k += 1) {
      term *= x / (a + k);
      sum += term;
    }
    return 1 - front * sum;
  }
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let fraction = d;
  for (let k = 1; k < 1000; k += 1) {
    const an = -k * (k - a);
    b += 2;
    d = 1 / nonZero(an * d + b);
    c = nonZero(b + an / c);
    fraction *= d * c;
    if (Math.abs(d * c - 1) < EPSILON) break;
  }
  return front * fraction;
}

function nonZero(value: number): number {
  return Math.abs(value) < TINY ? TINY : value;
}

/** Regularised incomplete beta function I_x(a, b). */
function betaRegularised(x: number, a: number, b: number): number {
  if (!(x > 0)) return 0;
  if (x >= 1) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - betaRegularised(1 - x, b, a);
  const front = Math.exp(lnGamma(a + b) - lnGamma(a) - lnGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  let c = 1;
  let d = 1 / nonZero(1 - ((a + b) * x) / (a + 1));
  let fraction = d;
  for (let k = 1; k < 1000; k += 1) {
    const even = (k * (b - k) * x) / ((a + 2 * k - 1) * (a + 2 * k));
    d = 1 / nonZero(1 + even * d);
    c = nonZero(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + k) * (a + b + k) * x) / ((a + 2 * k) * (a + 2 * k + 1));
    d = 1 / nonZero(1 + odd * d);
    c = nonZero(1 + odd / c);
    fraction *= d * c;
    if (Math.abs(d * c - 1) < EPSILON) break;
  }
  return (front * fraction) / a;
}

/** Probability that chi-square with `dof` degrees of freedom exceeds `value`; 1 when dof is 0. */
export function chiSquareUpperTail(value: number, dof: number): number {
  return dof > 0 ? gammaUpper(dof / 2, value / 2) : 1;
}

/** Probability that |t| exceeds `t` for Student's t; `dof` may be fractional, or Infinity for the normal. */
export function studentTwoSided(t: number, dof: number): number {
  const square = t * t;
  return dof === Number.POSITIVE_INFINITY
    ? gammaUpper(0.5, square / 2)
    : betaRegularised(dof / (dof + square), dof / 2, 0.5);
}

function studentDensity(t: number, dof: number): number {
  if (dof === Number.POSITIVE_INFINITY) return Math.exp(-0.5 * t * t) / Math.sqrt(2 * Math.PI);
  const front = lnGamma((dof + 1) / 2) - lnGamma(dof / 2) - 0.5 * Math.log(dof * Math.PI);
  return Math.exp(front - ((dof + 1) / 2) * Math.log1p((t * t) / dof));
}

/** Quantiles already found, by tail and degrees of freedom: a sheet asks for few, again and again. */
const quantiles = new Map<number, Map<number, number>>();
const MOST_REMEMBERED = 1000;

function remembered(twoSided: number): Map<number, number> {
  const known = quantiles.get(twoSided);
  if (known && known.size <= MOST_REMEMBERED) return known;
  if (quantiles.size > MOST_REMEMBERED) quantiles.clear();
  const fresh = new Map<number, number>();
  quantiles.set(twoSided, fresh);
  return fresh;
}

/**
 * The t with P(|t| > t) = `twoSided`. Newton's method from below: the tail is convex and falling, so the steps approach the
 * root from that side. The normal quantile is a start below every Student quantile.
 */
export function studentQuantile(twoSided: number, dof: number): number {
  const byDof = remembered(twoSided);
  const known = byDof.get(dof);
  if (known !== undefined) return known;
  let t = dof === Number.POSITIVE_INFINITY ? 0 : studentQuantile(twoSided, Number.POSITIVE_INFINITY);
  for (let k = 0; k < 200; k += 1) {
    const step = (studentTwoSided(t, dof) - twoSided) / (2 * studentDensity(t, dof));
    t += step;
    if (Math.abs(step) <= 1e-13 * t) break;
  }
  byDof.set(dof, t);
  return t;
}

/** Quantile of the normal distribution for a two-sided tail probability: 1.96 for 0.05. */
export function normalQuantile(twoSided: number): number {
  return studentQuantile(twoSided, Number.POSITIVE_INFINITY);
}
