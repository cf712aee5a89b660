/**
 * A result as it is stored: rounded to 1e-9 of its unit, halves away from zero, so that recomputing compares equal.
 * NaN and infinities pass; −0 becomes 0. Beyond 4.5e6 a double holds no more digits and the value passes unchanged.
 */
export function roundResult(value: number): number {
  const scaled = Math.abs(value) * 1e9;
  if (!(scaled < 2 ** 52)) return value;
  const rounded = Math.round(scaled) / 1e9;
  return rounded === 0 ? 0 : Math.sign(value) * rounded;
}

/** Degrees of freedom as JSON holds them: null for Infinity, else rounded as a result. */
export function dofOrNull(dof: number): number | null {
  return Number.isFinite(dof) ? roundResult(dof) : null;
}
