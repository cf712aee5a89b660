import { describe, it } from "vitest";
import { effectiveSampleSize, vonNeumann } from "@/lib/science/statistics/autocorrelation";
import { quantile } from "@/lib/science/statistics/descriptive";
import { fitLine, seOfSlope } from "@/lib/science/statistics/line-fit";
import { createRandom } from "@/lib/science/statistics/random";
import { fitExponential, threePointFinal } from "@/lib/science/thermal/exponential-fit";
import { fitRiseFromZero } from "@/lib/science/thermal/rise-fit";
import { firstQuietRun, varianceRatio } from "@/lib/science/thermal/variance-ratio";
import { minstd, twelveSum } from "../support/minstd";
import { expectClose, idsOf, num, nums, record, vector, type Vector } from "../support/vectors";
import boxbod from "../values/strd/boxbod.json";
import misra1a from "../values/strd/misra1a.json";

const n = (v: Vector, key: string) => num(v.inputs[key]);
const rise = (t: number) => 60 - 35 * Math.exp(-t / 300);

function noisy(seed: number, count: number, at: (i: number) => number): number[] {
  const normal = twelveSum(minstd(seed));
  return Array.from({ length: count }, (_, i) => at(i) + 0.05 * normal());
}
const steady = (count: number) => noisy(12345, count, () => 42);
const moving = (count: number) => noisy(2024, count, (i) => rise(5 * i));
const every5s = (count: number) => Float64Array.from({ length: count }, (_, i) => 5 * i);

const weights = (v: Vector) => ({ value: n(v, "lambda1"), variance: n(v, "lambda2"), step: n(v, "lambda3") });
const picked = (ratios: Float64Array, expected: unknown) =>
  Object.fromEntries(Object.keys(record(expected)).map((index) => [index, ratios[Number(index)]]));

function slopeLimit(v: Vector) {
  const perSecond = n(v, "slope_limit_K_per_min") / 60;
  return {
    time_reached_s: n(v, "tau_s") * Math.log(n(v, "A_K") / n(v, "tau_s") / perSecond),
    residual_K: n(v, "tau_s") * perSecond,
  };
}

function rollingSlope(v: Vector) {
  const times = Array.from({ length: 13 }, (_, i) => n(v, "t_end_s") - n(v, "window_s") + n(v, "dt_s") * i);
  return { slope_K_per_s: fitLine(times, times.map(rise))?.slope, true_residual_K: 60 - rise(n(v, "t_end_s")) };
}

/** Quantiles of R after 200 samples of white noise, over 20,000 seeded records. */
function nullQuantiles(v: Vector) {
  const random = createRandom(99);
  const ends = Array.from({ length: 20_000 }, () => {
    const ratios = varianceRatio(
      Array.from({ length: 200 }, () => random.normal()),
      weights(v),
    );
    return ratios[199] ?? Number.NaN;
  });
  return { R_quantiles: nums(v.inputs.probabilities).map((p) => quantile(ends, p)) };
}

function nist(data: readonly (readonly number[])[]) {
  const sorted = [...data].sort((a, b) => (a[1] ?? 0) - (b[1] ?? 0));
  const fit = fitRiseFromZero(
    sorted.map((row) => row[1] ?? Number.NaN),
    sorted.map((row) => row[0] ?? Number.NaN),
  );
  if (!fit) throw new Error("no fit");
  return { b1: fit.final, b2: 1 / fit.tau, sd_b1: fit.seFinal, sd_b2: fit.seTau / fit.tau ** 2, residualSS: fit.rss };
}

function exponential(values: number[]) {
  const fit = fitExponential(every5s(values.length), values);
  if (!fit) throw new Error("no fit");
  return {
    Tinf: fit.final,
    A: fit.amplitude,
    tau_s: fit.tau,
    rss: fit.rss,
    se_Tinf: fit.seFinal,
    se_A: fit.seAmplitude,
    se_tau: fit.seTau,
  };
}

function threePoint(v: Vector) {
  const [a, b, c] = nums(v.inputs.T);
  const found = threePointFinal([a ?? NaN, b ?? NaN, c ?? NaN], n(v, "dt_s"));
  return { Tinf: found?.final, tau_s: found?.tau };
}

const window = (values: number[]) => {
  const found = vonNeumann(values);
  return { eta: found?.eta, R_window: found?.ratio };
};

const computed: Record<string, (v: Vector) => unknown> = {
  "T2-01": slopeLimit,
  "T2-03": slopeLimit,
  "T2-04": slopeLimit,
  "T2-05": rollingSlope,
  "T2-06": rollingSlope,
  "T2-07": rollingSlope,
  "T2-08": (v) => {
    const sxx = fitLine(
      every5s(13),
      Array.from({ length: 13 }, () => 0),
    )?.sxx;
    const se = seOfSlope(n(v, "sigma_K"), sxx ?? NaN);
    return { Sxx: sxx, se_slope_K_per_s: se, se_slope_K_per_min: 60 * se };
  },
  "T2-09": (v) => {
    const uniform = minstd(n(v, "seed"));
    const normal = twelveSum(minstd(n(v, "seed")));
    return { first_u: [uniform(), uniform(), uniform()], first_normals: [normal(), normal(), normal()] };
  },
  "T2-10": (v) => ({ R: picked(varianceRatio(steady(200), weights(v)), v.expected.R) }),
  "T2-11": (v) => {
    const ratios = varianceRatio(moving(600), weights(v));
    const index = firstQuietRun(ratios, 2, 30) ?? Number.NaN;
    return {
      R: picked(ratios, v.expected.R),
      first_index_30_consecutive_below_2_0: index,
      time_s: 5 * index,
      true_residual_K: 60 - rise(5 * index),
    };
  },
  "T2-12": (v) => ({
    R_499: varianceRatio(
      Array.from({ length: 500 }, (_, i) => 0.1 * i),
      weights(v),
    )[499],
  }),
  "T2-13": nullQuantiles,
  "T2-14": nullQuantiles,
  "T2-15": nullQuantiles,
  "T2-16": () => nist(misra1a.data),
  "T2-17": () => nist(boxbod.data),
  "T2-18": () => exponential([...every5s(240)].map(rise)),
  "T2-19": () => exponential(moving(240)),
  "T2-20": () => exponential(moving(60)),
  "T2-21": threePoint,
  "T2-22": threePoint,
  "T2-23": () => window(steady(30)),
  "T2-24": () => window(moving(30)),
  "T2-25": (v) => {
    const effective = effectiveSampleSize(n(v, "n"), n(v, "r1"));
    return { n_eff: effective, se_mean: n(v, "s") / Math.sqrt(effective) };
  },
};

describe("steady state", () => {
  it.each(idsOf("T2-").map((id) => ({ ...vector(id), id })))("$title", (v) => {
    expectClose(computed[v.id]?.(v), v.expected, v.tolerance);
  });
});
