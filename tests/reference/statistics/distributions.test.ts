import { describe, expect, it } from "vitest";
import { chiSquareUpper, fUpper } from "@/lib/science/statistics/chi-square-and-f";
import {
  normalCdf,
  normalQuantile,
  studentTCdf,
  studentTQuantile,
  studentTTwoSided,
} from "@/lib/science/statistics/distributions";
import values from "../values/distributions.json";

const close = (actual: number, expected: number, relative = 1e-12) =>
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));

describe(`distributions against ${values.source}, relative 1e-12`, () => {
  it.each(values.normalCdf)("normal CDF at %s", (z, expected) => close(normalCdf(z ?? NaN), expected ?? NaN));
  it.each(values.normalQuantile)("normal quantile at %s", (p, expected) =>
    close(normalQuantile(p ?? NaN), expected ?? NaN),
  );
  it.each(values.studentTCdf)("t CDF at t = %s, dof %s", (t, dof, expected) =>
    close(studentTCdf(t ?? NaN, dof ?? NaN), expected ?? NaN),
  );
  it.each(values.studentTQuantile)("t quantile at p = %s, dof %s", (p, dof, expected) =>
    close(studentTQuantile(p ?? NaN, dof ?? NaN), expected ?? NaN),
  );
  it.each(values.chiSquareUpper)("chi-square upper tail at %s, dof %s", (x, dof, expected) =>
    close(chiSquareUpper(x ?? NaN, dof ?? NaN), expected ?? NaN),
  );
  it.each(values.fUpper)("F upper tail at %s, dof %s and %s", (f, dof1, dof2, expected) =>
    close(fUpper(f ?? NaN, dof1 ?? NaN, dof2 ?? NaN), expected ?? NaN),
  );
});

describe("edges", () => {
  it("gives NaN for what isn't a probability or has no degrees of freedom", () => {
    expect(normalQuantile(1.1)).toBeNaN();
    expect(studentTQuantile(0.9, 0)).toBeNaN();
    expect(studentTCdf(1, -2)).toBeNaN();
    expect(chiSquareUpper(-1, 3)).toBeNaN();
  });
  it("reaches the infinities at probability 0 and 1, and 0 at one half", () => {
    expect(studentTQuantile(0, 4)).toBe(-Infinity);
    expect(normalQuantile(1)).toBe(Infinity);
    expect(studentTQuantile(0.5, 4)).toBe(0);
    expect(studentTTwoSided(0, 4)).toBe(1);
  });
  it("is the normal for infinite degrees of freedom", () => {
    expect(studentTQuantile(0.975, Infinity)).toBe(normalQuantile(0.975));
  });
});
