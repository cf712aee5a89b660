import { describe, expect, it } from "vitest";
import { backgroundCorrection, energyMean } from "@/lib/science/acoustics/levels";
import { mean } from "@/lib/science/statistics/descriptive";
import { expectClose, idsOf, num, nums, vector } from "../support/vectors";

/**
 * Left out: T12-06 to -08 (distance error) and T12-10 to -12 (frame presets) are arithmetic of presets that are checked
 * where they live; T12-14 is among the control charts.
 */
const elsewhere = ["T12-06", "T12-07", "T12-08", "T12-10", "T12-11", "T12-12", "T12-14"];
const corrections = ["T12-02", "T12-03", "T12-04"];

describe("session arithmetic", () => {
  it.each(corrections.map(vector))("$title", (v) => {
    const [levelDb, backgroundDb] = [num(v.inputs.L_with_source), num(v.inputs.L_background)];
    const found = backgroundCorrection({ measuredDb: levelDb, backgroundDb, grade: "engineering" });
    expectClose(found.correctedDb, v.expected.L_corrected, v.tolerance);
    expect(found.upperBound).toBe(false);
  });
  it.each([vector("T12-09")])("$title", (v) => {
    const levels = nums(v.inputs.L);
    expectClose({ L_mean_energy: energyMean(levels), L_mean_arith: mean(levels) }, v.expected, v.tolerance);
  });
  it("leaves out none but the named", () => {
    expect(idsOf("T12-").filter((id) => ![...corrections, "T12-09"].includes(id))).toEqual(elsewhere);
  });
});
