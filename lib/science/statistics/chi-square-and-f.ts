import { incompleteBeta, incompleteGamma } from "./special-functions";

/** Upper tail P(X ≥ x) of the chi-square distribution, dof > 0, x ≥ 0. NaN outside. Abramowitz and Stegun 26.4. */
export function chiSquareUpper(x: number, dof: number): number {
  return !(x >= 0) || !(dof > 0) ? Number.NaN : incompleteGamma(0.5 * dof, 0.5 * x).upper;
}

/** Chi-square distribution function P(X ≤ x). NaN outside dof > 0, x ≥ 0. */
export function chiSquareCdf(x: number, dof: number): number {
  return !(x >= 0) || !(dof > 0) ? Number.NaN : incompleteGamma(0.5 * dof, 0.5 * x).lower;
}

/** Upper tail P(F ≥ f) of the F distribution with `dof1` over `dof2` degrees of freedom; NaN outside. */
export function fUpper(f: number, dof1: number, dof2: number): number {
  if (!(f >= 0) || !(dof1 > 0) || !(dof2 > 0)) return Number.NaN;
  if (f === Infinity) return 0;
  const total = dof2 + dof1 * f;
  return incompleteBeta(dof2 / total, (dof1 * f) / total, 0.5 * dof2, 0.5 * dof1);
}
