/**
 * Variances of many small groups, each drawn towards what they have in common: s² becomes
 * (d0·s0² + d·s²)/(d0 + d) with d0 + d degrees of freedom, s0² and d0 estimated from all groups together.
 * G. K. Smyth, "Linear models and empirical Bayes methods for assessing differential expression in microarray
 * experiments", Stat. Appl. Genet. Mol. Biol. 3 (2004) article 3, section 6.2.
 */
export type GroupVariance = { variance: number; dof: number };
export type CommonVariance = { variance: number; dof: number };

const LARGEST_PRIOR_DOF = 200;

/** Null with fewer than three groups of at least one degree of freedom. */
export function commonVariance(groups: readonly GroupVariance[], floor: number): CommonVariance | null {
  const usable = groups.filter(({ dof }) => dof >= 1);
  const count = usable.length;
  if (count < 3) return null;
  const levels = usable.map(
    ({ variance, dof }) => Math.log(Math.max(variance, floor)) - digamma(dof / 2) + Math.log(dof / 2),
  );
  const mean = levels.reduce((sum, level) => sum + level, 0) / count;
  const spread = levels.reduce((sum, level) => sum + (level - mean) ** 2, 0) / (count - 1);
  const sampling = usable.reduce((sum, { dof }) => sum + trigamma(dof / 2), 0) / count;
  const dof = spread > sampling ? 2 * inverseTrigamma(spread - sampling) : LARGEST_PRIOR_DOF;
  const bounded = Math.min(dof, LARGEST_PRIOR_DOF);
  return { dof: bounded, variance: Math.exp(mean + digamma(bounded / 2) - Math.log(bounded / 2)) };
}

/** ψ(x), x > 0: asymptotic series after shifting the argument above 10 (Abramowitz & Stegun 6.3.18). */
export function digamma(x: number): number {
  let shift = 0;
  let z = x;
  while (z < 10) {
    shift -= 1 / z;
    z += 1;
  }
  const square = 1 / (z * z);
  return (
    shift + Math.log(z) - 0.5 / z - square * (1 / 12 - square * (1 / 120 - square * (1 / 252 - square / 240)))
  );
}

/** ψ′(x), x > 0 (Abramowitz & Stegun 6.4.12). */
export function trigamma(x: number): number {
  let shift = 0;
  let z = x;
  while (z < 10) {
    shift += 1 / (z * z);
    z += 1;
  }
  const inverse = 1 / z;
  const square = inverse * inverse;
  return (
    shift +
    inverse +
    square / 2 +
    inverse * square * (1 / 6 - square * (1 / 30 - square * (1 / 42 - square / 30)))
  );
}

/** x with ψ′(x) = y, by bisection on ln x: ψ′ falls from ∞ to 0. */
function inverseTrigamma(y: number): number {
  let low = Math.log(1e-3);
  let high = Math.log(1e6);
  for (let k = 0; k < 60; k += 1) {
    const middle = 0.5 * (low + high);
    if (trigamma(Math.exp(middle)) > y) low = middle;
    else high = middle;
  }
  return Math.exp(0.5 * (low + high));
}
