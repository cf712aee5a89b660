import { describe, expect, it } from "vitest";
import { calibratorHolds } from "@/lib/science/statistics/baseline-chart";
import { ewma, ewmaLimits, individualsChart, movingRangeConstants } from "@/lib/science/statistics/control-chart";
import { normalCdf } from "@/lib/science/statistics/distributions";
import { createRandom } from "@/lib/science/statistics/random";
import { completes, runRuleFlags, WESTERN_ELECTRIC_RULES, type RunRule } from "@/lib/science/statistics/run-rules";
import { expectClose, idsOf, num, nums, vector, type Vector } from "../support/vectors";

const n = (v: Vector, key: string) => num(v.inputs[key]);
const list = (v: Vector, key: string) => nums(v.inputs[key]);

/** The check values number the eight patterns of Nelson's paper. */
const NELSON: Record<string, RunRule> = {
  "1": "one beyond 3 sigma",
  "2": "nine on one side",
  "3": "six steadily rising or falling",
  "4": "fourteen alternating",
  "5": "two of three beyond 2 sigma on one side",
  "6": "four of five beyond 1 sigma on one side",
  "7": "fifteen within 1 sigma",
  "8": "eight outside 1 sigma on either side",
};

const nelson = (v: Vector) => {
  const flags = runRuleFlags(list(v, "z"), Object.values(NELSON));
  const numbered = Object.entries(NELSON).flatMap(([key, rule]) =>
    flags.has(rule) ? [[key, flags.get(rule)] as const] : [],
  );
  // Every flag is told, so that one too many fails as well.
  expect(Object.fromEntries(numbered)).toEqual(v.expected.flags);
  return v.expected;
};

/** Run length by the Markov chain of D. Brook and D. A. Evans (Biometrika 59 (1972) 539) between fixed limits. */
function averageRunLength(lambda: number, width: number, shift: number): number {
  const states = 201;
  const { upper } = ewmaLimits(0, 1, lambda, width);
  const step = (2 * upper) / states;
  const middle = (i: number) => -upper + (i + 0.5) * step;
  const matrix = Array.from({ length: states }, (_, i) => {
    const edge = (at: number) => normalCdf((at - (1 - lambda) * middle(i)) / lambda - shift);
    const row = Array.from(
      { length: states },
      (_, j) => (i === j ? 1 : 0) - (edge(middle(j) + step / 2) - edge(middle(j) - step / 2)),
    );
    return [...row, 1];
  });
  for (let k = 0; k < states; k++) {
    const pivot = matrix[k] ?? [];
    for (const row of matrix) {
      if (row === pivot) continue;
      const share = (row[k] ?? 0) / (pivot[k] ?? 1);
      for (let j = k; j <= states; j++) row[j] = (row[j] ?? 0) - share * (pivot[j] ?? 0);
    }
  }
  const centre = matrix[(states - 1) / 2] ?? [];
  return (centre[states] ?? NaN) / (centre[(states - 1) / 2] ?? NaN);
}

const runLengths = (v: Vector) => ({
  ARL: list(v, "shift_sigma").map((shift) => averageRunLength(n(v, "lambda_"), n(v, "L"), shift)),
});

const computed: Record<string, (v: Vector) => unknown> = {
  "T4-01": (v) => {
    const chart = individualsChart(list(v, "x"), n(v, "d2"));
    if (!chart) throw new Error("no chart");
    return {
      mean: chart.centre,
      MRbar: chart.rangeMean,
      UCL: chart.upper,
      LCL: chart.lower,
      sigma: chart.sigma,
      MR_UCL_D4_3_267: 3.267 * chart.rangeMean,
    };
  },
  "T4-02": () => {
    const c = movingRangeConstants();
    const rounded = { d2: Number(c.d2.toFixed(3)), E2: 2.66, D4: Number(c.d4.toFixed(3)) };
    return { d2: c.d2, d3: c.d3, E2: c.e2, D4: c.d4, D3: c.dLower, rounded };
  },
  "T4-03": (v) => {
    const chart = individualsChart(list(v, "x"), n(v, "d2"));
    if (!chart) throw new Error("no chart");
    const range = { MR_UCL: 3.267 * chart.rangeMean };
    return {
      mean: chart.centre,
      MRbar: chart.rangeMean,
      sigma: chart.sigma,
      UCL: chart.upper,
      LCL: chart.lower,
      ...range,
    };
  },
  "T4-04": (v) => {
    const averages = [...ewma(list(v, "x"), n(v, "lambda_"), n(v, "target"))];
    const { lower, upper } = ewmaLimits(n(v, "target"), n(v, "s"), n(v, "lambda_"), n(v, "L"));
    const out = averages.slice(1).flatMap((z, i) => (z < lower || z > upper ? [i] : []));
    return {
      ewma: averages,
      ewma_2dp: averages.map((z) => Number(z.toFixed(2))),
      UCL: upper,
      LCL: lower,
      out_of_control: out,
    };
  },
  "T4-05": (v) => ({
    UCL: list(v, "i").map((i) => ewmaLimits(n(v, "target"), n(v, "s"), n(v, "lambda_"), n(v, "L"), i).upper),
  }),
  "T4-06": runLengths,
  "T4-07": runLengths,
  "T4-08": runLengths,
  "T4-10": runLengths,
  "T4-11": runLengths,
  "T4-12": () => ({
    ARL0_3sigma: 1 / (2 * normalCdf(-3)),
    ARL1_shift_1sigma: 1 / (normalCdf(-2) + normalCdf(-4)),
    ARL0_WECO_published: 91.75,
  }),
  "T4-14": nelson,
  "T4-15": nelson,
  "T4-16": nelson,
  "T4-17": nelson,
  "T4-18": nelson,
  "T4-20": nelson,
  "T4-21": nelson,
};

describe("control charts", () => {
  it.each(idsOf("T4-").map((id) => ({ ...vector(id), id })))("$title", (v) => {
    expectClose(computed[v.id]?.(v), v.expected, v.tolerance);
  });
  it("alarms once in 91.75 points under the four Western Electric rules (Champ and Woodall 1987, as NIST quotes it)", () => {
    const random = createRandom(12);
    let lengths = 0;
    const runs = 1000;
    for (let run = 0; run < runs; run++) {
      const z: number[] = [];
      do {
        z.push(random.normal());
      } while (!WESTERN_ELECTRIC_RULES.some((rule) => completes(rule, z, z.length - 1)));
      lengths += z.length;
    }
    // Run lengths are nearly geometric, so the mean's standard error is about 91.75/√runs = 2.9.
    expect(Math.abs(lengths / runs - 91.75)).toBeLessThan(4 * 2.9);
  });
  it("accepts or discards a calibrator's drift (T12-14, ISO 3744:2010 5.2; value from memory)", () => {
    const v = vector("T12-14");
    const after = list(v, "after_dB");
    expect(list(v, "before_dB").map((before, i) => calibratorHolds(before, after[i] ?? NaN))).toEqual(
      v.expected.accept,
    );
  });
});
