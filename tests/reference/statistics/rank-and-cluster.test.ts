import { describe, expect, it } from "vitest";
import { fitWithinCells } from "@/lib/science/statistics/cell-effects";
import { leastSquares } from "@/lib/science/statistics/least-squares";
import { hodgesLehmann, kruskalWallis, mannWhitney, medianInterval } from "@/lib/science/statistics/rank-tests";
import { clusterErrors, hc3Errors, varianceInflation, wildClusterP } from "@/lib/science/statistics/robust-errors";
import values from "../values/rank-and-cluster.json";

const { cluster } = values;
const columns = [cluster.y.map(() => 1), cluster.x1, cluster.x2];

describe(`rank tests and robust errors against ${values.source}`, () => {
  it("Mann–Whitney, exact and with ties", () => {
    const exact = mannWhitney(values.mannWhitney.x, values.mannWhitney.y);
    expect(exact).toMatchObject({ u: values.mannWhitney.u, exact: true });
    expect(exact?.p).toBeCloseTo(values.mannWhitney.p, 12);
    const ties = mannWhitney(values.mannWhitneyTies.x, values.mannWhitneyTies.y);
    expect(ties).toMatchObject({ u: values.mannWhitneyTies.u, exact: false });
    expect(ties?.p).toBeCloseTo(values.mannWhitneyTies.p, 12);
  });
  it.each([values.kruskal, values.kruskalTies])("Kruskal–Wallis H = $h", ({ groups, h, p }) => {
    const found = kruskalWallis(groups);
    expect(found?.h).toBeCloseTo(h, 10);
    expect(found?.p).toBeCloseTo(p, 12);
  });
  it("the median of all differences, with an interval that holds it", () => {
    const found = hodgesLehmann(values.mannWhitney.x, values.mannWhitney.y);
    expect(found?.shift).toBeCloseTo(values.shift, 12);
    expect(found?.interval?.low).toBeLessThan(values.shift);
    expect(found?.interval?.high).toBeGreaterThan(values.shift);
    expect(hodgesLehmann([1, 2, 3], [4, 5, 6])?.interval).toBeUndefined();
  });
  it("the median's interval takes the 2nd of nine values, none under six (binomial: 2/2⁶ = 0.03, 20/2⁹ = 0.04)", () => {
    expect(medianInterval([1, 2, 3, 4, 5, 6, 7, 8, 9])?.interval).toEqual({ low: 2, high: 8 });
    expect(medianInterval([1, 2, 3, 4, 5, 6])?.interval).toEqual({ low: 1, high: 6 });
    expect(medianInterval([1, 2, 3, 4, 5])).toEqual({ median: 3, interval: undefined });
  });
  it("HC3 and cluster errors", () => {
    const fit = leastSquares(columns, cluster.y, true);
    if ("refused" in fit) throw new Error(fit.refused);
    cluster.coef.forEach((value, i) => expect(fit.coefficients[i]).toBeCloseTo(value, 11));
    cluster.hc3.forEach((value, i) => expect(hc3Errors(columns, fit)[i]).toBeCloseTo(value, 11));
    const found = clusterErrors(columns, fit, cluster.cluster);
    cluster.cr1.forEach((value, i) => expect(found?.errors[i]).toBeCloseTo(value, 11));
    expect(found?.dof).toBe(7);
  });
  it("the wild cluster bootstrap over all 2⁸ signs, and about the same by drawing", () => {
    const found = wildClusterP(columns, cluster.yWild, 1, cluster.cluster, { seed: 1 });
    expect(found).toEqual({ p: values.cluster.wildP, draws: 256 });
    const many = [...cluster.cluster].map((label, i) => `${label}${i % 5}`);
    const drawn = wildClusterP(columns, cluster.yWild, 1, many, { seed: 7, draws: 199 });
    expect(drawn).toEqual(wildClusterP(columns, cluster.yWild, 1, many, { seed: 7, draws: 199 }));
    expect(drawn?.draws).toBe(199);
  });
  it("variance inflation is 1 for columns at right angles and endless for dependent ones", () => {
    expect(
      varianceInflation(
        [
          [1, 1, -1, -1],
          [1, -1, 1, -1],
        ],
        true,
      ),
    ).toEqual([1, 1]);
    const [first] = varianceInflation(
      [
        [1, 2, 3, 5],
        [2, 4, 6, 10],
      ],
      true,
    );
    expect(first).toBeGreaterThan(1e12);
  });
  it("refuses an effect that varies in no cell", () => {
    const found = fitWithinCells([[1, 1, 1, 2, 2, 2, 2, 2, 2, 2]], [1, 2, 3, 4, 5, 6, 7, 8, 9, 1], [..."aaabbbbbbb"]);
    expect(found).toEqual({ refused: "dependent-column", column: 0 });
  });
});
