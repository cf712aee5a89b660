/**
 * Harmonic of a circle's occupancy: |F_m| / N for N equal steps of which some are solid. B equal blades have lines at
 * multiples of B only; a check beside counting, as grouped spacing has its peak elsewhere. Order 0 is the solid share.
 * NaN for an empty circle.
 */
export function occupancyHarmonic(solid: readonly boolean[], order: number): number {
  let [re, im] = [0, 0];
  solid.forEach((occupied, k) => {
    if (!occupied) return;
    const angle = (2 * Math.PI * order * k) / solid.length;
    re += Math.cos(angle);
    im += Math.sin(angle);
  });
  return Math.hypot(re, im) / solid.length;
}

/** Order from 1 to `most` with the strongest harmonic; undefined where nothing repeats. Ties go to the lowest. */
export function strongestOrder(solid: readonly boolean[], most: number): number | undefined {
  let best: { order: number; size: number } | undefined;
  for (let order = 1; order <= most; order++) {
    const size = occupancyHarmonic(solid, order);
    if (size > 1e-9 && (!best || size > best.size + 1e-12)) best = { order, size };
  }
  return best?.order;
}
