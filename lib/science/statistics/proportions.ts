import { normalQuantile } from "./distributions";

/**
 * Wilson's interval for a share (E. B. Wilson, J. Am. Stat. Assoc. 22 (1927) 209), held to 0..1. Undefined for no trials
 * or counts that can't be.
 */
export function wilsonInterval(successes: number, trials: number, confidence = 0.95) {
  if (!(trials > 0 && successes >= 0 && successes <= trials)) return undefined;
  const z = normalQuantile((1 + confidence) / 2);
  const p = successes / trials;
  const scale = 1 + (z * z) / trials;
  const centre = (p + (z * z) / (2 * trials)) / scale;
  const half = (z / scale) * Math.sqrt((p * (1 - p)) / trials + (z * z) / (4 * trials * trials));
  const low = successes === 0 ? 0 : Math.max(0, centre - half);
  return { low, high: successes === trials ? 1 : Math.min(1, centre + half) };
}

/** Whether two shares stand the other way round in every stratum than in the total (E. H. Simpson, J. R. Stat. Soc. B 13 (1951) 238). */
export function reverses(strata: readonly { a: readonly [number, number]; b: readonly [number, number] }[]): boolean {
  const signs = strata.map(({ a, b }) => Math.sign(a[0] / a[1] - b[0] / b[1]));
  const sum = (side: "a" | "b", at: 0 | 1) => strata.reduce((total, stratum) => total + stratum[side][at], 0);
  const pooled = Math.sign(sum("a", 0) / sum("a", 1) - sum("b", 0) / sum("b", 1));
  return signs.length > 0 && signs[0] !== 0 && signs.every((sign) => sign === signs[0]) && pooled === -(signs[0] ?? 0);
}
