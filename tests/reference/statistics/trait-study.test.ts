import { describe, expect, it } from "vitest";
import { kendall, spearman, spearmanExactP, theilSen } from "@/lib/science/statistics/association";
import { fitWithinCells } from "@/lib/science/statistics/cell-effects";
import { mean, quantile } from "@/lib/science/statistics/descriptive";
import { studentTQuantile, studentTTwoSided } from "@/lib/science/statistics/distributions";
import { leastSquares, type LeastSquares, type NoFit } from "@/lib/science/statistics/least-squares";
import { smallestPCorrelation, smallestPPairs, smallestPTwoGroups } from "@/lib/science/statistics/minimum-counts";
import { reverses, wilsonInterval } from "@/lib/science/statistics/proportions";
import {
  bcaLevels,
  everyResample,
  flipSigns,
  permuteGroups,
  quantileByCount,
  spreadOf,
} from "@/lib/science/statistics/resampling";
import { hc3Errors } from "@/lib/science/statistics/robust-errors";
import { pairedTest } from "@/lib/science/statistics/two-samples";
import { median } from "@/lib/science/statistics/descriptive";
import { expectClose, idsOf, num, nums, record, vector, type Vector } from "../support/vectors";

const list = (v: Vector, key: string) => nums(v.inputs[key]);
const must = (fit: LeastSquares | NoFit) => {
  if ("refused" in fit) throw new Error(fit.refused);
  return fit;
};

function seasons(v: Vector) {
  const season = v.inputs.season as string[];
  const [blades, stages, y] = [list(v, "blades"), list(v, "two_stage"), list(v, "y")];
  const dummy = (name: string) => season.map((s) => (s === name ? 1 : 0));
  const columns = [y.map(() => 1), blades, stages, dummy("S2"), dummy("S3")];
  const fit = must(leastSquares(columns, y, true));
  const named = (values: Float64Array) =>
    Object.fromEntries(["intercept", "blades", "two_stage", "S2", "S3"].map((name, i) => [name, values[i]]));
  const [b, se] = [fit.coefficients[1] ?? NaN, fit.standardErrors[1] ?? NaN];
  const half = studentTQuantile(0.975, fit.dof) * se;
  const pooled = must(leastSquares(columns.slice(0, 3), y, true));
  // The same slopes and errors come out when each season's level is taken out instead.
  const cells = fitWithinCells([blades, stages], y, season);
  if ("refused" in cells) throw new Error(cells.refused);
  expect(cells.fit.coefficients[0]).toBeCloseTo(b, 10);
  expect(cells.fit.standardErrors[0]).toBeCloseTo(se, 10);
  expect(cells.fit.dof).toBe(fit.dof);
  return {
    coef: named(fit.coefficients),
    se: named(fit.standardErrors),
    t_blades: b / se,
    p_blades: studentTTwoSided(b / se, fit.dof),
    sigma: fit.residualSd,
    r2: fit.r2,
    df: fit.dof,
    ci95_blades: [b - half, b + half],
    hc3_se_blades: hc3Errors(columns, fit)[1],
    coef_without_season: { blades: pooled.coefficients[1], two_stage: pooled.coefficients[2] },
  };
}

const sen = (v: Vector) => {
  const [x, y] = [list(v, "x"), list(v, "y")];
  const found = theilSen(x, y);
  const other = (median(y) ?? NaN) - (found?.slope ?? NaN) * (median(x) ?? NaN);
  return {
    slope: found?.slope,
    intercept_median_residual: found?.intercept,
    intercept_scipy_median_y_minus_m_median_x: other,
    intercept_scipy: other,
    n_slopes: found?.slopes,
  };
};

const tau = (v: Vector) => {
  const found = kendall(list(v, "x"), list(v, "y"));
  return {
    concordant: found?.concordant,
    discordant: found?.discordant,
    ties_x_only: found?.tiesXOnly,
    ties_y_only: found?.tiesYOnly,
    tau_b: found?.tau,
    p_normal: found?.p,
    spearman_rho: spearman(list(v, "x"), list(v, "y")),
  };
};

const wilson = (v: Vector) => {
  const found = wilsonInterval(num(v.inputs.x), num(v.inputs.n), num(v.inputs.conf));
  return { ci: [found?.low, found?.high] };
};

const average = (sample: readonly number[]) => mean(sample) ?? NaN;

