import { describe, expect, it } from "vitest";
import { backgroundCorrection, energyMean } from "@/lib/science/acoustics/levels";
import { distanceErrorDb } from "@/lib/science/acoustics/microphone-distance";
import { frameDrawing } from "@/lib/science/geometry/drawing/frame-drawing";
import { framePresets } from "@/lib/science/geometry/frames";
import { mean } from "@/lib/science/statistics/descriptive";
import { expectClose, num, nums, vector } from "../support/vectors";

const corrections = ["T12-02", "T12-03", "T12-04"];
const distances = ["T12-06", "T12-07", "T12-08"];
const frames = ["T12-10", "T12-11", "T12-12"];

/** Centres of the circles that a frame's drawing has as holes, mm, from their path data "Mx yAr …". */
function holesOf(sizeMm: number): { x: number; y: number }[] {
  const frame = framePresets.find((each) => each.sizeMm === sizeMm);
  if (!frame) throw new Error(`no preset of ${sizeMm} mm`);
  const { front } = frameDrawing(frame, { totalDepthMaxMm: null, inletStackMaxMm: null });
  return front.outlines.flatMap(({ d }) => {
    const [, x, y, r] = /^M(-?[\d.]+) (-?[\d.]+)A([\d.]+) /.exec(d) ?? [];
    const radius = Number(r);
    return radius * 2 === frame.holeMm ? [{ x: Number(x) + radius, y: -Number(y) }] : [];
  });
}

describe("session arithmetic", () => {
  it.each(corrections.map(vector))("$title", (v) => {
    const [levelDb, backgroundDb] = [num(v.inputs.L_with_source), num(v.inputs.L_background)];
    const found = backgroundCorrection({ measuredDb: levelDb, backgroundDb, grade: "engineering" });
    expectClose(found.correctedDb, v.expected.L_corrected, v.tolerance);
    expect(found.upperBound).toBe(false);
  });
  it.each(distances.map(vector))("$title", (v) => {
    const error = distanceErrorDb(num(v.inputs.d_nominal_m), num(v.inputs.d_actual_m));
    expectClose(error, v.expected.error_dB, v.tolerance);
  });
  it.each([vector("T12-09")])("$title", (v) => {
    const levels = nums(v.inputs.L);
    expectClose({ L_mean_energy: energyMean(levels), L_mean_arith: mean(levels) }, v.expected, v.tolerance);
  });
});

describe("the frames that are drawn", () => {
  it.each(frames.map(vector))("$title", (v) => {
    const outer = num(v.inputs.outer_mm);
    const holes = holesOf(outer);
    expect(holes).toHaveLength(4);
    const across = Math.max(...holes.map(({ x }) => x)) - Math.min(...holes.map(({ x }) => x));
    expect(across).toBeCloseTo(num(v.inputs.hole_spacing_mm), 9);
    const [first] = holes;
    const apart = holes.map(({ x, y }) => Math.hypot(x - (first?.x ?? NaN), y - (first?.y ?? NaN)));
    const found = {
      edge_to_hole_centre_mm: outer / 2 - Math.abs(first?.x ?? NaN),
      hole_diagonal_mm: Math.max(...apart),
    };
    expectClose(found, v.expected, v.tolerance);
  });
});
