import { studentTQuantile } from "./distributions";
import { at, mean, sampleSd } from "./descriptive";

/** One part of an uncertainty budget: standard uncertainty in the unit of the result, and its degrees of freedom. */
export interface UncertaintyPart {
  /** Standard uncertainty, already times its sensitivity, ≥ 0. */
  readonly u: number;
  /** Degrees of freedom, > 0; Infinity where the size is taken as exactly known. */
  readonly dof: number;
}

/**
 * Type A evaluation (JCGM 100:2008, 4.2): mean, s and u = s/√n in the unit of the readings, dof = n − 1.
 * Undefined for fewer than two readings: one reading says nothing of its own spread.
 */
export function typeA(readings: ArrayLike<number>): { mean: number; s: number; u: number; dof: number } | undefined {
  const centre = mean(readings);
  const s = sampleSd(readings);
  if (centre === undefined || s === undefined) return undefined;
  return { mean: centre, s, u: s / Math.sqrt(readings.length), dof: readings.length - 1 };
}

const DIVISORS = { rectangular: Math.sqrt(3), triangular: Math.sqrt(6), arcsine: Math.SQRT2 } as const;

/** Type B from a half-width a (JCGM 100:2008, 4.3.7, 4.3.9; arcsine: GUM supplement 1, 6.4.6): a/√3, a/√6, a/√2. */
export function typeBHalfWidth(halfWidth: number, shape: keyof typeof DIVISORS): number {
  return halfWidth / DIVISORS[shape];
}

/** Type B of a display's step δ (JCGM 100:2008, F.2.2.1): δ/√12, unit of the step. */
export function typeBResolution(step: number): number {
  return step / Math.sqrt(12);
}

/** Type B from a certificate's expanded uncertainty U and its k (JCGM 100:2008, 4.3.3). */
export function typeBCertificate(expanded: number, k: number): number {
  return expanded / k;
}

/** Degrees of freedom of a judged u whose own relative uncertainty is given (JCGM 100:2008, G.4.2, eq. G.3). */
export function dofOfJudgement(relativeUncertaintyOfU: number): number {
  return 0.5 / (relativeUncertaintyOfU * relativeUncertaintyOfU);
}

/** Root of the sum of squares of independent parts (JCGM 100:2008, 5.1.2, eq. 10), unit of the parts; none gives 0. */
export function combineIndependent(parts: readonly number[]): number {
  return Math.hypot(...parts);
}

/**
 * Combined standard uncertainty with correlations (JCGM 100:2008, 5.2.2, eq. 13 and 16).
 * @param sensitivities c_i, one an input @param uncertainties u_i @param correlation r_ij, row by row; left out: none.
 */
export function combineCorrelated(
  sensitivities: readonly number[],
  uncertainties: readonly number[],
  correlation?: readonly (readonly number[])[],
): number {
  if (sensitivities.length !== uncertainties.length) throw new RangeError("one sensitivity an input is needed");
  const parts = sensitivities.map((c, i) => c * at(uncertainties, i));
  let variance = 0;
  for (let i = 0; i < parts.length; i++) {
    variance += at(parts, i) ** 2;
    for (let j = 0; j < i; j++) variance += 2 * at(parts, i) * at(parts, j) * (correlation?.[i]?.[j] ?? 0);
  }
  // A correlation matrix rounded in print may leave a hair below nothing.
  return Math.sqrt(Math.max(0, variance));
}

/**
 * Effective degrees of freedom ν = u⁴/Σ(u_i⁴/ν_i) (JCGM 100:2008, G.4.1, eq. G.2b), for independent parts only.
 * Parts with Infinity drop out; Infinity when nothing finite is left. Not truncated.
 */
export function welchSatterthwaite(parts: readonly UncertaintyPart[]): number {
  const largest = Math.max(0, ...parts.map((part) => part.u));
  if (largest === 0) return Infinity;
  let variance = 0;
  let weight = 0;
  for (const { u, dof } of parts) {
    const share = (u / largest) ** 2;
    variance += share;
    weight += (share * share) / dof;
  }
  return weight === 0 ? Infinity : (variance * variance) / weight;
}

/** Next lower integer (JCGM 100:2008, G.4.1); a whole number that arithmetic left a hair low stays itself. */
export function truncateDof(dof: number): number {
  return dof === Infinity ? Infinity : Math.floor(dof * (1 + 1e-12));
}

/** Degrees of freedom that an interval is formed with: truncated, a fraction below one as it is. */
export function coverageDof(dof: number): number {
  return dof < 1 ? dof : truncateDof(dof);
}

/**
 * Coverage factor k for 95 % from the effective degrees of freedom, truncated first (JCGM 100:2008, G.4.1 and G.6.4).
 * Below one degree of freedom truncation would give none, so the fraction itself is used. NaN for dof ≤ 0.
 */
export function coverageFactor95(dof: number): number {
  const whole = coverageDof(dof);
  const known = factors[whole];
  if (known !== undefined) return known;
  const factor = studentTQuantile(0.975, whole);
  if (Number.isInteger(whole) && whole > 0 && whole <= factorsKept) factors[whole] = factor;
  return factor;
}

/** Factors once found, by their whole degrees of freedom: a study asks for the same few tens of thousands of times. */
const factors: number[] = [];
const factorsKept = 4096;

/** Expanded uncertainty U = k·u at 95 % (JCGM 100:2008, 6.2 and G.6.4), unit of u. */
export function expand95(u: number, dof: number): { k: number; expanded: number } {
  const k = coverageFactor95(dof);
  return { k, expanded: k * u };
}

/** Combined u, effective degrees of freedom, k and U at 95 % of a budget of independent parts. */
export function budget95(parts: readonly UncertaintyPart[]): { u: number; dof: number; k: number; expanded: number } {
  const u = combineIndependent(parts.map((part) => part.u));
  const dof = welchSatterthwaite(parts);
  return { u, dof, ...expand95(u, dof) };
}
