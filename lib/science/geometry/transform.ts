import { Refusal } from "@/lib/science/refusal";

/** A 3MF transform: the twelve numbers m00 m01 m02 m10 … m32 of a row-vector matrix, in file order. */
export type Transform = readonly number[];

export const identityTransform: Transform = [1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0];

const m = (t: Transform, row: number, column: number): number => t[3 * row + column] ?? 0;

/** Parses the transform attribute of 3MF Core 1.4.0 (§3.3); a missing one is the identity; a bad one is a Refusal. */
export function parseTransform(text: string | undefined): Transform {
  if (text === undefined) return identityTransform;
  const numbers = text.trim().split(/\s+/).map(Number);
  if (numbers.length !== 12 || !numbers.every(Number.isFinite) || determinant(numbers) === 0) {
    throw new Refusal("3mf-transform", "A transform in the 3MF file is not a matrix that can be used.");
  }
  return numbers;
}

/** x, y, z after the transform: (x y z 1) times the matrix. */
export function transformPoint(t: Transform, x: number, y: number, z: number): [number, number, number] {
  return [
    x * m(t, 0, 0) + y * m(t, 1, 0) + z * m(t, 2, 0) + m(t, 3, 0),
    x * m(t, 0, 1) + y * m(t, 1, 1) + z * m(t, 2, 1) + m(t, 3, 1),
    x * m(t, 0, 2) + y * m(t, 1, 2) + z * m(t, 2, 2) + m(t, 3, 2),
  ];
}

/** The transform that does `inner` first, then `outer`. */
export function composeTransforms(inner: Transform, outer: Transform): Transform {
  const out: number[] = [];
  for (let row = 0; row < 4; row++) {
    for (let column = 0; column < 3; column++) {
      let sum = row === 3 ? m(outer, 3, column) : 0;
      for (let k = 0; k < 3; k++) sum += m(inner, row, k) * m(outer, k, column);
      out.push(sum);
    }
  }
  return out;
}

/** Determinant of the linear part: negative for a mirror image, which turns triangles inside out. */
export function determinant(t: Transform): number {
  return (
    m(t, 0, 0) * (m(t, 1, 1) * m(t, 2, 2) - m(t, 1, 2) * m(t, 2, 1)) -
    m(t, 0, 1) * (m(t, 1, 0) * m(t, 2, 2) - m(t, 1, 2) * m(t, 2, 0)) +
    m(t, 0, 2) * (m(t, 1, 0) * m(t, 2, 1) - m(t, 1, 1) * m(t, 2, 0))
  );
}
