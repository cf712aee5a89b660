/**
 * Numbers as an unevaluated sum of two doubles, about 32 digits (T. J. Dekker, Numer. Math. 18 (1971) 224; D. E. Knuth,
 * The Art of Computer Programming 2, 4.2.2). Not for values near the ends of the double range.
 */
export type DoubleDouble = readonly [high: number, low: number];

const SPLITTER = 134_217_729;

function twoSum(a: number, b: number): DoubleDouble {
  const s = a + b;
  const v = s - a;
  return [s, a - (s - v) + (b - v)];
}

function quickSum(a: number, b: number): DoubleDouble {
  const s = a + b;
  return [s, b - (s - a)];
}

function twoProduct(a: number, b: number): DoubleDouble {
  const p = a * b;
  const [ta, tb] = [SPLITTER * a, SPLITTER * b];
  const [ah, bh] = [ta - (ta - a), tb - (tb - b)];
  const [al, bl] = [a - ah, b - bh];
  return [p, ah * bh - p + ah * bl + al * bh + al * bl];
}

export function add([ah, al]: DoubleDouble, [bh, bl]: DoubleDouble): DoubleDouble {
  const [sh, sl] = twoSum(ah, bh);
  const [th, tl] = twoSum(al, bl);
  const [uh, ul] = quickSum(sh, sl + th);
  return quickSum(uh, ul + tl);
}

export function negate([h, l]: DoubleDouble): DoubleDouble {
  return [-h, -l];
}

export function multiply([ah, al]: DoubleDouble, [bh, bl]: DoubleDouble): DoubleDouble {
  const [p, e] = twoProduct(ah, bh);
  return quickSum(p, e + (ah * bl + al * bh));
}

export function divide(a: DoubleDouble, b: DoubleDouble): DoubleDouble {
  const q1 = a[0] / b[0];
  const r1 = add(a, negate(multiply(b, [q1, 0])));
  const q2 = r1[0] / b[0];
  const r2 = add(r1, negate(multiply(b, [q2, 0])));
  const [h, l] = quickSum(q1, q2);
  return add([h, l], [r2[0] / b[0], 0]);
}

export function value([h, l]: DoubleDouble): number {
  return h + l;
}

/** Powers x⁰ … x^degree of each value, exact to about 32 digits: columns of a polynomial. */
export function powers(x: ArrayLike<number>, degree: number): DoubleDouble[][] {
  const columns: DoubleDouble[][] = [Array.from(x, () => [1, 0] as const)];
  for (let d = 1; d <= degree; d++)
    columns.push(Array.from(x, (base, i) => multiply(columns[d - 1]?.[i] ?? [0, 0], [base, 0])));
  return columns;
}