const computed: Record<string, (v: Vector) => unknown> = {
  "T10-11": seasons,
  "T10-12": sen,
  "T10-13": sen,
  "T10-14": sen,
  "T10-15": (v) => {
    const found = kendall(list(v, "x"), list(v, "y"));
    return {
      T_concordant: found?.concordant,
      tau: found?.tau,
      p_exact_two_sided: found?.p,
      spearman_rho: spearman(list(v, "x"), list(v, "y")),
      spearman_p_exact_R: spearmanExactP(list(v, "x"), list(v, "y")),
    };
  },
  "T10-16": tau,
  "T10-17": tau,
  "T10-20": wilson,
  "T10-21": wilson,
  "T10-22": wilson,
  "T10-23": wilson,
  "T10-25": wilson,
  "T10-26": wilson,
  "T10-27": (v) => {
    const x = list(v, "x");
    const all = everyResample(x, average).sort();
    const bca = bcaLevels(all, x, average);
    return {
      n_resamples: all.length,
      mean: mean(all),
      sd: spreadOf(all),
      percentile_type1_95: [0.025, 0.975].map((p) => quantileByCount(all, p)),
      percentile_type7_95: [0.025, 0.975].map((p) => quantile(all, p)),
      count_less: bca.below,
      count_equal: bca.equal,
      bca_z0: bca.z0,
      bca_a: bca.a,
      bca_levels: bca.levels,
      bca_type1_95: bca.levels.map((p) => quantileByCount(all, p)),
    };
  },
  "T10-28": (v) => {
    const all = everyResample(list(v, "x"), (sample) => median(sample) ?? NaN);
    const keys = Object.keys(record(v.expected.counts));
    const counts = keys.map((key) => [key, all.filter((value) => value === Number(key)).length] as const);
    return { counts: Object.fromEntries(counts), total: all.length };
  },
  "T10-29": (v) => {
    const found = permuteGroups(list(v, "x"), list(v, "y"));
    if (!found) throw new Error("no groups");
    return {
      obs: found.observed,
      total: found.total,
      count_two_sided_abs: found.reached,
      p_two_sided_abs: found.p,
      count_lower: found.lower,
      p_scipy_twice_smaller_tail: (2 * found.lower) / found.total,
    };
  },
  "T10-30": (v) => {
    const [flips, t] = [flipSigns(list(v, "d")), pairedTest(list(v, "d"))];
    return {
      sum: flips?.sum,
      count_ge: flips?.reachedAbove,
      count_gt: flips?.beyondAbove,
      total: flips?.total,
      p_two_sided: flips?.p,
      t: t?.t,
      df: t?.dof,
      p_t: t?.p,
      ci95_mean: [t?.low, t?.high],
    };
  },
  "T10-31": (v) => {
    const [flips, t] = [flipSigns(list(v, "d")), pairedTest(list(v, "d"))];
    return {
      mean: t?.difference,
      sd: t?.s,
      t: t?.t,
      p_t: t?.p,
      ci95: [t?.low, t?.high],
      sign_flip_count: flips?.reached,
      sign_flip_total: flips?.total,
      p_sign_flip: flips?.p,
    };
  },
  "T10-32": () => ({
    two_sample: Object.fromEntries([3, 4, 5].map((n) => [n, smallestPTwoGroups(n)])),
    sign_flip: Object.fromEntries([5, 6].map((n) => [n, smallestPPairs(n)])),
    kendall: Object.fromEntries([4, 5].map((n) => [n, smallestPCorrelation(n)])),
  }),
  "T10-33": (v) => {
    const [a, b] = [record(v.inputs.A), record(v.inputs.B)];
    const pair = (side: Record<string, unknown>, key: string): [number, number] => {
      const [won = NaN, of = NaN] = nums(side[key]);
      return [won, of];
    };
    const share = (side: Record<string, unknown>, keys: string[]) =>
      keys.reduce((t, key) => t + pair(side, key)[0], 0) / keys.reduce((t, key) => t + pair(side, key)[1], 0);
    return {
      A_small: share(a, ["small"]),
      B_small: share(b, ["small"]),
      A_large: share(a, ["large"]),
      B_large: share(b, ["large"]),
      A_total: share(a, ["small", "large"]),
      B_total: share(b, ["small", "large"]),
      reversal: reverses(["small", "large"].map((key) => ({ a: pair(a, key), b: pair(b, key) }))),
    };
  },
};

/** Regression sets and adjusted p-values have test files of their own. */
const elsewhere = ["T10-18", "T10-19"];

describe("statistics of the trait study", () => {
  it.each(Object.keys(computed).map((id) => ({ ...vector(id), id })))("$title", (v) => {
    expectClose(computed[v.id]?.(v), v.expected, v.tolerance);
  });
  it("leaves out none of the section's check values", () => {
    expect(
      idsOf("T10-")
        .slice(10)
        .filter((id) => !(id in computed)),
    ).toEqual(elsewhere);
  });
});
