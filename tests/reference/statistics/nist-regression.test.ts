import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { powers, type DoubleDouble } from "@/lib/science/statistics/double-double";
import { leastSquares } from "@/lib/science/statistics/least-squares";
import { preciseLeastSquares } from "@/lib/science/statistics/precise-least-squares";
import { idsOf, num, vector, type Vector } from "../support/vectors";

interface Dataset {
  name: string;
  source: string;
  model: string;
  parameters: number;
  data: number[][];
  certified: { estimates: number[]; standardDeviations: number[]; residualStandardDeviation: number; rSquared: number };
}

const load = (v: Vector) =>
  JSON.parse(readFileSync(path.join(import.meta.dirname, "../values", String(v.inputs.dataset)), "utf8")) as Dataset;

const y = (set: Dataset) => set.data.map((row) => row[0] ?? NaN);
const x = (set: Dataset, k = 1) => set.data.map((row) => row[k] ?? NaN);
const hasConstant = (set: Dataset) => set.name !== "NoInt1";

/** Columns of the model: several predictors, none but x, or powers of x. */
function columns(set: Dataset): DoubleDouble[][] {
  const wide = (values: number[]): DoubleDouble[] => values.map((value) => [value, 0]);
  if (!hasConstant(set)) return [wide(x(set))];
  if (set.name !== "Longley") return powers(x(set), set.parameters - 1);
  const predictors = Array.from({ length: set.parameters - 1 }, (_, k) => wide(x(set, k + 1)));
  return [wide(y(set).map(() => 1)), ...predictors];
}
const narrow = (set: Dataset) => columns(set).map((column) => column.map(([high, low]) => high + low));

const near = (actual: number, expected: number, relative: number, zero: number) => {
  const allowed = expected === 0 ? zero : relative * Math.abs(expected);
  expect(Math.abs(actual - expected), `${actual} against ${expected}`).toBeLessThanOrEqual(allowed);
};

const sets = idsOf("T10-")
  .slice(0, 10)
  .map((id) => ({ ...vector(id), id }));

describe("least squares by Householder against NIST's certified values, to the digits double precision leaves", () => {
  it.each(sets)("$title", (v) => {
    const set = load(v);
    const fit = leastSquares(narrow(set), y(set), hasConstant(set));
    if ("refused" in fit) throw new Error(fit.refused);
    const t = v.tolerance;
    set.certified.estimates.forEach((expected, i) =>
      near(fit.coefficients[i] ?? NaN, expected, num(t.estimates_rel), 0),
    );
    set.certified.standardDeviations.forEach((expected, i) =>
      near(fit.standardErrors[i] ?? NaN, expected, num(t.sd_rel), num(t.sd_abs_when_certified_zero)),
    );
    near(
      fit.residualSd,
      set.certified.residualStandardDeviation,
      num(t.residual_sd_rel),
      num(t.residual_sd_abs_when_zero),
    );
    expect(Math.abs(fit.r2 - set.certified.rSquared)).toBeLessThanOrEqual(num(t.r2_abs));
    if (typeof v.expected.F === "number") near(fit.f, v.expected.F, 1e-6, 0);
  });
});

describe("least squares in double-double against the same, to thirteen digits", () => {
  it.each(sets)("$title", (v) => {
    const set = load(v);
    const fit = preciseLeastSquares(columns(set), y(set));
    if (!fit) throw new Error("no fit");
    set.certified.estimates.forEach((expected, i) => near(fit.coefficients[i] ?? NaN, expected, 1e-13, 0));
    set.certified.standardDeviations.forEach((expected, i) =>
      near(fit.standardErrors[i] ?? NaN, expected, 1e-13, 1e-13),
    );
  });
});

describe("rank", () => {
  it("refuses a column that others already say, and names it", () => {
    const ones = [1, 1, 1, 1, 1];
    const a = [1, 2, 3, 4, 6];
    const both = a.map((value) => 3 * value - 2);
    expect(leastSquares([ones, a, both], [1, 2, 3, 4, 5], true)).toEqual({ refused: "dependent-column", column: 2 });
    expect(leastSquares([ones.slice(3), a.slice(3)], [1, 2], true)).toEqual({ refused: "too-few-rows" });
    const wide = (values: number[]) => values.map((value): DoubleDouble => [value, 0]);
    expect(preciseLeastSquares([ones, a, both].map(wide), [1, 2, 3, 4, 5])).toBeUndefined();
  });
});
