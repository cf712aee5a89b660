import { describe, expect, it } from "vitest";
import { compactLetters } from "@/lib/science/statistics/letters";
import { benjaminiHochberg, holm } from "@/lib/science/statistics/multiple-comparisons";
import { dominatedArea, exclusiveAreas, onFront } from "@/lib/science/statistics/pareto";
import {
  expectedRanks,
  pOfDifference,
  probabilityFirst,
  probabilityLess,
  simulateRanks,
  uOfDifference,
} from "@/lib/science/statistics/ranking";
import { minstd } from "../support/minstd";
import { expectClose, idsOf, num, nums, record, rows, vector, type Vector } from "../support/vectors";

const figures = (inputs: Record<string, unknown>) =>
  nums(inputs.mean).map((value, i) => ({ value, u: nums(inputs.u)[i] ?? NaN }));

function pairLetters(p: Record<string, unknown>): Record<string, string> {
  const names = [...new Set(Object.keys(p).flatMap((pair) => pair.split("-")))].sort();
  const letters = compactLetters(names.length, (i, j) => num(p[`${names[i]}-${names[j]}`]) < 0.05);
  return Object.fromEntries(names.map((name, i) => [name, letters[i] ?? ""]));
}

const less = (v: Vector) => ({
  P: probabilityLess(
    { value: num(v.inputs.a), u: num(v.inputs.ua) },
    { value: num(v.inputs.b), u: num(v.inputs.ub) },
    num(v.inputs.r),
  ),
});
const first = (v: Vector) => ({
  P_first: probabilityFirst(figures(v.inputs)),
  expected_rank: expectedRanks(figures(v.inputs)),
});

const computed: Record<string, (v: Vector) => unknown> = {
  "T11-04": ({ inputs }) => {
    const names = Object.keys(record(inputs.entries));
    const points = names.map((name) => ({
      x: nums(record(inputs.entries)[name])[0] ?? NaN,
      y: nums(record(inputs.entries)[name])[1] ?? NaN,
    }));
    const reference = { x: nums(inputs.reference)[0] ?? NaN, y: nums(inputs.reference)[1] ?? NaN };
    const alone = exclusiveAreas(points, reference);
    return {
      front: names.filter((_, i) => onFront(points)[i]),
      hypervolume: dominatedArea(points, reference),
      exclusive: Object.fromEntries(names.map((name, i) => [name, alone[i]])),
    };
  },
  "T11-07": less,
  "T11-08": less,
  "T11-09": less,
  "T11-11": less,
  "T11-12": first,
  "T11-13": first,
  "T11-14": ({ inputs }) => {
    const z = rows(inputs.z);
    let n = 0;
    const ranks = simulateRanks(3, z.length, (values) => {
      figures(inputs).forEach(({ value, u }, i) => (values[i] = value + u * (z[n]?.[i] ?? NaN)));
      n += 1;
    });
    return { first_counts: ranks.map((rank) => rank.counts[0]) };
  },
  "T11-15": ({ inputs }) => {
    const uniform = minstd(num(inputs.seed));
    const normal = () => {
      const radius = Math.sqrt(-2 * Math.log(uniform()));
      return radius * Math.cos(2 * Math.PI * uniform());
    };
    const ranks = simulateRanks(3, num(inputs.N), (values) => {
      figures(inputs).forEach(({ value, u }, i) => (values[i] = value + u * normal()));
    });
    return { first_counts: ranks.map((r) => r.counts[0]), rank_counts: ranks.map((r) => [...r.counts]) };
  },
  "T11-16": ({ inputs }) => {
    const list = figures(inputs);
    const pairs = ["A-B", "A-C", "A-D", "B-C", "B-D", "C-D"];
    const p = pairs.map((pair) => {
      const [a, b] = [pair.charCodeAt(0) - 65, pair.charCodeAt(2) - 65].map((i) => list[i]);
      if (!a || !b) throw new Error("no such pair");
      return pOfDifference(a.value - b.value, uOfDifference(a.u, b.u));
    });
    const named = (values: number[]) => Object.fromEntries(pairs.map((pair, i) => [pair, values[i] ?? NaN]));
    const adjusted = named(benjaminiHochberg(p));
    return { p: named(p), letters_raw_p: pairLetters(named(p)), letters_BH: pairLetters(adjusted), p_BH: adjusted };
  },
  "T11-17": ({ inputs }) => ({ letters: pairLetters(record(inputs.p)) }),
  "T10-18": ({ inputs }) => {
    const adjusted = benjaminiHochberg(nums(inputs.p));
    return { adjusted, rejected: adjusted.filter((p) => p <= num(inputs.q)).length };
  },
  "T10-19": ({ inputs }) => ({
    adjusted_BH: benjaminiHochberg(nums(inputs.p)),
    adjusted_Holm: holm(nums(inputs.p)),
  }),
};

/** Scoring rules are the house's own and are checked where they live. */
const elsewhere = ["T11-01", "T11-02", "T11-03", "T11-05", "T11-06"];

describe("ranking and comparisons", () => {
  it.each(Object.keys(computed).map((id) => ({ ...vector(id), id })))("$title", (v) => {
    expectClose(computed[v.id]?.(v), v.expected, v.tolerance);
  });
  it("leaves out none of the section's check values but the named scoring rules", () => {
    const left = idsOf("T11-").filter((id) => !(id in computed));
    expect(left).toEqual(elsewhere);
  });
});
