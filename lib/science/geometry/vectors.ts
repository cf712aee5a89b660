import type { Vec3 } from "./mesh";

/** Scalar product. */
export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** Vector product. */
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** a − b. */
export const minus = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

/** a + factor · b. */
export const plus = (a: Vec3, b: Vec3, factor = 1): Vec3 => [
  a[0] + factor * b[0],
  a[1] + factor * b[1],
  a[2] + factor * b[2],
];

/** The vector at length 1; undefined for the zero vector. */
export function unit(a: Vec3): Vec3 | undefined {
  const length = Math.hypot(...a);
  return length > 0 && Number.isFinite(length) ? [a[0] / length, a[1] / length, a[2] / length] : undefined;
}

/** A symmetric 3 × 3 matrix: xx, yy, zz, xy, yz, zx. */
export type Sym3 = readonly [number, number, number, number, number, number];

/** An eigenvalue with its direction of length 1. */
export interface EigenPair {
  readonly value: number;
  readonly vector: Vec3;
}

/**
 * Eigenvalues of a symmetric matrix, smallest first, by cyclic Jacobi rotations (Golub & Van Loan, Matrix
 * Computations, §8.5). Not-a-number in gives not-a-number out.
 */
export function eigenSym3(s: Sym3): [EigenPair, EigenPair, EigenPair] {
  const a = [
    [s[0], s[3], s[5]],
    [s[3], s[1], s[4]],
    [s[5], s[4], s[2]],
  ];
  const v = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const get = (m: number[][], i: number, j: number): number => m[i]?.[j] ?? 0;
  const set = (m: number[][], i: number, j: number, value: number) => {
    const row = m[i];
    if (row) row[j] = value;
  };
  for (let sweep = 0; sweep < 32; sweep++) {
    if (Math.abs(get(a, 0, 1)) + Math.abs(get(a, 1, 2)) + Math.abs(get(a, 0, 2)) === 0) break;
    for (const [p, q] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      const apq = get(a, p, q);
      if (apq === 0) continue;
      const theta = (get(a, q, q) - get(a, p, p)) / (2 * apq);
      const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
      const c = 1 / Math.sqrt(t * t + 1);
      const sn = t * c;
      for (let k = 0; k < 3; k++) {
        const [x, y] = [get(a, k, p), get(a, k, q)];
        set(a, k, p, c * x - sn * y);
        set(a, k, q, sn * x + c * y);
      }
      for (let k = 0; k < 3; k++) {
        const [x, y] = [get(a, p, k), get(a, q, k)];
        set(a, p, k, c * x - sn * y);
        set(a, q, k, sn * x + c * y);
        const [vx, vy] = [get(v, k, p), get(v, k, q)];
        set(v, k, p, c * vx - sn * vy);
        set(v, k, q, sn * vx + c * vy);
      }
    }
  }
  const pair = (i: number): EigenPair => ({ value: get(a, i, i), vector: [get(v, 0, i), get(v, 1, i), get(v, 2, i)] });
  const [first, second, third] = [pair(0), pair(1), pair(2)].sort((x, y) => x.value - y.value);
  if (!first || !second || !third) throw new RangeError("three eigenvalues expected");
  return [first, second, third];
}
