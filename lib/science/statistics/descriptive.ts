/**
 * Element of an array of numbers, for loops whose bounds are right by construction.
 * @throws RangeError when there is no such element (a fault of the caller, never a missing reading).
 */
export function at(values: ArrayLike<number>, index: number): number {
  const value = values[index];
  if (value === undefined) throw new RangeError(`no element ${index} in an array of ${values.length}`);
  return value;
}

/** Sum with Neumaier's compensation (Z. angew. Math. Mech. 54 (1974) 39). Any unit; empty gives 0. */
export function sum(values: ArrayLike<number>): number {
  let total = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const value = at(values, i);
    const next = total + value;
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total;
    total = next;
  }
  return total + lost;
}

/** Arithmetic mean in the unit of the values; undefined for none. */
export function mean(values: ArrayLike<number>): number | undefined {
  return values.length === 0 ? undefined : sum(values) / values.length;
}

/** Sum of squared deviations from the mean, two passes; undefined for none. */
export function squaredDeviations(values: ArrayLike<number>): number | undefined {
  const centre = mean(values);
  if (centre === undefined) return undefined;
  let squares = 0;
  for (let i = 0; i < values.length; i++) squares += (at(values, i) - centre) ** 2;
  return squares;
}

/** Experimental standard deviation with n − 1 (JCGM 100:2008, 4.2.2), unit of the values; undefined for fewer than two. */
export function sampleSd(values: ArrayLike<number>): number | undefined {
  const squares = squaredDeviations(values);
  return squares === undefined || values.length < 2 ? undefined : Math.sqrt(squares / (values.length - 1));
}

/** Sorted copy, ascending by value (not by spelling). */
export function ascending(values: ArrayLike<number>): Float64Array {
  return Float64Array.from(values).sort();
}

/** The elements at some places, in their order. */
export function gather(values: ArrayLike<number>, places: readonly number[]): Float64Array {
  const picked = new Float64Array(places.length);
  for (let i = 0; i < places.length; i++) picked[i] = at(values, at(places, i));
  return picked;
}

/** Median (mean of the middle two for an even count), unit of the values; undefined for none. */
export function median(values: ArrayLike<number>): number | undefined {
  return quantile(values, 0.5);
}

/**
 * Sample quantile, definition 7 of Hyndman and Fan (Am. Stat. 50 (1996) 361): linear between order statistics
 * at (n − 1)p. `p` in 0..1; undefined for no values.
 */
export function quantile(values: ArrayLike<number>, p: number): number | undefined {
  if (values.length === 0 || !(p >= 0 && p <= 1)) return undefined;
  return sortedQuantile(ascending(values), p);
}

/** The same of values that are in ascending order already. */
export function sortedQuantile(sorted: Float64Array, p: number): number | undefined {
  if (sorted.length === 0 || !(p >= 0 && p <= 1)) return undefined;
  const position = (sorted.length - 1) * p;
  const below = Math.floor(position);
  const low = at(sorted, below);
  const high = at(sorted, Math.min(below + 1, sorted.length - 1));
  const share = position - below;
  return share === 0.5 ? (low + high) / 2 : low + (high - low) * share;
}
