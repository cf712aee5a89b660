/** Checks that each is a probability. @throws RangeError otherwise: an adjusted p of a wrong one would look like a result. */
function ordered(p: readonly number[]): { value: number; index: number }[] {
  for (const value of p) if (!(value >= 0 && value <= 1)) throw new RangeError("a p-value lies between 0 and 1");
  return p.map((value, index) => ({ value, index })).sort((a, b) => a.value - b.value);
}

/**
 * Holm's step-down adjusted p-values, in the order given (S. Holm, Scand. J. Stat. 6 (1979) 65): compared with α they
 * hold the chance of even one false difference. Empty gives empty.
 */
export function holm(p: readonly number[]): number[] {
  const adjusted = p.map(() => 0);
  let largest = 0;
  ordered(p).forEach(({ value, index }, rank) => {
    largest = Math.max(largest, Math.min(1, (p.length - rank) * value));
    adjusted[index] = largest;
  });
  return adjusted;
}

/**
 * Benjamini and Hochberg's adjusted p-values, in the order given (J. R. Stat. Soc. B 57 (1995) 289): compared with q
 * they hold the expected share of false differences among those named. Empty gives empty.
 */
export function benjaminiHochberg(p: readonly number[]): number[] {
  const adjusted = p.map(() => 1);
  let smallest = 1;
  const rising = ordered(p);
  for (let rank = rising.length; rank >= 1; rank--) {
    const entry = rising[rank - 1];
    if (!entry) continue;
    smallest = Math.min(smallest, entry.value * (p.length / rank));
    adjusted[entry.index] = smallest;
  }
  return adjusted;
}
