import { studentTQuantile, studentTTwoSided } from "./distributions";
import { at, mean, sampleSd } from "./descriptive";
import { welchSatterthwaite } from "./uncertainty";

/** A difference with its test and 95 % interval, unit of the values. */
export interface MeanTest {
  readonly difference: number;
  readonly t: number;
  readonly dof: number;
  readonly p: number;
  readonly low: number;
  readonly high: number;
}

function test(difference: number, se: number, dof: number): MeanTest {
  const half = studentTQuantile(0.975, dof) * se;
  return {
    difference,
    t: difference / se,
    dof,
    p: studentTTwoSided(difference / se, dof),
    low: difference - half,
    high: difference + half,
  };
}

/** Summary of a group: mean, standard deviation, count. */
export interface Group {
  readonly mean: number;
  readonly s: number;
  readonly n: number;
}

/** Welch's test from summaries (B. L. Welch, Biometrika 34 (1947) 28): variances are never pooled by default. */
export function welchTestOf(a: Group, b: Group): MeanTest {
  const [uA, uB] = [a.s / Math.sqrt(a.n), b.s / Math.sqrt(b.n)];
  const dof = welchSatterthwaite([
    { u: uA, dof: a.n - 1 },
    { u: uB, dof: b.n - 1 },
  ]);
  return test(a.mean - b.mean, Math.hypot(uA, uB), dof);
}

/** Student's test with pooled variance, from summaries; for comparison with printed examples. */
export function pooledTestOf(a: Group, b: Group): MeanTest & { s: number } {
  const dof = a.n + b.n - 2;
  const s = Math.sqrt(((a.n - 1) * a.s ** 2 + (b.n - 1) * b.s ** 2) / dof);
  return { ...test(a.mean - b.mean, s * Math.sqrt(1 / a.n + 1 / b.n), dof), s };
}

/** Welch's test of two samples; undefined when one has fewer than two values or neither has any spread. */
export function welchTest(x: ArrayLike<number>, y: ArrayLike<number>): MeanTest | undefined {
  const [a, b] = [groupOf(x), groupOf(y)];
  return a && b && (a.s > 0 || b.s > 0) ? welchTestOf(a, b) : undefined;
}

/** Mean of paired differences with t on n − 1; undefined for fewer than two pairs or no spread. */
export function pairedTest(differences: ArrayLike<number>): (MeanTest & { s: number }) | undefined {
  const group = groupOf(differences);
  if (!group || !(group.s > 0)) return undefined;
  return { ...test(group.mean, group.s / Math.sqrt(group.n), group.n - 1), s: group.s };
}

function groupOf(values: ArrayLike<number>): Group | undefined {
  const [centre, s] = [mean(values), sampleSd(values)];
  return centre === undefined || s === undefined ? undefined : { mean: centre, s, n: values.length };
}

/** Differences of two equally long lists, pair by pair. @throws RangeError when the lengths differ. */
export function pairDifferences(x: ArrayLike<number>, y: ArrayLike<number>): Float64Array {
  if (x.length !== y.length) throw new RangeError("pairs need equally many values");
  return Float64Array.from(x, (value, i) => value - at(y, i));
}
