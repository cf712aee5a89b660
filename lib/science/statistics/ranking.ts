import { ascending, at } from "./descriptive";
import { normalCdf, normalDensity, studentTTwoSided } from "./distributions";

/** A figure and its standard uncertainty, one unit for both. */
export interface Uncertain {
  readonly value: number;
  readonly u: number;
}

/** Standard uncertainty of a difference of two figures with correlation r (JCGM 100:2008, 5.2.2), unit of the figures. */
export function uOfDifference(uA: number, uB: number, r = 0): number {
  return Math.sqrt(Math.max(0, uA * uA + uB * uB - 2 * r * uA * uB));
}

/**
 * P(A < B) of two normal figures with correlation r, 0..1; equal figures without any uncertainty give one half.
 * Derived: Φ((b − a)/√(u_a² + u_b² − 2r·u_a·u_b)).
 */
export function probabilityLess(a: Uncertain, b: Uncertain, r = 0): number {
  const u = uOfDifference(a.u, b.u, r);
  const difference = b.value - a.value;
  if (u === 0) return difference === 0 ? 0.5 : difference > 0 ? 1 : 0;
  return normalCdf(difference / u);
}

/** Two-sided p for a difference with standard uncertainty u against t with `dof` (Infinity: normal). u = 0 gives 0 or 1. */
export function pOfDifference(difference: number, u: number, dof = Infinity): number {
  if (u === 0) return difference === 0 ? 1 : 0;
  return studentTTwoSided(difference / u, dof);
}

/** Expected rank (1 is lowest) of independent normal figures: 1 + Σ P(other < this). */
export function expectedRanks(figures: readonly Uncertain[]): number[] {
  return figures.map((figure, i) =>
    figures.reduce((rank, other, j) => (i === j ? rank : rank + probabilityLess(other, figure)), 1),
  );
}

/** Gauss–Legendre, eight nodes on −1..1 (Abramowitz and Stegun, table 25.4). */
const NODES = [
  [0.1834346424956498, 0.362683783378362],
  [0.525532409916329, 0.3137066458778873],
  [0.7966664774136267, 0.2223810344533745],
  [0.9602898564975363, 0.1012285362903763],
] as const;
const PANELS_MAX = 20_000;

/**
 * P(lowest) of each of several independent normal figures: ∫ φ_i Π_{j≠i} (1 − Φ_j), by Gauss–Legendre panels half the
 * smallest u wide. All u > 0. Absolute error below 1e-9 while no u is 2,000 times smaller than the range.
 * @throws RangeError for a u that isn't above 0. Empty gives empty.
 */
export function probabilityFirst(figures: readonly Uncertain[]): number[] {
  const shares = new Float64Array(figures.length);
  if (figures.length === 0) return [];
  for (const { u } of figures) if (!(u > 0)) throw new RangeError("a figure's u must be above 0");
  const low = Math.min(...figures.map(({ value, u }) => value - 9 * u));
  const high = Math.min(...figures.map(({ value, u }) => value + 9 * u));
  const finest = Math.min(...figures.map(({ u }) => u)) / 2;
  const panels = Math.min(PANELS_MAX, Math.ceil((high - low) / finest));
  const half = (high - low) / panels / 2;
  for (let panel = 0; panel < panels; panel++) {
    const middle = low + (2 * panel + 1) * half;
    for (const [node, weight] of NODES) {
      addNode(figures, middle - half * node, half * weight, shares);
      addNode(figures, middle + half * node, half * weight, shares);
    }
  }
  return [...shares];
}

function addNode(figures: readonly Uncertain[], x: number, weight: number, shares: Float64Array): void {
  const above = figures.map(({ value, u }) => normalCdf((value - x) / u));
  const before = new Float64Array(figures.length);
  let product = 1;
  above.forEach((share, i) => {
    before[i] = product;
    product *= share;
  });
  let after = 1;
  for (let i = figures.length - 1; i >= 0; i--) {
    const figure = figures[i];
    if (!figure) continue;
    const density = normalDensity((x - figure.value) / figure.u) / figure.u;
    shares[i] = at(shares, i) + weight * density * at(before, i) * after;
    after *= at(above, i);
  }
}

/** What simulated draws say of one entry's rank; rank 1 is the lowest value. */
export interface SimulatedRank {
  /** counts[r − 1]: draws in which the entry had rank r. */
  readonly counts: Uint32Array;
  readonly low: number;
  readonly high: number;
  readonly pFirst: number;
}

/**
 * Ranks over `draws` simulated rounds. `draw(values)` fills one value an entry, shared parts drawn once for all that
 * share them. Equal values share the better rank. low and high are the 2.5 and 97.5 % points of the simulated rank
 * (smallest rank whose cumulated share reaches them).
 */
export function simulateRanks(entries: number, draws: number, draw: (values: Float64Array) => void): SimulatedRank[] {
  const values = new Float64Array(entries);
  const counts = Array.from({ length: entries }, () => new Uint32Array(entries));
  for (let n = 0; n < draws; n++) {
    draw(values);
    const sorted = ascending(values);
    counts.forEach((own, i) => {
      const rank = firstIndex(sorted, at(values, i));
      own[rank] = at(own, rank) + 1;
    });
  }
  return counts.map((own) => ({
    counts: own,
    low: rankAt(own, 0.025 * draws),
    high: rankAt(own, 0.975 * draws),
    pFirst: draws === 0 || entries === 0 ? Number.NaN : at(own, 0) / draws,
  }));
}

function firstIndex(sorted: Float64Array, value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (at(sorted, middle) < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

function rankAt(counts: Uint32Array, needed: number): number {
  let seen = 0;
  for (let rank = 0; rank < counts.length; rank++) {
    seen += at(counts, rank);
    if (seen >= needed && seen > 0) return rank + 1;
  }
  return Number.NaN;
}
